import astro from 'eslint-plugin-astro';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

/*
 * Arrows point one way: pages → features → writeup, db, exports → engine.
 * What can be told from one import line stands here, as it is typed; cycles and what an island reaches
 * through other files stand in .dependency-cruiser.cjs.
 */
const LOWER_THAN = {
  engine: ['writeup', 'db', 'exports', 'components', 'features', 'layouts', 'pages', 'styles'],
  exports: ['components', 'features', 'layouts', 'pages'],
  writeup: ['features', 'layouts', 'pages'],
  db: ['components', 'features', 'layouts', 'pages'],
  components: ['db', 'features', 'layouts', 'pages'],
  features: ['layouts', 'pages'],
  layouts: ['pages'],
};
const ENGINE_INSIDES = {
  regex: '(^@|/)/?engine/.+',
  message: "Import the engine through its one door, '@/engine'.",
};
const SERVER_FILES = {
  regex: '\\.server$',
  message: 'Code that runs in the browser or draws a shared component must not touch the server.',
};
const above = (folders, folder) => ({
  regex: `^(@|(\\.\\.?/)*\\.\\.)/(${folders.join('|')})(/|$)`,
  message: `src/${folder} must not know what stands above it: pages → features → writeup, db, exports → engine.`,
});
const restrict = (...patterns) => ({ 'no-restricted-imports': ['error', { patterns }] });

const directions = Object.entries(LOWER_THAN).map(([folder, folders]) => ({
  files: [`**/src/${folder}/**`],
  rules: restrict(
    above(folders, folder),
    ...(folder === 'components' ? [SERVER_FILES] : []),
    ...(folder === 'engine'
      ? [{ regex: '^[^.]', message: 'The engine imports nothing from outside its folder.' }]
      : [ENGINE_INSIDES]),
  ),
}));

export default tseslint.config(
  {
    ignores: [
      'dist/',
      '.astro/',
      '.data/',
      'node_modules/',
      'test-results/',
      'playwright-report/',
      'drizzle/',
      'tests/architecture/breaches/',
    ],
  },
  ...tseslint.configs.recommended,
  ...astro.configs['flat/recommended'],
  {
    rules: {
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-implicit-coercion': 'off',
      'object-shorthand': 'error',
      'prefer-const': 'error',
      'no-eval': 'error',
      'no-new-func': 'error',
      '@typescript-eslint/consistent-type-imports': [
        'error',
        { fixStyle: 'inline-type-imports', disallowTypeAnnotations: false },
      ],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  {
    files: ['**/src/**/*.{ts,tsx}', '**/scripts/**/*.ts', '**/tests/**/*.{ts,tsx}'],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
    },
  },
  {
    files: ['**/*.tsx', '**/use-*.ts'],
    plugins: { 'react-hooks': reactHooks },
    rules: reactHooks.configs.recommended.rules,
  },
  {
    files: ['**/src/engine/**'],
    rules: { 'no-restricted-globals': ['error', 'window', 'document', 'process', 'fetch', 'Date', 'console'] },
  },
  ...directions,
  { files: ['**/src/pages/**', 'scripts/**'], rules: restrict(ENGINE_INSIDES) },
  // The script blocks of .astro files, which eslint-plugin-astro gives out as files of their own.
  { files: ['**/*.astro/*.js', '**/*.astro/*.ts'], rules: restrict(SERVER_FILES) },
  { files: ['**/*.astro/*.js', '**/*.astro/*.ts'], ...tseslint.configs.disableTypeChecked },
  // Astro's own types come by reference.
  { files: ['src/env.d.ts'], rules: { '@typescript-eslint/triple-slash-reference': 'off' } },
  { files: ['**/*.cjs'], languageOptions: { sourceType: 'commonjs' } },
);
