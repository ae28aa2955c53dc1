/** Folders under src, and the folders each may import from besides itself. */
const mayImport = {
  core: [],
  io: ['core'],
  chart: ['core'],
  worker: ['core'],
  state: ['io', 'core'],
  panels: ['chart', 'state', 'io', 'worker', 'core'],
  style: [],
}

/** One rule a folder: nothing in src but the folders named, and the folder itself. */
const arrows = Object.entries(mayImport)
  .filter(([folder]) => folder !== 'core')
  .map(([folder, others]) => ({
    name: `${folder}-arrows`,
    comment: `${folder} imports from ${others.join(', ') || 'nobody'} and from nothing else in src.`,
    severity: 'error',
    from: { path: `^src/${folder}/` },
    to: { path: '^src/', pathNot: `^src/(${[folder, ...others].join('|')})/` },
  }))

/** @type {import('dependency-cruiser').IConfiguration} */
module.exports = {
  forbidden: [
    {
      name: 'core-stands-alone',
      comment: 'core imports nothing from outside itself, not even a package.',
      severity: 'error',
      from: { path: '^src/core/' },
      to: { pathNot: '^src/core/' },
    },
    ...arrows,
    {
      name: 'known-folders-only',
      comment: 'A new folder under src needs its place in the list of arrows first.',
      severity: 'error',
      from: {},
      to: { path: '^src/[^/]+/', pathNot: `^src/(${Object.keys(mayImport).join('|')})/` },
    },
    {
      name: 'no-tests-in-src',
      comment: 'What is shipped does not lean on tests.',
      severity: 'error',
      from: { path: '^src/' },
      to: { path: '^(tests|e2e)/' },
    },
    {
      name: 'no-cycles',
      comment: 'Files that import each other in a ring cannot be read or tested one at a time.',
      severity: 'error',
      from: {},
      to: { circular: true },
    },
    {
      name: 'nothing-unresolved',
      comment: 'An import that leads nowhere is not checked by any other rule.',
      severity: 'error',
      from: {},
      to: { couldNotResolve: true },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    // Imports of types count too: a type from the wrong folder is a wrong arrow.
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: { exportsFields: ['exports'], conditionNames: ['import', 'browser'] },
  },
}
