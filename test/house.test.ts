import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';

const source = fileURLToPath(new URL('../src', import.meta.url));

interface Import {
  /** Importing file, below src/. */
  readonly from: string;
  /** Imported file below src/, or the package's name. */
  readonly to: string;
  readonly isPackage: boolean;
  readonly typeOnly: boolean;
  /** Loaded while the program runs: `import('…')`. */
  readonly later: boolean;
}

const statement =
  /^(?:import|export)\s+(?<type>type\s+)?(?:[^;'"]*?\sfrom\s+)?'(?<path>[^']+)'|\bimport\(\s*'(?<later>[^']+)'\s*\)/gm;

function importsOf(file: string): Import[] {
  const text = readFileSync(join(source, file), 'utf8');
  return [...text.matchAll(statement)].map(({ groups = {} }) => {
    const path = (groups.path ?? groups.later)!;
    const isPackage = !path.startsWith('.');
    const to = isPackage ? path : relative(source, resolve(source, dirname(file), path));
    return {
      from: file,
      to,
      isPackage,
      typeOnly: groups.type !== undefined,
      later: groups.later !== undefined,
    };
  });
}

const files = readdirSync(source, { recursive: true, encoding: 'utf8' }).filter((name) =>
  name.endsWith('.ts'),
);
const imports = files.flatMap(importsOf);

/** `study/read-wing.ts` → `study`; a file beside the folders stands for itself: `run-study.ts`. */
const partOf = (file: string) => file.split('/')[0]!;

interface Allowed {
  /** Folders and files whose values may be used. */
  readonly values: readonly string[];
  /** Folders and files of which only types may be used. */
  readonly types?: readonly string[];
}

const belowReports = [
  'charts',
  'engine',
  'errors.ts',
  'figures',
  'methods',
  'plan',
  'read-study-file.ts',
  'results',
  'selection',
  'stages',
  'study',
  'version.ts',
];

/** Imports point one way. Each part may always use itself. */
const allowed: Readonly<Record<string, Allowed>> = {
  'errors.ts': { values: [] },
  'version.ts': { values: [] },
  methods: { values: [] },
  charts: { values: ['errors.ts'] },
  figures: { values: ['study/inputs.ts'], types: ['study/study.ts'] },
  // The reader works out the baseline's shape to check it, keeps edges as evaluation does, and
  // shows numbers in the units of the study.
  study: { values: ['errors.ts', 'methods', 'figures/band.ts', 'figures/display.ts'], types: ['figures'] },
  stages: { values: ['methods', 'figures'], types: ['study'] },
  plan: { values: [], types: ['stages', 'study'] },
  results: { values: ['errors.ts', 'figures'] },
  selection: { values: ['results', 'figures'], types: ['study'] },
  engine: {
    values: ['plan', 'stages', 'methods', 'figures', 'study', 'results', 'errors.ts', 'version.ts'],
  },
  'read-study-file.ts': { values: ['errors.ts', 'figures', 'stages', 'study'] },
  reports: { values: belowReports },
  'flight-test': {
    values: ['charts', 'errors.ts', 'figures', 'methods', 'results', 'stages', 'study', 'version.ts'],
  },
  'run-study.ts': { values: [...belowReports, 'reports'] },
  commands: { values: [...belowReports, 'reports', 'run-study.ts', 'flight-test'] },
  'cli.ts': { values: ['commands', 'errors.ts', 'version.ts', 'results/machine-fault.ts'] },
};

function isAllowed({ from, to, typeOnly }: Import): boolean {
  const part = partOf(from);
  if (part === partOf(to)) return true;
  const { values = [], types = [] } = allowed[part] ?? {};
  return (typeOnly ? [...values, ...types] : values).some((name) => name === to || name === partOf(to));
}

const told = ({ from, to, typeOnly }: Import) => `${from} imports ${typeOnly ? 'a type of ' : ''}${to}`;

test('every import is found: none of the files hangs in the air', () => {
  // Worker threads are begun by the names of their files: builtFile('worker').
  const workers = files.flatMap((file) =>
    [...readFileSync(join(source, file), 'utf8').matchAll(/builtFile\('([^']+)'\)/g)].map(
      ([, name]) => `engine/${name}.ts`,
    ),
  );
  expect(workers).toContain('engine/worker.ts');
  const reached = new Set(['cli.ts', ...workers]);
  for (const file of reached) {
    for (const { to, isPackage } of importsOf(file)) if (!isPackage) reached.add(to);
  }
  expect(files.filter((file) => !reached.has(file))).toEqual([]);
  expect([...reached].filter((file) => !files.includes(file))).toEqual([]);
});

test('every part of the house has its rule', () => {
  expect(Object.keys(allowed).sort()).toEqual([...new Set(files.map(partOf))].sort());
});

test('imports point one way', () => {
  const wrong = imports.filter((found) => !found.isPackage && !isAllowed(found));
  expect(wrong.map(told)).toEqual([]);
});

test('a wrong direction would be noticed', () => {
  const found = { from: 'methods/tail.ts', isPackage: false, later: false };
  expect(isAllowed({ ...found, to: 'study/study.ts', typeOnly: true })).toBe(false);
  expect(isAllowed({ ...found, from: 'plan/plan.ts', to: 'stages/stage.ts', typeOnly: false })).toBe(false);
  expect(isAllowed({ ...found, from: 'reports/summary.ts', to: 'commands/run.ts', typeOnly: true })).toBe(
    false,
  );
});

test('no file imports itself through others', () => {
  const settled = new Set<string>();
  const circles: string[] = [];
  const visit = (file: string, path: readonly string[]) => {
    if (path.includes(file)) circles.push([...path.slice(path.indexOf(file)), file].join(' → '));
    if (settled.has(file) || path.includes(file)) return;
    for (const { to, isPackage, typeOnly } of importsOf(file)) {
      if (!isPackage && !typeOnly) visit(to, [...path, file]);
    }
    settled.add(file);
  };
  for (const file of files) visit(file, []);
  expect(circles).toEqual([]);
});

test('nothing but the argument parser is loaded before a command runs', () => {
  const reached = new Set(['cli.ts']);
  const packages = new Set<string>();
  for (const file of reached) {
    for (const { to, isPackage, typeOnly, later } of importsOf(file)) {
      if (typeOnly || later) continue;
      (isPackage ? packages : reached).add(to);
    }
  }
  expect([...packages].filter((name) => !name.startsWith('node:')).sort()).toEqual([
    'yargs',
    'yargs/helpers',
  ]);
  expect([...reached].sort()).toEqual([
    'cli.ts',
    'commands/arguments.ts',
    'commands/complete.ts',
    'commands/failure.ts',
    'commands/yargs.ts',
    'errors.ts',
    'version.ts',
  ]);
});

/** A package is met in one part of the house, so that it can be exchanged there. */
const homes: Readonly<Record<string, readonly string[]>> = {
  yargs: ['cli.ts', 'commands'],
  piscina: ['engine'],
  '@duckdb/node-api': ['results'],
  'hyparquet-writer': ['results'],
  'fast-csv': ['results'],
  yaml: ['study'],
  zod: ['study'],
  mathjs: ['study'],
  'fastest-levenshtein': ['study'],
  vega: ['charts'],
  'vega-lite': ['charts'],
  'd3-contour': ['charts'],
  '@resvg/resvg-js': ['charts'],
};

test('each package is used in its own part of the house', () => {
  const packageOf = (path: string) => path.split('/', path.startsWith('@') ? 2 : 1).join('/');
  const wrong = imports.filter(
    ({ from, to, isPackage }) =>
      isPackage && !to.startsWith('node:') && !homes[packageOf(to)]?.includes(partOf(from)),
  );
  expect(wrong.map(told)).toEqual([]);
});

test('node’s own modules are told by their prefix', () => {
  const bare = new Set(['fs', 'path', 'os', 'url', 'crypto', 'worker_threads', 'util', 'module', 'process']);
  expect(imports.filter(({ to }) => bare.has(to)).map(told)).toEqual([]);
});
