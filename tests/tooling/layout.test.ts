import { readFileSync, readdirSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { describe, expect, test } from 'vitest';

const sources = ['src', 'server', 'workflows', 'migrations', 'scripts', 'tests'].flatMap((folder) =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((file) => /\.(ts|tsx|mjs)$/.test(file))
    .map((file) => join(folder, file)),
);

describe('the files', () => {
  test('are there to be looked at', () => {
    expect(sources.length).toBeGreaterThan(100);
  });

  test('lie in no folder that says nothing', () => {
    const vague = sources.filter((file) => /(^|\/)(utils?|helpers?|common|types|misc|shared)\//.test(file));
    expect(vague).toEqual([]);
  });

  test('have names in kebab case', () => {
    const odd = sources.filter((file) => !/^[a-z0-9]+(-[a-z0-9]+)*(\.(test|d))?\.(ts|tsx|mjs)$/.test(basename(file)));
    expect(odd).toEqual([]);
  });

  test('are doors only where doors are meant', () => {
    const doors = sources.filter((file) => /^index\.tsx?$/.test(basename(file))).map((file) => dirname(file));
    expect(doors.filter((folder) => !/^(workflows\/[a-z-]+|server|migrations)$/.test(folder))).toEqual([]);
  });

  test('leave no test out and nothing for later', () => {
    const marks = /\b(test|describe|it)\.(skip|only|todo)\b|\b(TODO|FIXME)\b/;
    const marked = sources.filter(
      (file) => file !== 'tests/tooling/layout.test.ts' && marks.test(readFileSync(file, 'utf8')),
    );
    expect(marked).toEqual([]);
  });

  test('switch no rule off without saying why', () => {
    const silent = sources.filter((file) =>
      readFileSync(file, 'utf8')
        .split('\n')
        .some(
          (line) => /eslint-disable|@ts-(ignore|expect-error)/.test(line) && !/ -- |@ts-expect-error \S/.test(line),
        ),
    );
    expect(silent.filter((file) => file !== 'tests/tooling/layout.test.ts')).toEqual([]);
  });
});

describe('the lock file', () => {
  test('names no registry', () => {
    const { packages } = JSON.parse(readFileSync('package-lock.json', 'utf8')) as {
      packages: Record<string, { resolved?: string; link?: boolean }>;
    };
    expect(Object.entries(packages).filter(([, { resolved }]) => resolved !== undefined)).toEqual([]);
  });
});

describe('package.json', () => {
  test('pins every version', () => {
    const { dependencies, devDependencies } = JSON.parse(readFileSync('package.json', 'utf8')) as Record<
      string,
      Record<string, string>
    >;
    const loose = Object.entries({ ...dependencies, ...devDependencies }).filter(
      ([, version]) => !/^\d+\.\d+\.\d+$/.test(version),
    );
    expect(loose).toEqual([]);
  });
});
