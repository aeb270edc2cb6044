/** The rooms and who may enter which: see DEVELOPERS.md. A test runs these. */
const TESTS = '\\.(test|spec)\\.tsx?$';
const only = (name, from, allowed) => ({
  name,
  severity: 'error',
  from: { path: from, pathNot: TESTS },
  to: { pathNot: allowed },
});
export default {
  forbidden: [
    only('science-imports-nothing', '^shared/src/science/', '^shared/src/science/'),
    only('contracts-import-zod', '^shared/src/contracts/', ['^shared/src/(contracts|science)/', '^node_modules/zod/']),
    only('drawing-imports-science-and-contracts', '^shared/src/drawing/', ['^shared/src/']),
    only('schema-imports-drizzle', '^schema/src/', ['^schema/src/', '^node_modules/drizzle-orm/']),
    {
      name: 'service-rooms',
      severity: 'error',
      from: { path: '^service/' },
      to: { path: '^(app|tests|testdata)/' },
    },
    {
      name: 'app-rooms',
      severity: 'error',
      from: { path: '^app/' },
      to: { path: '^(service|schema|tests|testdata)/|^node_modules/(@nestjs|drizzle-orm)/' },
    },
    { name: 'nothing-imports-tests', severity: 'error', from: { pathNot: '^tests/' }, to: { path: '^tests/' } },
    {
      name: 'features-do-not-meet',
      severity: 'error',
      from: { path: '^app/src/features/([^/]+)/' },
      to: { path: '^app/src/features/', pathNot: '^app/src/features/$1/' },
    },
    {
      name: 'app-flows-down',
      severity: 'error',
      from: { path: '^app/src/(features|components|lib)/' },
      to: { path: '^app/src/app/' },
    },
    {
      name: 'components-know-no-feature',
      severity: 'error',
      from: { path: '^app/src/(components|lib)/' },
      to: { path: '^app/src/features/' },
    },
    {
      name: 'sql-only-in-repositories',
      severity: 'error',
      from: { path: '^service/src/modules/', pathNot: ['\\.repository\\.ts$', TESTS] },
      to: { path: '^(schema/|node_modules/drizzle-orm/)' },
    },
    {
      name: 'kernels-are-pure',
      severity: 'error',
      from: { path: '^service/src/(matching|scoring|tables|images|intake|plan|edition)/', pathNot: TESTS },
      to: {
        path: '^(schema/|service/src/(modules|database|jobs|common|config)/|node_modules/(@nestjs|drizzle-orm|@electric-sql)/)',
      },
    },
    { name: 'no-cycles', severity: 'error', from: {}, to: { circular: true } },
    { name: 'resolvable', severity: 'error', from: {}, to: { couldNotResolve: true } },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'types', 'node', 'default'],
      extensions: ['.ts', '.tsx', '.js', '.mjs', '.cjs', '.json'],
    },
  },
};
