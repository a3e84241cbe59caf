import js from '@eslint/js';
import tseslint from 'typescript-eslint';
import reactHooks from 'eslint-plugin-react-hooks';

/** Import rules of DEVELOPERS.md. ESLint's own rule with `regex`: glob patterns starting with # silently match nothing. */
const forbid = (...rules) => ({
  'no-restricted-imports': ['error', { patterns: rules.map(([regex, message]) => ({ regex, message })) }],
});

const serverFeatures = [
  'auth',
  'people',
  'briefs',
  'designs',
  'revisions',
  'runs',
  'instruments',
  'records',
  'desk',
  'catalogue',
  'estimates',
  'audit',
  'mail',
];
const clientFeatures = [
  'session',
  'people',
  'briefs',
  'designs',
  'design',
  'revision',
  'bench',
  'records',
  'desk',
  'catalogue',
  'administration',
  'strip',
];

const serverPackages = '^(express|knex|better-sqlite3|nodemailer|passport|pino|piscina|node:)';

export default tseslint.config(
  { ignores: ['dist', 'data', 'look', 'coverage', 'node_modules', 'tests/tooling/violations'] },
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
    files: ['server/physics/**/*.ts'],
    rules: forbid(
      ['^#', 'server/physics imports only itself.'],
      ['^(?!\\.|zod$|node:crypto$)', 'server/physics imports only itself (and the zod of its document schema).'],
      [
        '^(\\.\\./){1,}(contracts|features|http|mail|jobs|cli|app|db|config|audit|errors)',
        'server/physics imports only itself.',
      ],
    ),
  },
  {
    files: ['server/physics/kernels/**/*.ts'],
    rules: forbid(
      ['(^|/)models/', 'Kernels never import models.'],
      ['^\\.\\./', 'A kernel knows numbers only: it imports other kernels, nothing above them.'],
      ['^[^.]', 'A kernel imports nothing outside server/physics/kernels.'],
    ),
  },
  {
    files: ['workflows/**/*.ts'],
    rules: forbid(
      ['^(?!\\.|xstate$|zod$)', 'workflows import xstate and themselves only.'],
      ['^\\.\\./\\.\\./', 'workflows import xstate and themselves only.'],
    ),
  },
  {
    files: ['workflows/*/vocabulary.ts', 'workflows/*/rules.ts'],
    rules: forbid(
      ['^xstate', 'Words and rules are plain: xstate belongs to machine.ts.'],
      ['^(?!\\.|zod$)', 'workflows import xstate and themselves only.'],
    ),
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
    files: ['server/**/*.ts'],
    ignores: ['server/physics/**', 'server/contracts/**', 'server/features/**'],
    rules: forbid(['^#client/|/src/', 'The server never imports the client.']),
  },
  ...serverFeatures.map((feature) => ({
    files: [`server/features/${feature}/**/*.ts`],
    rules: forbid(
      ['^#client/|/src/', 'The server never imports the client.'],
      [`^\\.\\./(?!(\\.\\./)|[a-z-]+/reads$)`, 'A server feature asks another through its reads.ts.'],
      [`^#server/features/(?!${feature}/)(?![a-z-]+/reads$)`, 'A server feature asks another through its reads.ts.'],
    ),
  })),
  {
    files: ['src/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    rules: {
      ...reactHooks.configs.recommended.rules,
      ...forbid(
        [
          '^#(server|physics|migrations)',
          'The client imports #contracts/* and #workflows/*, never the rest of server/.',
        ],
        [serverPackages, 'Server packages do not belong in the client.'],
      ),
    },
  },
  {
    files: ['src/ui/**/*.{ts,tsx}', 'src/lib/**/*.{ts,tsx}'],
    rules: forbid(
      ['^#(server|physics|migrations)', 'The client imports #contracts/* and #workflows/*, never the rest of server/.'],
      ['(^|/)(features|routes)/', 'ui and lib know no feature.'],
      [serverPackages, 'Server packages do not belong in the client.'],
    ),
  },
  ...clientFeatures.map((feature) => ({
    files: [`src/features/${feature}/**/*.{ts,tsx}`],
    rules: forbid(
      ['^#(server|physics|migrations)', 'The client imports #contracts/* and #workflows/*, never the rest of server/.'],
      [`(^|/)features/(?!${feature}/)`, 'A client feature never imports another: the route combines them.'],
      [`^\\.\\./(?!\\.\\./)`, 'A client feature never imports another: the route combines them.'],
      ['(^|/)routes/', 'Features know no route.'],
      [serverPackages, 'Server packages do not belong in the client.'],
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
