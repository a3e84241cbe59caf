import { ESLint } from 'eslint';
import { beforeAll, describe, expect, test } from 'vitest';

let eslint: ESLint;
beforeAll(() => {
  eslint = new ESLint();
});

/** What the rules say to a file at this (pretended) place that imports this. */
async function complaints(filePath: string, imported: string): Promise<string[]> {
  const [result] = await eslint.lintText(`import { thing } from '${imported}';\nthing();\n`, { filePath });
  return (result?.messages ?? []).map(({ message }) =>
    message.replace(/^'.*' import is restricted from being used by a pattern\. /, ''),
  );
}

const physics = 'server/physics imports only itself';
const kernels = 'A kernel';
const workflows = 'workflows import xstate and themselves only.';
const contracts = 'Contracts import zod, workflow vocabularies and the document schema.';
const server = 'The server never imports the client.';
const serverFeature = 'A server feature asks another through its reads.ts.';
const client = 'The client imports #contracts/* and #workflows/*, never the rest of server/.';
const packages = 'Server packages do not belong in the client.';
const clientFeature = 'A client feature never imports another: the route combines them.';

describe('an import across a line is refused', () => {
  test.each([
    ['server/physics/planted.ts', '#contracts/estimates', physics],
    ['server/physics/planted.ts', '../config', physics],
    ['server/physics/planted.ts', 'knex', physics],
    ['server/physics/planted.ts', 'node:fs', physics],
    ['server/physics/models/planted.ts', '../../errors', physics],
    ['server/physics/models/planted.ts', '#server/db', physics],
    ['server/physics/kernels/planted.ts', '../models/coil', 'Kernels never import models.'],
    ['server/physics/kernels/planted.ts', '../quantity', kernels],
    ['server/physics/kernels/planted.ts', 'zod', kernels],
    ['server/physics/kernels/planted.ts', '#physics/quantity', kernels],
    ['workflows/revision/planted.ts', '#contracts/basics', workflows],
    ['workflows/revision/planted.ts', '../../server/errors', workflows],
    ['workflows/revision/planted.ts', '../other/rules', workflows],
    ['workflows/revision/planted.ts', 'react', workflows],
    ['workflows/revision/vocabulary.ts', 'xstate', 'Words and rules are plain: xstate belongs to machine.ts.'],
    ['workflows/revision/rules.ts', '../../server/errors', workflows],
    ['server/contracts/planted.ts', '../errors', contracts],
    ['server/contracts/planted.ts', '#server/errors', contracts],
    ['server/contracts/planted.ts', 'express', contracts],
    ['server/contracts/planted.ts', '#physics/models/device', contracts],
    ['server/planted.ts', '#client/lib/format', server],
    ['server/http/planted.ts', '../../src/lib/format', server],
    ['migrations/planted.ts', '../src/lib/format', server],
    ['server/features/briefs/planted.ts', '../../../src/lib/format', server],
    ['server/features/briefs/planted.ts', '../people/service', serverFeature],
    ['server/features/briefs/planted.ts', '../people/store', serverFeature],
    ['server/features/briefs/planted.ts', '../../features/people/service', serverFeature],
    ['server/features/briefs/planted.ts', '#server/features/people/service', serverFeature],
    ['src/routes/planted.tsx', '#server/errors', client],
    ['src/routes/planted.tsx', '#physics/quantity', client],
    ['src/routes/planted.tsx', '#migrations', client],
    ['src/routes/planted.tsx', '../../server/errors', client],
    ['src/routes/planted.tsx', 'express', packages],
    ['src/lib/planted.ts', 'node:fs', packages],
    ['src/lib/planted.ts', '#server/errors', client],
    ['src/ui/planted.tsx', '../features/people/queries', 'ui and lib know no feature.'],
    ['src/lib/planted.ts', '#client/features/people/queries', 'ui and lib know no feature.'],
    ['src/ui/planted.tsx', 'knex', packages],
    ['src/features/people/planted.tsx', '../briefs/queries', clientFeature],
    ['src/features/people/planted.tsx', '#client/features/briefs/queries', clientFeature],
    ['src/features/people/planted.tsx', '../../routes/briefs', 'Features know no route.'],
    ['src/features/people/planted.tsx', '#server/errors', client],
    ['src/features/people/planted.tsx', 'better-sqlite3', packages],
  ])('%s: %s', async (filePath, imported, message) => {
    const said = await complaints(filePath, imported);
    expect(said.some((line) => line.startsWith(message))).toBe(true);
  });
});

describe('an import within the lines is not', () => {
  test.each([
    ['server/physics/planted.ts', './models/device'],
    ['server/physics/planted.ts', 'zod'],
    ['server/physics/models/planted.ts', '../kernels/newton'],
    ['server/physics/models/planted.ts', '../quantity'],
    ['server/physics/kernels/planted.ts', './newton'],
    ['workflows/revision/planted.ts', './rules'],
    ['workflows/revision/machine.ts', 'xstate'],
    ['workflows/revision/rules.ts', './vocabulary'],
    ['server/contracts/planted.ts', './basics'],
    ['server/contracts/planted.ts', '#workflows/revision'],
    ['server/contracts/planted.ts', '#physics/design-document'],
    ['server/features/briefs/planted.ts', './store'],
    ['server/features/briefs/planted.ts', '../people/reads'],
    ['server/features/briefs/planted.ts', '../../errors'],
    ['server/features/briefs/planted.ts', '#contracts/briefs'],
    ['server/app.ts', './features/people/routes'],
    ['src/routes/planted.tsx', '../features/people/queries'],
    ['src/routes/planted.tsx', '#contracts/people'],
    ['src/routes/planted.tsx', '#workflows/revision'],
    ['src/features/people/planted.tsx', './queries'],
    ['src/features/people/planted.tsx', '../../ui/button'],
    ['src/features/people/planted.tsx', '../../lib/format'],
    ['src/ui/planted.tsx', '../lib/format'],
  ])('%s: %s', async (filePath, imported) => {
    expect(await complaints(filePath, imported)).toEqual([]);
  });
});
