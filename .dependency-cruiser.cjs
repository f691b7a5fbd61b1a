// Imports go one way: chemistry <- bench <- lessons <- server <- (actions, pages). Islands import chemistry, bench
// and lessons alone, and reach the server over HTTP.
const folder = (...names) => `^src/(${names.join('|')})/`;

/** A rule that says what a folder may import from within src. */
const only = (name, comment, ...allowed) => ({
  name,
  comment,
  severity: 'error',
  from: { path: folder(name.split(' ')[0]) },
  to: { path: '^src/', pathNot: folder(...allowed) },
});

const PURE = ['chemistry', 'bench', 'lessons'];
/** What src/lessons reads Markdown and YAML with: text in, data out. */
const TEXT_LIBRARIES = [
  'unified',
  'remark-[^/]+',
  'rehype-[^/]+',
  'mdast-util-[^/]+',
  'hast-util-[^/]+',
  'micromark[^/]*',
  'unist-util-[^/]+',
  'vfile[^/]*',
  'yaml',
  'zod',
  'katex',
  'hastscript',
  '@types/[^/]+',
  'property-information',
];

/** @type {import('dependency-cruiser').IConfiguration} */
module.exports = {
  forbidden: [
    only('chemistry knows nothing of the product', 'chemistry is read like a published package', 'chemistry'),
    only('bench stands on chemistry', 'a replay runs anywhere', 'chemistry', 'bench'),
    only(
      'lessons stand on chemistry and bench',
      'a lesson compiles anywhere',
      'chemistry',
      'bench',
      'lessons',
    ),
    only(
      'server knows no pages',
      'pages and actions call the server, never the other way',
      ...PURE,
      'server',
    ),
    only(
      'islands reach the server over HTTP',
      'what an island imports is sent to the browser',
      ...PURE,
      'islands',
      'styles',
    ),
    {
      name: 'components hold no secrets of the server',
      comment: 'a React component may become part of an island',
      severity: 'error',
      from: { path: '^src/components/.*\\.tsx$' },
      to: { path: folder('server', 'actions', 'pages') },
    },
    {
      name: 'chemistry and bench import no package',
      comment:
        'no framework, database, browser or Node.js: the same code runs in the browser, on the server and in tests',
      severity: 'error',
      from: { path: folder('chemistry', 'bench') },
      to: {
        dependencyTypes: ['core', 'npm', 'npm-dev', 'npm-optional', 'npm-peer', 'npm-no-pkg', 'npm-unknown'],
      },
    },
    {
      name: 'lessons import text libraries alone',
      comment: 'no framework, database, browser or Node.js',
      severity: 'error',
      from: { path: folder('lessons') },
      to: {
        dependencyTypes: ['core', 'npm', 'npm-dev', 'npm-optional', 'npm-peer', 'npm-no-pkg', 'npm-unknown'],
        pathNot: `node_modules/(${TEXT_LIBRARIES.join('|')})/`,
      },
    },
    {
      name: 'no circles',
      comment: 'each part can be read by itself',
      severity: 'error',
      from: { path: '^src/' },
      to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
    },
    {
      name: 'nothing missing',
      comment: 'every import exists',
      severity: 'error',
      from: {},
      to: { couldNotResolve: true, pathNot: '^(astro:|virtual:)' },
    },
    {
      name: 'the product needs no tool of its developers',
      comment: 'a production installation has no devDependencies',
      severity: 'error',
      from: { path: '^src/' },
      to: {
        dependencyTypes: ['npm-dev'],
        dependencyTypesNot: ['type-only'],
        pathNot: 'node_modules/@types/',
      },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '^(dist|\\.astro|\\.data)/' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'node', 'default', 'types'],
    },
  },
};
