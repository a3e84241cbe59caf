import { readdirSync } from 'node:fs';
import js from '@eslint/js';
import tseslint from 'typescript-eslint';
import reactHooks from 'eslint-plugin-react-hooks';

/** Import rules of DEVELOPERS.md. ESLint's own rule with `regex`: glob patterns starting with # silently match nothing. */
const forbid = (...rules) => ({
  'no-restricted-imports': ['error', { patterns: rules.map(([regex, message]) => ({ regex, message })) }],
});

/** Features as they stand on disk, so that a new one is under the rules from its first file. */
const foldersIn = (path) =>
  readdirSync(new URL(path, import.meta.url), { withFileTypes: true })
    .filter((entry) => entry.isDirectory())
    .map(({ name }) => name);

// A later entry of this file replaces the whole value of a rule for the files it names: it repeats what still holds.
const physicsRules = [
  ['^#', 'server/physics imports only itself.'],
  ['^(?!\\.|zod$|node:crypto$)', 'server/physics imports only itself (and the zod of its document schema).'],
];
const workflowRules = [
  ['^(?!\\.|xstate$|zod$)', 'workflows import xstate and themselves only.'],
  ['^\\.\\./', 'workflows import xstate and themselves only.'],
];
const serverRules = [['^#client/|(^|/)src/', 'The server never imports the client.']];
const clientRules = [
  [
    '^#(server|physics|migrations)|(^|/)(server|migrations)/',
    'The client imports #contracts/* and #workflows/*, never the rest of server/.',
  ],
  [
    '^(express|knex|better-sqlite3|nodemailer|passport|pino|piscina)($|-|/)|^node:',
    'Server packages do not belong in the client.',
  ],
];

export default tseslint.config(
  { ignores: ['dist', 'data', 'look', 'coverage', 'node_modules'] },
  js.configs.recommended,
  ...tseslint.configs.recommended,
  {
    rules: {
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'separate-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'no-console': ['error', { allow: ['warn', 'error'] }],
      eqeqeq: ['error', 'always'],
    },
  },
  {
    files: ['server/physics/*.ts'],
    rules: forbid(...physicsRules, ['^\\.\\./', 'server/physics imports only itself.']),
  },
  {
    files: ['server/physics/*/**/*.ts'],
    rules: forbid(...physicsRules, ['^\\.\\./\\.\\./', 'server/physics imports only itself.']),
  },
  {
    files: ['server/physics/kernels/**/*.ts'],
    rules: forbid(
      ['(^|/)models/', 'Kernels never import models.'],
      ['^\\.\\./', 'A kernel knows numbers only: it imports other kernels, nothing above them.'],
      ['^[^.]', 'A kernel imports nothing outside server/physics/kernels.'],
    ),
  },
  { files: ['workflows/**/*.ts'], rules: forbid(...workflowRules) },
  {
    files: ['workflows/*/vocabulary.ts', 'workflows/*/rules.ts'],
    rules: forbid(...workflowRules, ['^xstate', 'Words and rules are plain: xstate belongs to machine.ts.']),
  },
  {
    files: ['server/contracts/**/*.ts'],
    rules: forbid(
      [
        '^(?!\\.|zod$|#workflows/|#physics/(design-document|vibration-document|quantity|estimate-shape|catalogue)$)',
        'Contracts import zod, workflow vocabularies and the document schema.',
      ],
      ['^\\.\\./', 'Contracts import zod, workflow vocabularies and the document schema.'],
    ),
  },
  {
    files: ['server/**/*.ts', 'migrations/**/*.ts'],
    ignores: ['server/physics/**', 'server/contracts/**', 'server/features/**'],
    rules: forbid(...serverRules),
  },
  ...foldersIn('./server/features/').map((feature) => ({
    files: [`server/features/${feature}/**/*.ts`],
    rules: forbid(
      ...serverRules,
      ['^\\.\\./(?!\\.\\./)(?![a-z-]+/reads$)', 'A server feature asks another through its reads.ts.'],
      [
        `(^#server|/)/?features/(?!${feature}/)(?![a-z-]+/reads$)`,
        'A server feature asks another through its reads.ts.',
      ],
    ),
  })),
  {
    files: ['src/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    rules: { ...reactHooks.configs.recommended.rules, ...forbid(...clientRules) },
  },
  {
    files: ['src/ui/**/*.{ts,tsx}', 'src/lib/**/*.{ts,tsx}'],
    rules: forbid(...clientRules, ['(^|/)(features|routes|app)/', 'ui and lib know no feature.']),
  },
  ...foldersIn('./src/features/').map((feature) => ({
    files: [`src/features/${feature}/**/*.{ts,tsx}`],
    rules: forbid(
      ...clientRules,
      [`(^|/)features/(?!${feature}/)`, 'A client feature never imports another: the route combines them.'],
      ['^\\.\\./(?!\\.\\./)', 'A client feature never imports another: the route combines them.'],
      ['(^|/)(routes|app)/', 'Features know no route.'],
    ),
  })),
  {
    files: ['scripts/**/*.{ts,mjs}', 'server/cli/**/*.ts', '*.js'],
    languageOptions: {
      globals: { process: 'readonly', console: 'readonly', URL: 'readonly', setTimeout: 'readonly', fetch: 'readonly' },
    },
    rules: { 'no-console': 'off' },
  },
);
