import reactHooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'

const SOURCES = ['api/**/*.ts', 'seed/**/*.ts', 'shared/**/*.ts', 'tests/**/*.{ts,tsx}', 'web/**/*.{ts,tsx}']

/** @param {{ regex: string, message: string }[]} patterns */
const restrictImports = (...patterns) => ({ 'no-restricted-imports': ['error', { patterns }] })

const NO_API = { regex: '^#api/|/api/', message: 'Only the API and its tests know the API. Put what both sides need in shared/.' }
const NO_WEB = { regex: '^#web/|/web/', message: 'Only the client and its tests know the client. Put what both sides need in shared/.' }
const NO_TOP_FEATURES = { regex: '^#web/(features|app)/|/(features|app)/', message: 'Building blocks know no feature: features import them.' }
const NO_OUTSIDE_WORLD = {
  regex: '^(node:|fs$|path$|crypto$|react|express|typeorm|mysql2|socket\\.io)',
  message: 'shared/ is pure: no Node, no browser, no database, no network.',
}

const IMPURE = 'shared/ is pure: take the instant, the random source or the id as an argument.'

export default tseslint.config(
  { ignores: ['.build/**', '.data/**', '.test-data/**', 'node_modules/**'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error', noInlineConfig: true } },
  {
    files: SOURCES,
    extends: [tseslint.configs.recommended],
    rules: {
      'no-restricted-syntax': [
        'error',
        { selector: 'ExportDefaultDeclaration', message: 'Named exports only: one name for one thing everywhere.' },
        { selector: 'TSEnumDeclaration', message: 'A const object or a union of texts, not an enum.' },
        { selector: 'TSModuleDeclaration[kind="namespace"]', message: 'A module, not a namespace.' },
      ],
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx'] }],
      'no-console': 'error',
      eqeqeq: 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', caughtErrorsIgnorePattern: '^_' }],
    },
  },
  {
    files: ['api/**/*.ts', 'seed/**/*.ts', 'tests/**/*.{ts,tsx}', 'web/**/*.{ts,tsx}'],
    languageOptions: {
      parserOptions: {
        project: ['./api/tsconfig.json', './web/tsconfig.json', './tests/tsconfig.json'],
        tsconfigRootDir: import.meta.dirname,
      },
    },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': 'error',
      '@typescript-eslint/await-thenable': 'error',
    },
  },
  {
    files: ['shared/**/*.ts'],
    rules: {
      ...restrictImports(NO_API, NO_WEB, NO_OUTSIDE_WORLD),
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now', message: IMPURE },
        { object: 'Math', property: 'random', message: IMPURE },
      ],
      'no-restricted-globals': ['error', ...['crypto', 'performance', 'process', 'fetch', 'window', 'document'].map((name) => ({ name, message: IMPURE }))],
      'no-restricted-syntax': [
        'error',
        { selector: 'ExportDefaultDeclaration', message: 'Named exports only: one name for one thing everywhere.' },
        { selector: 'TSEnumDeclaration', message: 'A const object or a union of texts, not an enum.' },
        { selector: 'NewExpression[callee.name="Date"][arguments.length=0]', message: IMPURE },
      ],
    },
  },
  { files: ['api/**/*.ts'], rules: restrictImports(NO_WEB) },
  { files: ['web/**/*.{ts,tsx}'], extends: [reactHooks.configs.flat.recommended], rules: restrictImports(NO_API) },
  { files: ['web/components/**/*.{ts,tsx}', 'web/lib/**/*.{ts,tsx}'], rules: restrictImports(NO_API, NO_TOP_FEATURES) },
  // Declarations describe how others wrote their packages.
  { files: ['**/*.d.ts'], rules: { 'no-restricted-syntax': 'off', '@typescript-eslint/no-namespace': 'off' } },
  {
    files: ['api/commands/**/*.ts', 'tests/setup/**/*.ts'],
    rules: { 'no-console': 'off' },
  },
  {
    files: ['api/setup/*.mjs', '.eslint.config.mjs', 'vite.config.ts'],
    extends: [tseslint.configs.recommended],
  },
)
