/** The rooms of src and who may import whom. Change a rule here and in DEVELOPERS.md together. */
export interface RoomRule {
  /**
   * Rooms whose code it may load. `catalogue` stands for engine/units/catalogue.ts, rules.ts and each kind's free.ts, `engine-types` for files
   * directly in engine/ and its types.ts files: tables and names that solve nothing, safe for the page; `formulas` for
   * closed formulas of pure chemicals and pairs.
   */
  readonly code: readonly string[];
  /** Rooms it may `import type` from besides: erased before anything runs. */
  readonly types: readonly string[];
  /** Packages it may load, by name; '*' for any, 'node:*' for Node's own modules. */
  readonly packages: readonly string[];
  /** Whether it may start a worker. */
  readonly startsWorker?: true;
}

const screen = (...more: string[]): RoomRule => ({
  code: ['parts', 'store', 'drawing', 'wording', 'report', 'quantity', 'catalogue', 'engine-types'],
  types: ['engine', 'sketch', 'data', 'protocol'],
  packages: ['react', 'react-dom', '@base-ui/react', 'zustand', 'd3-scale', 'd3-shape', ...more],
});

export const ROOMS: Readonly<Record<string, RoomRule>> = {
  quantity: { code: [], types: [], packages: [] },
  engine: { code: ['quantity'], types: [], packages: [] },
  data: { code: ['engine-types', 'formulas', 'quantity'], types: ['engine'], packages: ['valibot'] },
  sketch: {
    code: ['quantity', 'catalogue', 'data', 'engine-types', 'formulas'],
    types: ['engine'],
    packages: ['valibot'],
  },
  wording: { code: ['quantity', 'catalogue', 'engine-types'], types: ['engine'], packages: [] },
  drawing: {
    code: ['sketch', 'catalogue', 'quantity', 'engine-types'],
    types: ['engine'],
    packages: ['d3-scale', 'd3-shape'],
  },
  report: {
    code: ['sketch', 'drawing', 'wording', 'quantity', 'catalogue', 'engine-types'],
    types: ['engine', 'data'],
    packages: ['pdfmake', 'write-excel-file', 'fflate', 'd3-scale', 'd3-shape'],
  },
  /** The worker that makes documents: entry, messages, fonts and painting. */
  documents: {
    code: ['report', 'drawing', 'sketch', 'wording', 'quantity', 'catalogue', 'engine-types'],
    types: ['engine', 'data'],
    packages: ['pdfmake'],
  },
  protocol: { code: ['engine-types'], types: ['engine'], packages: [] },
  worker: { code: ['engine', 'protocol', 'quantity'], types: [], packages: [] },
  store: {
    code: ['sketch', 'protocol', 'quantity', 'catalogue', 'engine-types'],
    types: ['engine', 'data'],
    packages: ['react', 'zustand', 'idb', 'valibot'],
    startsWorker: true,
  },
  /** Small React parts that several screens show alike: marks, number fields, segmented switches. */
  parts: {
    code: ['store', 'drawing', 'wording', 'quantity', 'engine-types'],
    types: ['engine', 'sketch'],
    packages: ['react', 'd3-scale', 'd3-shape'],
  },
  canvas: screen('reactflow'),
  drawers: screen(),
  balance: screen(),
  review: screen(),
  app: {
    code: [
      'parts',
      'canvas',
      'drawers',
      'balance',
      'review',
      'store',
      'drawing',
      'wording',
      'report',
      'quantity',
      'sketch',
      'data',
      'protocol',
      'catalogue',
      'engine-types',
    ],
    types: ['engine', 'documents'],
    packages: ['*'],
    startsWorker: true,
  },
  cli: {
    code: ['engine', 'sketch', 'data', 'report', 'wording', 'quantity', 'catalogue', 'engine-types'],
    types: [],
    packages: ['node:*', 'pdfmake'],
  },
};

/** Rooms whose files run as workers. */
export const WORKER_ROOMS: readonly string[] = ['worker', 'documents'];

/** Floors of the engine, lowest first. Files directly in engine/ are the ground, below all of them. */
export const FLOORS = [
  'numerics',
  'chemicals',
  'thermo',
  'equilibrium',
  'column',
  'units',
  'network',
] as const;

/** src/engine/units/catalogue.ts and each kind's own catalogue.ts: ports and settings as data. */
export const isCatalogue = (path: string): boolean =>
  /^src\/engine\/units\/([\w-]+\/)?catalogue\.ts$/.test(path);

/**
 * What is known of the kinds without solving anything: their catalogues, their limits with thresholds and basis, and what a
 * kind can count and compare of its settings alone.
 */
export const isKnownOfKinds = (path: string): boolean =>
  path === 'src/engine/units/catalogue.ts' ||
  path === 'src/engine/units/rules.ts' ||
  /^src\/engine\/units\/[\w-]+\/free\.ts$/.test(path);

/** Files of the engine that hold types and plain tables of names only. */
export const isEngineTypes = (path: string): boolean =>
  /^src\/engine\/([\w-]+\.ts|([\w-]+\/)+types\.ts)$/.test(path);

/** Closed formulas of pure chemicals and pairs: nothing is iterated, no state; data and sketch check and fill with them. */
export const isFormula = (path: string): boolean =>
  /^src\/engine\/(chemicals|thermo\/(pure|pairs))\//.test(path);

/** Run by hand with Node to make committed files; nothing imports them. */
export const isScript = (path: string): boolean =>
  [
    'src/data/convert.ts',
    'src/drawing/makeMetrics.ts',
    'src/sketch/writeSchema.ts',
    'src/report/writeSchema.ts',
  ].includes(path);

/** Code that solves: the page reaches it through the worker, never by an import. */
export const isSolver = (path: string): boolean =>
  /^src\/engine\/units\/([\w-]+\/)+solve\.ts$/.test(path) ||
  path === 'src/engine/units/solvers.ts' ||
  (/^src\/engine\/(network|column|equilibrium)\//.test(path) && !isEngineTypes(path)) ||
  path.startsWith('src/worker/');

/** Names that must not stand in pure rooms: the screen, the clock, chance. */
export const IMPURE =
  /\b(document|window|navigator|localStorage|indexedDB|setTimeout|setInterval|requestAnimationFrame|performance|process)\b\s*[.(]|\bDate\.now\b|\bnew Date\b|\bMath\.random\b|\bcrypto\./;
export const PURE_ROOMS: readonly string[] = ['engine', 'quantity'];
