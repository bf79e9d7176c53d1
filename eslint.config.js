import { createRequire } from 'node:module';
import { configs as tsConfigs } from 'typescript-eslint';

const expo = createRequire(import.meta.url)('eslint-config-expo/flat');

/** Each folder's fence is one whole block: a later match replaces an earlier one. Where a rule comes from: DEVELOPERS.md. */
function fence(files, ...forbidden) {
  return {
    files,
    rules: {
      'no-restricted-imports': ['error', { patterns: forbidden.map(([regex, message]) => ({ regex, message })) }],
    },
  };
}

const deep = ['^\\.\\./', 'Use the #folder alias across folders and ./ inside one.'];
const fake = ['^(#payments-fake/|.*/payments-fake/)', 'The payments fake plays another company.'];
const server = ['^#(server|db)/', 'Server code never reaches the browser.'];
const auth = ['^better-auth$', 'The browser uses better-auth/react and better-auth/client/plugins.'];

export default [
  { ignores: ['node_modules', 'dist*', '.data', '.expo', 'coverage', 'db/migrations', 'expo-env.d.ts'] },
  ...expo,
  ...tsConfigs.recommendedTypeChecked.map((block) => ({ ...block, files: ['**/*.ts', '**/*.tsx'] })),
  {
    files: ['**/*.ts', '**/*.tsx'],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': [
        'error',
        { checksVoidReturn: { attributes: false, arguments: false } },
      ],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-definitions': ['error', 'type'],
      '@typescript-eslint/consistent-type-imports': 'error',
      'import/no-unresolved': 'off',
      'import/namespace': 'off',
      'no-sequences': 'error',
      // A zod schema and its type share one name.
      '@typescript-eslint/no-redeclare': 'off',
      'no-console': 'error',
      'no-restricted-properties': [
        'error',
        { object: 'process', property: 'env', message: 'Read settings from server/env.ts or hooks/env.ts.' },
      ],
      'max-params': ['error', 3],
      'max-lines': ['error', { max: 300 }],
      'max-lines-per-function': ['error', { max: 60, skipBlankLines: true, skipComments: true }],
    },
  },
  { files: ['**/*.tsx'], rules: { 'max-lines-per-function': ['error', { max: 110 }] } },
  { files: ['app/**/*.tsx'], rules: { 'max-lines': ['error', { max: 200 }], 'import/no-default-export': 'off' } },
  {
    files: [
      'tests/**/*',
      'scripts/**/*',
      '*.config.*',
      'payments-fake/main.ts',
      'db/**/*.ts',
      'hooks/env.ts',
      'server/env.ts',
    ],
    rules: { 'no-restricted-properties': 'off' },
  },
  {
    files: [
      'tests/**/*',
      'scripts/**/*',
      'payments-fake/main.ts',
      'db/migrate.ts',
      'db/seed/*.ts',
      'server/http/log.ts',
    ],
    rules: { 'no-console': 'off' },
  },
  { files: ['tests/**/*', 'db/seed/**'], rules: { 'max-lines-per-function': 'off' } },
  { files: ['tests/support/**'], rules: { 'max-params': ['error', 4] } },
  { files: ['**/*.js', '**/*.mjs'], rules: { 'no-undef': 'off', 'import/no-unresolved': 'off' } },
  fence(['shared/**'], deep, fake, [
    '^(node:|react|expo|express|drizzle|pg$|#(app|components|hooks|server|db)/)',
    'shared is pure: zod and itself.',
  ]),
  fence(['components/ui/**', 'components/theme/**'], deep, fake, server, auth, [
    '^#(app|hooks)/',
    'The kit takes props and gives events.',
  ]),
  fence(['components/rail/**', 'components/!(ui|theme|rail)/**'], deep, fake, server, auth, [
    '^#(app|hooks)/',
    'Parts take props and give events; a screen fetches.',
  ]),
  fence(['hooks/**'], deep, fake, server, auth, ['^#(app|components)/', 'Hooks know no screen.']),
  fence(['app/**'], fake, server, auth),
  fence(['server/**'], deep, fake, ['^#(app|components|hooks)/', 'The server knows no screen.']),
  fence(['db/**'], deep, fake, ['^#(app|server|components|hooks)/', 'The database knows value lists only.']),
  fence(['payments-fake/**'], ['^#', 'It plays another company: nothing of ours.']),
];
