import { spawn } from 'node:child_process';
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';

/*
 * Complete documents with values from independent solvers (tests/reference/README.md), all through one
 * `estimate --stdin`, each expected row an assertion with the tolerance it states. None may be loosened.
 */

interface ExpectedRow {
  path: string;
  value: unknown;
  relative?: number;
  absolute?: number;
  relativeToPeak?: number;
}

interface Case {
  id: string;
  title: string;
  design: unknown;
  vibration: unknown;
  positions?: number[];
  expect: ExpectedRow[];
}

const folder = join(import.meta.dirname, '../reference/cases');
const cases = readdirSync(folder)
  .filter((file) => file.endsWith('.json'))
  .sort()
  .map((file) => JSON.parse(readFileSync(join(folder, file), 'utf8')) as Case);

const answers = new Map<string, unknown>();

/** One child process answers all cases, one line each. */
async function runAll(): Promise<void> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/cli/estimate.ts', '--stdin'], {
    cwd: join(import.meta.dirname, '../..'),
    stdio: ['pipe', 'pipe', 'inherit'],
  });
  let output = '';
  child.stdout.setEncoding('utf8').on('data', (text: string) => (output += text));
  for (const { design, vibration, positions } of cases) {
    child.stdin.write(`${JSON.stringify({ design, vibration, positions })}\n`);
  }
  child.stdin.end();
  const code = await new Promise<number | null>((resolve, reject) => child.on('error', reject).on('close', resolve));
  expect(code).toBe(0);
  const lines = output.trimEnd().split('\n');
  expect(lines).toHaveLength(cases.length);
  cases.forEach(({ id }, index) => answers.set(id, JSON.parse(lines[index] ?? 'null')));
}

function valueAt(answer: unknown, path: string): unknown {
  let value = answer;
  for (const key of path.split('.')) value = (value as Record<string, unknown> | null | undefined)?.[key];
  return value;
}

function numbersOf(value: unknown): number[] {
  return Array.isArray(value) ? (value as number[]) : [value as number];
}

/** Largest difference over what the row allows; at most 1 where the row is met. */
function excess(row: ExpectedRow, computed: number[], expected: number[]): number {
  const peak = Math.max(...expected.map(Math.abs));
  return Math.max(
    ...expected.map((value, index) => {
      const allowed =
        row.absolute ??
        (row.relative !== undefined ? row.relative * Math.abs(value) : (row.relativeToPeak ?? 0) * peak);
      const difference = Math.abs((computed[index] ?? NaN) - value);
      return Number.isNaN(difference) ? Infinity : difference / allowed;
    }),
  );
}

// About 10 s of computing; a machine with other work to do takes its time
beforeAll(runAll, 300_000);

describe.each(cases)('$id $title', ({ id, expect: rows }) => {
  test.each(rows)('$path', (row) => {
    const answer = answers.get(id);
    expect(valueAt(answer, 'errors')).toBeUndefined();
    const value = valueAt(answer, row.path);
    if (typeof row.value === 'string' || typeof row.value === 'boolean') {
      expect(value).toBe(row.value);
      return;
    }
    const expected = numbersOf(row.value);
    const computed = numbersOf(value);
    expect(computed).toHaveLength(expected.length);
    expect(
      excess(row, computed, expected),
      `${JSON.stringify(value)?.slice(0, 200)} against ${JSON.stringify(row.value).slice(0, 200)}`,
    ).toBeLessThanOrEqual(1);
  });
});
