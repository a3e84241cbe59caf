import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildIfStale } from './build-if-stale.mjs';

const chromium = process.env.CHROMIUM_PATH ?? '/usr/bin/chromium';
const bin = (path) => ['node', join('node_modules', path)];

/** Runs a program; resolves to its exit code and, where it does not write straight to the screen, what it wrote. */
function run([program, ...given], inherit = false) {
  return new Promise((resolve) => {
    const child = spawn(program === 'node' ? process.execPath : program, given, {
      stdio: inherit ? 'inherit' : ['ignore', 'pipe', 'pipe'],
      env: { ...process.env, FORCE_COLOR: process.stdout.isTTY ? '1' : '0' },
    });
    let output = '';
    for (const stream of [child.stdout, child.stderr]) stream?.on('data', (text) => (output += text));
    child.on('close', (code) => resolve({ code: code ?? 1, output }));
  });
}

function stop(line) {
  console.error(`\n${line}`);
  console.log('\n0 passed, 1 failed');
  process.exit(1);
}

async function check(name, command) {
  const started = Date.now();
  const { code, output } = await run(command);
  const seconds = ((Date.now() - started) / 1000).toFixed(1);
  if (code !== 0) {
    console.error(output);
    stop(`✗ ${name} (${seconds} s)`);
  }
  console.log(`✓ ${name} (${seconds} s)`);
}

if (!existsSync(chromium)) {
  stop(
    `✗ Chromium is missing at ${chromium}: the end-to-end tests drive a real browser.\n` +
      '  Debian: apt-get update && apt-get install chromium. Elsewhere set CHROMIUM_PATH to its program.',
  );
}

// Two at a time: the checks keep one core each.
await Promise.all([
  (async () => {
    await check('formatting (prettier)', [...bin('prettier/bin/prettier.cjs'), '--check', '--log-level', 'warn', '.']);
    await check('rules, imports among them (eslint)', [...bin('eslint/bin/eslint.js'), '--max-warnings', '0', '.']);
  })(),
  (async () => {
    await check('types (tsc)', [...bin('typescript/bin/tsc'), '--noEmit']);
    await check('dead code (knip)', [...bin('knip/bin/knip.js')]);
  })(),
]);
buildIfStale();

const folder = mkdtempSync(join(tmpdir(), 'tremolode-test-'));
const resultFile = join(folder, 'results.json');
const { code } = await run(
  [
    ...bin('vitest/vitest.mjs'),
    'run',
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${resultFile}`,
    ...process.argv.slice(2),
  ],
  true,
);
const results = existsSync(resultFile) ? JSON.parse(readFileSync(resultFile, 'utf8')) : null;
rmSync(folder, { recursive: true, force: true });
if (results === null) stop('✗ The test runner left no results.');

const skipped = results.numPendingTests + results.numTodoTests;
// A file that cannot even be loaded has no failed test and is counted itself; so is an error outside of any test.
const brokenFiles = results.testResults.filter(
  ({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0,
);
const failed = results.numFailedTests + brokenFiles.length || (code === 0 ? 0 : 1);
console.log(`\n${results.numPassedTests} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`);
process.exit(code === 0 && failed === 0 && results.numPassedTests > 0 ? 0 : 1);
