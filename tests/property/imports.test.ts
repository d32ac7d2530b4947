// Who may import whom: the map of the house, once, as data.
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { globalsOf, importsOf, sourceFiles, type Use } from '../support/imports.ts';

interface Layer {
  /** Other layers, by folder of src-main. Every layer may import itself. */
  readonly layers: readonly string[];
  /** Layers of which only types may be imported. */
  readonly types: readonly string[];
  /** Packages, and modules of Node. */
  readonly packages: readonly string[];
  /** Same input, same numbers, wherever it runs: no Node, no clock, no randomness. */
  readonly isPure: boolean;
}

const belowSolver = ['protocol', 'rig', 'cell', 'channels', 'units'];
const pure = { packages: [], isPure: true } as const;
const table: Readonly<Record<string, Layer>> = {
  contract: { layers: [], types: [], packages: ['zod'], isPure: true },
  units: { layers: [], types: ['contract'], ...pure },
  cell: { layers: ['units'], types: ['contract'], ...pure },
  channels: { layers: ['units'], types: ['contract'], ...pure },
  rig: { layers: ['cell', 'units'], types: ['contract'], ...pure },
  protocol: { layers: ['cell', 'units'], types: ['contract'], ...pure },
  solver: { layers: belowSolver, types: ['contract'], ...pure },
  forecast: { layers: ['solver', ...belowSolver], types: ['contract'], ...pure },
  // The engine hands it bytes: no disk, no network.
  // Where the contract's schemas are used as values, the schema library says what failed.
  exchange: { layers: ['cell', 'protocol', 'units', 'contract'], types: [], packages: ['zod'], isPure: true },
  notebook: {
    layers: ['units', 'contract'],
    types: [],
    packages: ['zod', 'better-sqlite3', 'node:crypto', 'node:fs', 'node:os', 'node:path', 'node:util'],
    isPure: false,
  },
  engine: {
    layers: ['notebook', 'exchange', 'forecast', 'solver', ...belowSolver, 'contract'],
    types: [],
    packages: ['node:', 'zod'],
    isPure: false,
  },
  'shells/electron': {
    layers: ['shells', 'engine', 'contract'],
    types: [],
    packages: ['node:', 'electron'],
    isPure: false,
  },
  'shells/browser': { layers: ['shells', 'engine', 'contract'], types: [], packages: ['node:'], isPure: false },
  shells: { layers: ['engine', 'contract'], types: [], packages: ['node:'], isPure: false },
  cli: { layers: ['engine', 'contract'], types: [], packages: ['node:'], isPure: false },
};

/** Of the page: a folder's packages; every other folder may import Svelte and the typefaces only. */
const pagePackages: Readonly<Record<string, readonly string[]>> = {
  'src-renderer/charts': ['svelte', 'chart.js', 'chartjs-plugin-'],
  'src-renderer': ['svelte', '@fontsource/'],
};

const impureGlobals = [
  ...['process', 'Buffer', 'performance', 'fetch', 'crypto', 'console', 'Date', 'Math.random', 'globalThis'],
  ...['setTimeout', 'setInterval', 'setImmediate', 'queueMicrotask', 'require', '__dirname', '__filename'],
];

const beginsWithOne = (target: string, packages: readonly string[]): boolean =>
  packages.some(
    (name) =>
      target === name ||
      target.startsWith(name.endsWith(':') || name.endsWith('-') || name.endsWith('/') ? name : `${name}/`),
  );
const say = ({ file, line, target }: Use, allowed: string): string =>
  `${file}:${line} imports ${target}, allowed: ${allowed || 'nothing'}`;

/** The longest entry of the table that the file lies in. */
function layerOf(file: string): string {
  const names = Object.keys(table).filter((name) => file.startsWith(`src-main/${name}/`));
  const name = names.sort((a, b) => b.length - a.length)[0];
  if (name === undefined) throw new Error(`${file} lies in no layer of the table`);
  return name;
}

function wrongImport(use: Use): string | null {
  const name = layerOf(use.file);
  const layer = table[name] as Layer;
  const allowed = [...layer.layers, ...layer.types.map((each) => `types of ${each}`), ...layer.packages].join(', ');
  if (!/^(src-main|src-renderer|scripts|tests)\//.test(use.target)) {
    return beginsWithOne(use.target, layer.packages) ? null : say(use, allowed);
  }
  if (!use.target.startsWith('src-main/')) return say(use, allowed);
  const to = layerOf(use.target);
  const isAllowed = to === name || layer.layers.includes(to) || (use.isTypeOnly && layer.types.includes(to));
  return isAllowed ? null : say(use, allowed);
}

function wrongPageImport(use: Use): string | null {
  if (use.target.startsWith('src-renderer/')) return null;
  if (use.target.startsWith('src-main/contract/')) return null;
  const folder = use.file.startsWith('src-renderer/charts/') ? 'src-renderer/charts' : 'src-renderer';
  const packages = pagePackages[folder] ?? [];
  const allowed = ['src-renderer', 'src-main/contract', ...packages].join(', ');
  return beginsWithOne(use.target, packages) ? null : say(use, allowed);
}

function wrongGlobals(file: string): string[] {
  if (!table[layerOf(file)]?.isPure) return [];
  return globalsOf(file, impureGlobals).map(
    ({ line, target }) => `${file}:${line} uses ${target}, but ${layerOf(file)} gives the same for the same input`,
  );
}

const isWrong = (found: string | null): found is string => found !== null;

describe('the map of the house', () => {
  it('holds for every import of src-main', () => {
    expect(sourceFiles('src-main').flatMap(importsOf).map(wrongImport).filter(isWrong)).toEqual([]);
  });

  it('holds for every import of the page: the contract and nothing else of src-main, charts in one place', () => {
    expect(sourceFiles('src-renderer').flatMap(importsOf).map(wrongPageImport).filter(isWrong)).toEqual([]);
  });

  it('keeps Node, clock and randomness out of what computes', () => {
    expect(sourceFiles('src-main').flatMap(wrongGlobals)).toEqual([]);
  });

  it('lets one file of the page touch the network', () => {
    const files = sourceFiles('src-renderer').filter((file) => file !== 'src-renderer/bridge.ts');
    const touched = files.flatMap((file) =>
      globalsOf(file, ['fetch', 'XMLHttpRequest', 'WebSocket', 'window.holdfast']),
    );
    expect(touched).toEqual([]);
  });
});

describe('the test of the map', () => {
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-imports-'));
  afterAll(() => rmSync(folder, { recursive: true }));
  const file = (text: string, name = 'wrong.ts'): string => {
    writeFileSync(join(folder, name), text);
    return join(folder, name);
  };
  /** As if the text stood in a file of a layer. */
  const judged = (layer: string, text: string): (string | null)[] =>
    importsOf(file(text)).map((use) => wrongImport({ ...use, file: `src-main/${layer}/wrong.ts` }));

  it('prints file, line, what is imported, and what may be', () => {
    expect(judged('units', "\nimport { readFileSync } from 'node:fs';")).toEqual([
      'src-main/units/wrong.ts:2 imports node:fs, allowed: types of contract',
    ]);
  });

  it.each([
    ['solver', "import x from 'electron';"],
    ['shells/browser', "import { app } from 'electron';"],
    ['engine', "import type { App } from 'electron';"],
    ['exchange', "import 'node:http';"],
    ['cell', "const x = await import('better-sqlite3');"],
    ['forecast', "export { x } from 'svelte';"],
    ['units', "type X = import('zod').ZodType;"],
  ])('finds what %s must not import: %s', (layer, text) => {
    expect(judged(layer, text).filter(isWrong)).toHaveLength(1);
  });

  it('tells types from values', () => {
    const use = { file: 'src-main/cell/a.ts', line: 1, target: 'src-main/contract/refusal.ts' };
    expect(wrongImport({ ...use, isTypeOnly: true })).toBeNull();
    expect(wrongImport({ ...use, isTypeOnly: false })).toContain('allowed: units, types of contract');
    const [typed, mixed] = importsOf(file("import { type A } from './a.ts';\nimport { type A, b } from './a.ts';"));
    expect([typed?.isTypeOnly, mixed?.isTypeOnly]).toEqual([true, false]);
  });

  it('finds imports and globals in components, at their line', () => {
    const component = file(
      '<p>fetch</p>\n<script lang="ts">\n  import x from "electron";\n  fetch(x);\n</script>\n',
      'Wrong.svelte',
    );
    expect(importsOf(component)).toMatchObject([{ line: 3, target: 'electron' }]);
    expect(globalsOf(component, ['fetch'])).toMatchObject([{ line: 4, target: 'fetch' }]);
  });

  it('knows a global from a name of our own', () => {
    const text = 'const a = { process: 1 };\na.process;\nfunction f(Date: number) {}\nMath.random();\nprocess.exit();';
    expect(globalsOf(file(text), impureGlobals).map(({ line }) => line)).toEqual([4, 5]);
  });
});
