/**
 * Who may import whom. The table stands in DEVELOPERS.md; `npm test` enforces it here.
 */
const NATIVE_UI = 'node_modules/(expo|expo-[^/]+|@expo|react-native|react-native-[^/]+|react|react-dom)/';
const SERVER_LIBS =
  'node_modules/(express|sequelize|sqlite3|passport|passport-jwt|jsonwebtoken|pdfkit|nodemailer|multer|pino)/';

module.exports = {
  forbidden: [
    { name: 'no-circular', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'formulas-stand-alone',
      comment:
        'The numerical core has no dependency at all: not on the house, not on a package, not on Node.',
      severity: 'error',
      from: { path: '^formulas/' },
      to: { pathNot: '^formulas/' },
    },
    {
      name: 'formulas-have-one-door',
      comment: 'Everything outside imports formulas/index.ts; only its own tests look inside.',
      severity: 'error',
      from: { path: '^(app|server|shared)/' },
      to: { path: '^formulas/', pathNot: '^formulas/index\\.ts$' },
    },
    {
      name: 'contract-knows-formulas-and-zod',
      severity: 'error',
      from: { path: '^shared/contract/' },
      to: { pathNot: '^(shared/contract|formulas)/|node_modules/zod/' },
    },
    {
      name: 'clinical-rules-are-pure',
      severity: 'error',
      from: { path: '^shared/clinical/' },
      to: { pathNot: '^(shared/contract|shared/clinical|formulas)/' },
    },
    {
      name: 'client-knows-no-server',
      severity: 'error',
      from: { path: '^(shared/client|app)/' },
      to: { path: `^server/|${SERVER_LIBS}` },
    },
    {
      name: 'client-knows-no-node',
      severity: 'error',
      from: { path: '^(shared|app|formulas)/' },
      to: { dependencyTypes: ['core'] },
    },
    {
      name: 'server-knows-no-client',
      severity: 'error',
      from: { path: '^server/' },
      to: { path: `^(app|shared/client)/|${NATIVE_UI}` },
    },
    {
      name: 'routes-only-re-export',
      severity: 'error',
      from: { path: '^app/' },
      to: { pathNot: '^shared/client/|^shared/contract/|node_modules/expo-router/' },
    },
    {
      name: 'client-features-keep-apart',
      comment:
        'A screen of one noun does not import a screen of another; what both need lives in components or lib.',
      severity: 'error',
      from: { path: '^shared/client/features/([^/]+)/' },
      to: { path: '^shared/client/features/[^/]+/.*-screen', pathNot: '^shared/client/features/$1/' },
    },
    {
      name: 'lower-client-knows-no-feature',
      severity: 'error',
      from: { path: '^shared/client/(components|theme|lib|api|i18n)/' },
      to: { path: '^shared/client/features/' },
    },
    {
      name: 'server-features-through-services',
      comment:
        'Another feature is called through its service (or its policy), never its repository or routes.',
      severity: 'error',
      from: { path: '^server/features/([^/]+)/' },
      to: { path: '^server/features/[^/]+/.*\\.(repository|routes)', pathNot: '^server/features/$1/' },
    },
    {
      name: 'never-upward-from-service',
      severity: 'error',
      from: { path: '\\.service\\.ts$' },
      to: { path: '\\.routes\\.ts$' },
    },
    {
      name: 'never-upward-from-repository',
      severity: 'error',
      from: { path: '\\.repository\\.ts$' },
      to: { path: '\\.(routes|service)\\.ts$' },
    },
    {
      name: 'express-in-routes-only',
      severity: 'error',
      from: { path: '^server/features/', pathNot: '\\.routes\\.ts$' },
      to: { path: 'node_modules/express/' },
    },
    {
      name: 'sequelize-in-db-and-repositories',
      severity: 'error',
      from: { path: '^server/', pathNot: '^server/(db|audit)/|\\.repository\\.ts$' },
      to: { path: 'node_modules/(sequelize|sqlite3)/', dependencyTypesNot: ['type-only'] },
    },
    { name: 'not-to-test', severity: 'error', from: { pathNot: '^tests/' }, to: { path: '^tests/' } },
    {
      name: 'not-to-dev-dep',
      severity: 'error',
      from: { path: '^(app|server|shared|formulas)/' },
      to: {
        dependencyTypes: ['npm-dev'],
        dependencyTypesNot: ['type-only'],
        pathNot: 'node_modules/@types/',
      },
    },
    { name: 'no-unresolvable', severity: 'error', from: {}, to: { couldNotResolve: true } },
    {
      name: 'no-orphans',
      severity: 'error',
      from: {
        orphan: true,
        pathNot: ['\\.d\\.ts$', '^tests/', '^app/', '^server/(index|start|build)\\.', '\\.(config|cjs)'],
      },
      to: {},
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '^(dist|data|\\.expo)/' },
    tsConfig: { fileName: 'tsconfig.json' },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      extensions: ['.web.tsx', '.web.ts', '.tsx', '.ts', '.mjs', '.js', '.json'],
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default'],
    },
  },
};
