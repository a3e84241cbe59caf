import type { KnipConfig } from 'knip';

/** What starts by itself: the server, its threads, its commands, the page and its lazily loaded screens, the tests. */
const entry = [
  'server/index.ts',
  'server/jobs/*-worker.ts',
  'server/jobs/*.mjs',
  'server/cli/*.ts',
  'scripts/*.{mjs,ts}',
  'migrations/0*.ts',
  'src/app/styles.css',
  'src/routes/*.tsx',
  'tests/**/*.test.{ts,tsx}',
];

export default {
  entry,
  project: ['src/**/*.{ts,tsx,css}', '{server,workflows,migrations,scripts,tests}/**/*.{ts,tsx,mjs}', '*.{ts,js}'],
  // Dead is what nobody uses; what its own file uses may be exported for whoever comes next.
  ignoreExportsUsedInFile: true,
  // Only named in the `dev` script, behind `exec`.
  ignoreDependencies: ['concurrently'],
  compilers: {
    // Packages that style sheets import: fonts.
    css: (text: string) =>
      [...text.matchAll(/@import\s+['"]([^'"]+)['"]/g)].map(([, name]) => `import '${name}';`).join('\n'),
  },
} satisfies KnipConfig;
