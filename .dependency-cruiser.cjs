/**
 * The layers of the house, as a machine reads them. DEVELOPERS.md has the picture.
 * Each layer lists what it may import; everything else is refused.
 */
const layer = (name, from, ours, packages) => [
  {
    name: `${name}-imports-only-its-neighbours`,
    severity: 'error',
    from: { path: from },
    to: { path: '^(grammar|src)/', pathNot: [from, ...ours] },
  },
  {
    name: `${name}-uses-only-its-packages`,
    severity: 'error',
    from: { path: from },
    to: {
      dependencyTypes: ['npm', 'npm-dev', 'npm-optional', 'npm-peer', 'npm-no-pkg', 'npm-unknown', 'core'],
      pathNot: packages.length > 0 ? packages.map((p) => `(^|node_modules/)${p}(/|$)`) : ['^$'],
    },
  },
];

const grammar = '^grammar/';
const at = (room) => `^src/${room}/`;
const node = [
  'node:',
  '(fs|path|http|url|crypto|os|process|stream|readline|timers|util|child_process|events|net)',
];

module.exports = {
  forbidden: [
    { name: 'no-circles', severity: 'error', from: {}, to: { circular: true } },
    { name: 'no-unresolvable', severity: 'error', from: {}, to: { couldNotResolve: true } },
    {
      name: 'nothing-imports-the-tests',
      severity: 'error',
      from: { path: '^(grammar|src)/' },
      to: { path: '^tests/' },
    },
    ...layer('grammar', grammar, [], ['chevrotain']),
    ...layer('stats', at('stats'), [], ['jstat']),
    ...layer('report', at('report'), [grammar, at('stats')], []),
    ...layer('render', at('render'), [grammar, at('report')], ['@slack/types']),
    ...layer('answer', at('answer'), [grammar, at('report')], []),
    ...layer('ledger', at('ledger'), [at('answer')], ['kysely', 'better-sqlite3', ...node]),
    ...layer('slack', at('slack'), [at('answer'), at('render')], ['@slack/[^/]+', 'undici', ...node]),
    ...layer(
      'practice',
      at('practice'),
      [at('slack'), at('answer'), at('render')],
      ['@slack/[^/]+', ...node],
    ),
    ...layer('cli', at('cli'), [grammar, '^src/'], ['dotenv', ...node]),
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
    },
  },
};
