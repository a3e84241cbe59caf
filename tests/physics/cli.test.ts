import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { estimate } from '#physics/estimate';
import { referenceCase } from '../support/handbook';

const root = join(import.meta.dirname, '../..');
const { design } = referenceCase('D2-01');
const tone = { kind: 'tone', frequency: 50, acceleration: 1, as: 'peak' };
let folder = '';

/** The program itself; npm only where its own script is under test, for it takes as long again to start. */
function run(args: string[], input = '', command = [process.execPath, '--import', 'tsx', 'server/cli/estimate.ts']) {
  const [program = '', ...first] = command;
  const { status, stdout } = spawnSync(program, [...first, ...args], { cwd: root, input, encoding: 'utf8' });
  const lines = stdout
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => JSON.parse(line) as unknown);
  return { code: status, lines };
}

const file = (name: string, content: unknown): string => {
  const path = join(folder, name);
  writeFileSync(path, typeof content === 'string' ? content : JSON.stringify(content));
  return path;
};

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'estimate-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

describe('two files', () => {
  test('prints one object, the very one that the door returns, and exits 0', () => {
    const npm = ['npm', 'run', '--silent', 'estimate', '--'];
    const { code, lines } = run([file('d.json', design), file('v.json', tone)], '', npm);
    expect(code).toBe(0);
    expect(lines).toEqual([JSON.parse(JSON.stringify(estimate(design, tone)))]);
  });

  test('--positions sets where the curve is evaluated, --quiet-arrays leaves arrays out', () => {
    const files = [file('d.json', design), file('v.json', tone)];
    const [asked] = run([...files, '--positions', '0,0.001,-2e-3']).lines as { curve: { position: number[] } }[];
    expect(asked?.curve.position).toEqual([0, 0.001, -0.002]);
    const [quiet] = run([...files, '--quiet-arrays']).lines as { curve: object; waveforms: unknown }[];
    expect(Object.keys(quiet?.curve ?? {})).toEqual(['couplingAtRest', 'couplingPeak', 'couplingPeakAt']);
    expect(quiet?.waveforms).toBeNull();
  });

  test.each<[string, unknown, unknown, string]>([
    ['a bad value', { ...design, conductivity: '58 kg' }, tone, 'conductivity'],
    ['text that is no JSON', '{', tone, 'design'],
    ['a vibration of no kind', design, {}, 'kind'],
  ])('%s exits 2 with path, value and message', (_, badDesign, vibration, path) => {
    const { code, lines } = run([file('bad.json', badDesign), file('v.json', vibration)]);
    expect(code).toBe(2);
    expect(lines).toHaveLength(1);
    const [issue] = (lines[0] as { errors: Record<string, unknown>[] }).errors;
    expect(issue).toMatchObject({ path });
    expect(issue).toHaveProperty('value');
    expect(String(issue?.['message']).length).toBeGreaterThan(5);
  });

  test.each([[[]], [['only-one.json']], [['missing.json', 'missing.json']], [['--unknown']]])('%j exits 2', (args) => {
    const { code, lines } = run(args);
    expect(code).toBe(2);
    expect(lines[0]).toHaveProperty('errors.0.message');
  });
});

test('--stdin answers each line in order; a bad one answers its errors and the next goes on', () => {
  const input = [
    JSON.stringify({ design, vibration: tone, positions: [0] }),
    'not json',
    '',
    JSON.stringify({ design: {}, vibration: tone }),
    JSON.stringify({ design, vibration: tone, colour: 1 }),
    JSON.stringify({ design, vibration: tone, positions: ['here'] }),
    JSON.stringify({ design, vibration: { ...tone, acceleration: 2 } }),
  ].join('\n');
  const { code, lines } = run(['--stdin', '--quiet-arrays'], input);
  expect(code).toBe(0);
  const paths = lines.map((line) => (line as { errors?: { path: string }[] }).errors?.[0]?.path ?? 'estimate');
  expect(paths).toEqual(['estimate', '', 'layout', 'colour', 'positions.0', 'estimate']);
});
