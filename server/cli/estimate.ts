import { readFileSync } from 'node:fs';
import { createInterface } from 'node:readline';
import { DocumentError, estimate } from '#physics/estimate';
import type { DocumentIssue } from '#physics/estimate';

const usage = [
  'Usage: npm run --silent estimate -- design.json vibration.json [--positions 0,0.001,…] [--quiet-arrays]',
  '       npm run --silent estimate -- --stdin [--quiet-arrays]',
  '',
  'Prints one JSON object: the estimate, or { "errors": [ { "path", "value", "message" } ] } with exit code 2.',
  '--positions     where the coupling curve is evaluated, metres, parted by commas',
  '--quiet-arrays  leaves curves and waveforms out',
  '--stdin         reads { "design", "vibration", "positions" } objects, one a line, and answers one line each',
].join('\n');

interface Arguments {
  files: string[];
  positions: number[] | undefined;
  quiet: boolean;
  stdin: boolean;
}

class BadRequest extends Error {
  constructor(readonly issue: DocumentIssue) {
    super(issue.message);
  }
}

const bad = (path: string, value: string | null, message: string): BadRequest =>
  new BadRequest({ path, value, message });

function readPositions(text: string): number[] {
  return text.split(',').map((part, index) => {
    const value = Number(part);
    if (part.trim() === '' || !Number.isFinite(value)) {
      throw bad(`positions.${index}`, part, 'must be a number of metres; positions are parted by commas');
    }
    return value;
  });
}

function readArguments(given: readonly string[]): Arguments {
  const result: Arguments = { files: [], positions: undefined, quiet: false, stdin: false };
  for (let index = 0; index < given.length; index += 1) {
    const word = given[index] ?? '';
    if (word === '--quiet-arrays') result.quiet = true;
    else if (word === '--stdin') result.stdin = true;
    else if (word === '--positions') {
      index += 1;
      const text = given[index];
      if (text === undefined) throw bad('positions', null, '--positions needs metres parted by commas');
      result.positions = readPositions(text);
    } else if (word.startsWith('--positions=')) result.positions = readPositions(word.slice('--positions='.length));
    else if (word.startsWith('--')) throw bad('', word, `the option ${word} is not known\n${usage}`);
    else result.files.push(word);
  }
  if (result.stdin ? result.files.length > 0 : result.files.length !== 2) throw bad('', result.files.join(' '), usage);
  return result;
}

function parseJson(text: string, path: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch (error) {
    throw bad(path, text.slice(0, 80), `is not JSON: ${error instanceof Error ? error.message : String(error)}`);
  }
}

function readJsonFile(file: string, path: string): unknown {
  let text: string;
  try {
    text = readFileSync(file, 'utf8');
  } catch {
    throw bad(path, file, 'the file cannot be read');
  }
  return parseJson(text, path);
}

function issuesFrom(error: unknown): readonly DocumentIssue[] {
  if (error instanceof DocumentError) return error.issues;
  if (error instanceof BadRequest) return [error.issue];
  // A defect of the program: told on the error channel in full, and it must not take the other lines along
  console.error(error);
  const message = `could not be computed: ${error instanceof Error ? error.message : String(error)}`;
  return [{ path: '', value: null, message }];
}

/** The answer to one request: the estimate, or what is wrong with the request. */
function answer(compute: () => unknown): { text: string; ok: boolean } {
  try {
    return { text: JSON.stringify(compute()), ok: true };
  } catch (error) {
    return { text: JSON.stringify({ errors: issuesFrom(error) }), ok: false };
  }
}

const knownKeys = ['design', 'vibration', 'positions'];

function answerLine(line: string, quiet: boolean): { text: string; ok: boolean } {
  return answer(() => {
    const request = parseJson(line, '');
    if (typeof request !== 'object' || request === null || Array.isArray(request)) {
      throw bad('', line.slice(0, 80), 'must be an object with design and vibration');
    }
    const unknown = Object.keys(request).find((key) => !knownKeys.includes(key));
    if (unknown !== undefined) throw bad(unknown, null, `the key “${unknown}” is not known here`);
    const { design, vibration, positions } = request as Record<string, unknown>;
    return estimate(design, vibration, {
      arrays: !quiet,
      // `estimate` says what is wrong with positions that are no list of numbers
      ...(positions === undefined || positions === null ? {} : { positions: positions as number[] }),
    });
  });
}

/** Writes a line and waits where the reader is slower. */
async function writeLine(text: string): Promise<void> {
  if (process.stdout.write(`${text}\n`)) return;
  await new Promise<void>((resolve) => process.stdout.once('drain', resolve));
}

/** Answers every line; a bad one answers its errors and the next goes on, so the run as a whole has not failed. */
async function answerStdin(quiet: boolean): Promise<void> {
  for await (const line of createInterface({ input: process.stdin, crlfDelay: Infinity })) {
    if (line.trim() === '') continue;
    await writeLine(answerLine(line, quiet).text);
  }
}

async function main(): Promise<void> {
  const given = process.argv.slice(2);
  if (given.includes('--help')) {
    await writeLine(usage);
    return;
  }
  let ok: boolean;
  try {
    const { files, positions, quiet, stdin } = readArguments(given);
    if (stdin) {
      await answerStdin(quiet);
      ok = true;
    } else {
      const [designFile = '', vibrationFile = ''] = files;
      const result = answer(() =>
        estimate(readJsonFile(designFile, 'design'), readJsonFile(vibrationFile, 'vibration'), {
          arrays: !quiet,
          ...(positions === undefined ? {} : { positions }),
        }),
      );
      await writeLine(result.text);
      ok = result.ok;
    }
  } catch (error) {
    if (!(error instanceof BadRequest)) throw error;
    await writeLine(JSON.stringify({ errors: [error.issue] }));
    ok = false;
  }
  process.exitCode = ok ? 0 : 2;
}

await main();
