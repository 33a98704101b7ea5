/** Imports point downwards only: addin, then functions, then functions/engine. Inside the engine the order is listed below. */
const engineOrder = ['expression', 'carry', 'graph', 'quantity', 'formula', 'line', 'chemistry', 'report', 'evidence', 'coverage', 'numbers'];

module.exports = {
  forbidden: [
    { name: 'no-circles', severity: 'error', from: {}, to: { circular: true, dependencyTypesNot: ['type-only'] } },
    { name: 'engine-is-pure', severity: 'error', from: { path: '^functions/engine' }, to: { path: '^(addin|functions/(?!engine))' } },
    { name: 'engine-without-node', severity: 'error', from: { path: '^functions' }, to: { dependencyTypes: ['core'] } },
    { name: 'functions-without-addin', severity: 'error', from: { path: '^functions' }, to: { path: '^addin' } },
    {
      name: 'book-and-sheet-without-node', severity: 'error',
      from: { path: '^addin/desk/(book|sheet)' }, to: { dependencyTypes: ['core'] },
    },
    {
      name: 'book-below-sheet-below-command', severity: 'error',
      from: { path: '^addin/desk/book' }, to: { path: '^addin/desk/(?!book)' },
    },
    {
      name: 'sheet-below-command', severity: 'error',
      from: { path: '^addin/desk/sheet' }, to: { path: '^addin/(?!desk/(book|sheet)/)' },
    },
    { name: 'pane-knows-no-host', severity: 'error', from: { path: '^addin/pane' }, to: { path: '^addin/(?!pane)' } },
    { name: 'excel-without-desk', severity: 'error', from: { path: '^addin/excel' }, to: { path: '^addin/desk' } },
    {
      name: 'pages-without-node', severity: 'error',
      from: { path: '^addin/(pane|excel|desk/page)' }, to: { dependencyTypes: ['core'] },
    },
    { name: 'product-without-tests', severity: 'error', from: { path: '^(addin|functions)' }, to: { path: '^test' } },
    {
      name: 'no-development-packages', severity: 'error',
      from: { path: '^(addin|functions)', pathNot: '^addin/desk/demo' }, to: { dependencyTypes: ['npm-dev'] },
    },
    ...engineOrder.slice(1).map((lower, i) => ({
      name: `engine-${lower}-points-down`, severity: 'error',
      from: { path: `^functions/engine/${lower}/` },
      to: { path: `^functions/engine/(${engineOrder.slice(0, i + 1).join('|')})/` },
    })),
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: { extensions: ['.ts', '.js', '.json'] },
  },
};
