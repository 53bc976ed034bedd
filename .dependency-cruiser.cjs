/** Who may import whom: the storeys of shared, features that do not know each other, and where each library may stand. */
const forbid = (name, from, to, comment) => ({ name, comment, severity: 'error', from, to })
const storey = (name, below) =>
  forbid(
    `shared-${name}`,
    { path: `^shared/${name}/` },
    { path: '^shared/', pathNot: `^shared/(${[name, ...below].join('|')})/` },
    'Storeys of shared point down: api → importing → parts, access, guide → lib.',
  )

module.exports = {
  forbidden: [
    forbid('no-cycles', {}, { circular: true }, 'Cycles hide what depends on what.'),
    storey('lib', []),
    storey('guide', ['lib']),
    storey('access', ['lib']),
    storey('parts', ['guide', 'lib']),
    storey('importing', ['guide', 'lib']),
    forbid(
      'shared-is-alone',
      { path: '^shared/' },
      { path: '^(src|server|tests|fixtures)/' },
      'shared knows nobody above it.',
    ),
    forbid(
      'shared-is-pure',
      { path: '^shared/', pathNot: '\\.test\\.ts$' },
      { dependencyTypes: ['core'] },
      'No Node builtins: shared runs in a browser too.',
    ),
    forbid(
      'shared-has-no-frameworks',
      { path: '^shared/' },
      { path: 'node_modules/(react|express|drizzle-orm|better-sqlite3|nanoid)/' },
      'No React, Express, database or chance in shared.',
    ),
    forbid(
      'src-not-server',
      { path: '^src/' },
      { path: '^server/' },
      'What crosses the wire is in shared/api.',
    ),
    forbid(
      'server-not-src',
      { path: '^server/' },
      { path: '^src/' },
      'What crosses the wire is in shared/api.',
    ),
    forbid(
      'features-apart-src',
      { path: '^src/features/([^/]+)/' },
      { path: '^src/features/([^/]+)/', pathNot: '^src/features/$1/' },
      'What two features need moves down or is composed in src/app.',
    ),
    forbid(
      'features-apart-server',
      { path: '^server/features/([^/]+)/' },
      { path: '^server/features/([^/]+)/', pathNot: '^server/features/$1/' },
      'What two features need moves down or is composed above.',
    ),
    forbid(
      'src-downwards',
      { path: '^src/(components|lib|viewer3d|reader)/' },
      { path: '^src/(features|app)/' },
      'app → features → components, lib.',
    ),
    forbid(
      'features-below-app',
      { path: '^src/features/' },
      { path: '^src/app/' },
      'app → features → components, lib.',
    ),
    forbid(
      'only-repos-know-drizzle',
      {
        path: '^server/',
        pathNot: '(repo\\.ts|Repo\\.ts)$|^server/db/|^server/auth/auth\\.ts$|\\.test\\.ts$',
      },
      { path: 'node_modules/(drizzle-orm|better-sqlite3)/' },
      'Only repo.ts and db/ touch the database.',
    ),
    forbid(
      'reading-stays-light',
      { path: '^src/(components/reading|features/reading|reader)/', pathNot: '\\.test\\.tsx?$' },
      {
        path: 'node_modules/(@tiptap|three|@react-three|react-aria-components|@tanstack)/',
        dependencyTypesNot: ['type-only'],
      },
      'Reading pages are also drawn where none of this is loaded.',
    ),
    forbid(
      'known-packages',
      { pathNot: '/testing/' },
      { dependencyTypes: ['npm-no-pkg', 'npm-unknown', 'npm-dev'], pathNot: '@types/' },
      'Product code uses dependencies of package.json. Folders called testing serve tests alone.',
    ),
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '\\.test\\.tsx?$' },
    tsConfig: { fileName: 'tsconfig.json' },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
    },
  },
}
