/** Which folder may import which. The reasons stand beside the rules; tests/unit/structure proves that they bite. */
const rule = (name, comment, from, to) => ({ name, comment, severity: 'error', from, to })
const within = (...folders) => `^(${folders.join('|')})/`

/** Inside shared: what each folder may reach beside itself and errors. */
const SHARED = {
  errors: [],
  engine: [],
  numerics: [],
  mechanics: ['shared/numerics', 'shared/engine/(contracts|dimensions/dimension)\\.ts'],
  analyses: ['shared/mechanics', 'shared/numerics', 'shared/engine/(contracts|dimensions/dimension)\\.ts'],
  sheet: ['shared/engine/(parse|units)', 'shared/engine/contracts\\.ts'],
  review: ['shared/sheet'],
  api: ['shared/sheet', 'shared/review'],
  protocol: ['shared/sheet', 'shared/review'],
}

const sharedRules = Object.entries(SHARED).map(([folder, reaches]) =>
  rule(
    `shared-${folder}`,
    `shared/${folder} reaches ${['errors', ...reaches].join(', ')} and nothing else of ours`,
    { path: `^shared/${folder}/` },
    {
      path: '^(shared|src|server)/',
      pathNot: `^(shared/${folder}/|shared/errors/|${reaches.join('|') || '(?!)'})`,
    },
  ),
)

/** On the server: routes and collaboration → services → repositories → entities. */
const serverRules = [
  rule(
    'entities-are-last',
    'Entities know nothing of those who use them.',
    { path: '^server/entities/' },
    {
      path: '^server/(?!entities/)',
    },
  ),
  rule(
    'repositories-know-entities',
    'Repositories decide nothing.',
    { path: '^server/repositories/' },
    {
      path: '^server/(services|routes|middleware|presenters|collaboration)/',
    },
  ),
  rule(
    'services-call-no-route',
    'A use case knows no HTTP.',
    { path: '^server/services/' },
    {
      path: '^server/(routes|middleware)/',
    },
  ),
  rule(
    'routes-ask-services',
    'A route never reaches the database by itself; it hands it on, and so knows its type.',
    { path: '^server/routes/' },
    {
      path: '^server/(repositories|entities)/',
      pathNot: '^server/repositories/transaction\\.ts$',
    },
  ),
]

/** On the client: views → components → composables → stores → api. */
const clientRules = [
  rule(
    'components-know-no-view',
    'A view is composition.',
    { path: '^src/components/' },
    { path: '^src/views/' },
  ),
  rule(
    'composables-know-no-component',
    'Composables are below components.',
    { path: '^src/composables/' },
    {
      path: within('src/components', 'src/views'),
    },
  ),
  rule(
    'stores-know-no-composable',
    'Stores are below composables.',
    { path: '^src/stores/' },
    {
      path: within('src/components', 'src/views', 'src/composables', 'src/editor'),
    },
  ),
  rule(
    'api-is-last',
    'The client of the API knows no one above it.',
    { path: '^src/api/' },
    {
      path: '^src/(?!api/)',
    },
  ),
  rule(
    'commands-without-vue',
    'Editor commands are pure functions.',
    { path: '^src/editor/commands/' },
    {
      path: 'node_modules/(@?vue|@tiptap/vue-3)/',
    },
  ),
]

module.exports = {
  forbidden: [
    rule('no-cycle', 'A cycle makes two files one.', {}, { circular: true }),
    rule(
      'shared-stands-alone',
      'shared runs anywhere.',
      { path: '^shared/' },
      { path: '^(src|server|tests)/' },
    ),
    rule(
      'shared-without-framework',
      'shared is pure.',
      { path: '^shared/' },
      {
        path: 'node_modules/(@?vue|vuetify|pinia|express|typeorm|pg|ws|katex)(/|$)',
      },
    ),
    rule(
      'shared-without-node',
      'shared runs in a browser.',
      { path: '^shared/' },
      { dependencyTypes: ['core'] },
    ),
    rule('client-apart-from-server', 'They meet in shared.', { path: '^src/' }, { path: '^server/' }),
    rule('server-apart-from-client', 'They meet in shared.', { path: '^server/' }, { path: '^src/' }),
    rule(
      'yjs-in-its-places',
      'The live document is known in few places.',
      {
        path: '^(shared|src|server)/',
        pathNot: '^(shared/sheet/|shared/protocol/|src/collaboration/|server/collaboration/|src/editor/)',
      },
      { path: 'node_modules/(yjs|y-protocols|y-websocket)/' },
    ),
    rule(
      'pipeline-is-above',
      'Only who uses the whole pipeline imports it.',
      {
        path: '^shared/(?!pipeline/)',
      },
      { path: '^shared/pipeline/' },
    ),
    ...sharedRules,
    ...serverRules,
    ...clientRules,
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: { extensions: ['.ts', '.vue', '.mjs', '.js', '.json'] },
  },
}
