/**
 * What one import line cannot tell: cycles, and what is reached through other files.
 * Type-only imports do not count, they are gone when the code runs.
 */
const ENGINE_ORDER = ['measure', 'formula', 'pattern', 'net', 'piece', 'fit', 'model', 'sheet', 'space', 'drawing'];

const src = '(^|/)src/';

/** @type {import('dependency-cruiser').IConfiguration} */
module.exports = {
  forbidden: [
    { name: 'no-cycles', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'engine-is-pure',
      comment: 'The engine imports nothing outside itself.',
      severity: 'error',
      from: { path: `${src}engine/` },
      to: { pathNot: `${src}engine/` },
    },
    ...ENGINE_ORDER.slice(0, -1).map((folder, i) => ({
      name: `engine-order-${folder}`,
      comment: 'Each folder of the engine knows only those before it (src/engine/README.md).',
      severity: 'error',
      from: { path: `${src}engine/${folder}/` },
      to: { path: `${src}engine/(${ENGINE_ORDER.slice(i + 1).join('|')})/` },
    })),
    {
      name: 'island-reaches-server',
      comment: 'A .tsx file runs in the browser: nothing it reaches may touch database, secrets, disk or network.',
      severity: 'error',
      from: { path: `${src}.*\\.tsx$` },
      to: { path: '\\.server\\.ts$', reachable: true },
    },
    {
      name: 'only-server-files-touch-node',
      comment: 'Node and the database belong in *.server.ts, pages, middleware and scripts.',
      severity: 'error',
      from: { path: `${src}(writeup|exports|features|components)/`, pathNot: '\\.server\\.ts$' },
      to: { dependencyTypes: ['core'] },
    },
    {
      name: 'nothing-above-lower',
      comment: 'pages → features → writeup, db, exports → engine',
      severity: 'error',
      from: { path: `${src}(writeup|db|exports|components)/` },
      to: { path: `${src}(features|layouts|pages)/` },
    },
    {
      name: 'nothing-above-features',
      severity: 'error',
      from: { path: `${src}features/` },
      to: { path: `${src}(layouts|pages)/` },
    },
    {
      name: 'nothing-from-tests',
      severity: 'error',
      from: { pathNot: '(^|/)tests/' },
      to: { path: '^tests/(?!architecture/)' },
    },
    { name: 'resolves', severity: 'error', from: {}, to: { couldNotResolve: true, pathNot: '^(astro:|auth:)' } },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '(^|/)dist/' },
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      extensions: ['.ts', '.tsx', '.mjs', '.js', '.cjs', '.json'],
      exportsFields: ['exports'],
      conditionNames: ['import', 'node', 'default', 'types'],
    },
  },
};
