import { posix } from 'node:path';
import { blanked, type Import, importsOf } from './imports';
import {
  FLOORS,
  IMPURE,
  isCatalogue,
  isEngineTypes,
  isFormula,
  isKnownOfKinds,
  isScript,
  isSolver,
  PURE_ROOMS,
  ROOMS,
  WORKER_ROOMS,
} from './layers';

/** Project files by path from the root ("src/app/main.tsx"), with their text. */
export type Files = ReadonlyMap<string, string>;

interface Edge {
  readonly from: string;
  readonly to: string;
  readonly how: Import['how'];
}

const roomOf = (path: string): string => path.split('/')[1] ?? '';
const floorOf = (path: string): number => FLOORS.indexOf(path.split('/')[2] as (typeof FLOORS)[number]);
const isCode = (path: string): boolean => /\.tsx?$/.test(path);

/** The file that a relative import names, or undefined when there is none. */
function resolve(files: Files, from: string, target: string): string | undefined {
  const base = posix.join(posix.dirname(from), target.replace(/\?.*$/, ''));
  return ['', '.ts', '.tsx', '/index.ts', '/index.tsx']
    .map((end) => base + end)
    .find((path) => files.has(path));
}

/**
 * Every break of the import rules, one sentence each; empty when all is well.
 *
 * @param files everything under src (code, styles, tables), and index.html
 */
export function layerFaults(files: Files): string[] {
  const faults: string[] = [];
  const edges: Edge[] = [];
  for (const [from, text] of files) {
    if (!isCode(from)) continue;
    const rule = ROOMS[roomOf(from)];
    if (!rule) {
      faults.push(`${from} lies in no known room of src`);
      continue;
    }
    if (PURE_ROOMS.includes(roomOf(from))) {
      const impure = IMPURE.exec(blanked(text, true));
      if (impure) faults.push(`${from} uses ${impure[0].replace(/\s*[.(]$/, '')}, and its room is pure`);
    }
    for (const { target, how } of importsOf(text)) {
      if (!target.startsWith('.')) {
        const fault = packageFault(from, target);
        if (fault) faults.push(fault);
        continue;
      }
      const to = resolve(files, from, target);
      if (to === undefined) {
        faults.push(`${from} imports ${target}, which does not exist`);
        continue;
      }
      edges.push({ from, to, how });
      const fault = directionFault({ from, to, how });
      if (fault) faults.push(fault);
    }
  }
  return [...faults, ...circles(edges), ...reachableSolvers(files, edges)];
}

function packageFault(from: string, target: string): string | undefined {
  const allowed = ROOMS[roomOf(from)]!.packages;
  const name = target.startsWith('@') ? target.split('/').slice(0, 2).join('/') : target.split('/')[0]!;
  if (allowed.includes('*') || allowed.includes(name)) return undefined;
  if (target.startsWith('node:') && (allowed.includes('node:*') || isScript(from))) return undefined;
  return `${from} imports the package ${name}, which its room may not`;
}

function directionFault({ from, to, how }: Edge): string | undefined {
  const [here, there] = [roomOf(from), roomOf(to)];
  const rule = ROOMS[here]!;
  const fault = `${from} imports ${to} (${how}), against the direction of imports`;
  if (how === 'worker') {
    return rule.startsWorker && WORKER_ROOMS.includes(there)
      ? undefined
      : `${from} starts ${to} as a worker, which it may not`;
  }
  if (here === there) return here === 'engine' && climbs(from, to) ? fault : undefined;
  if (rule.code.includes(there)) return undefined;
  if (how === 'type' && rule.types.includes(there)) return undefined;
  if (rule.code.includes('catalogue') && isKnownOfKinds(to)) return undefined;
  if (rule.code.includes('engine-types') && isEngineTypes(to)) return undefined;
  if (rule.code.includes('formulas') && isFormula(to)) return undefined;
  return fault;
}

/** Whether an import inside the engine goes up a floor. Files directly in engine/ are the ground (-1). */
const climbs = (from: string, to: string): boolean => floorOf(to) > floorOf(from);

/** Files that load each other, each circle once. Types are erased and cannot make one. */
function circles(edges: readonly Edge[]): string[] {
  const next = grouped(edges.filter(({ how }) => how === 'value' || how === 'lazy'));
  const done = new Set<string>();
  const faults: string[] = [];
  const visit = (path: string, trail: readonly string[]): void => {
    const at = trail.indexOf(path);
    if (at >= 0) {
      faults.push(`circle of imports: ${[...trail.slice(at), path].join(' -> ')}`);
      return;
    }
    if (done.has(path)) return;
    for (const to of next.get(path) ?? []) visit(to, [...trail, path]);
    done.add(path);
  };
  for (const path of next.keys()) visit(path, []);
  return faults;
}

/** Solvers loaded by the page's own thread, or by a catalogue, with the way there. */
function reachableSolvers(files: Files, edges: readonly Edge[]): string[] {
  const next = grouped(edges.filter(({ how }) => how === 'value' || how === 'lazy'));
  const page = files.get('index.html');
  const entries = [...(page ?? '').matchAll(/<script[^>]*\bsrc="\.?\/(src\/[^"]+)"/g)].map((m) => m[1]!);
  const faults: string[] = [];
  if (page !== undefined && !entries.some((entry) => files.has(entry))) {
    faults.push('index.html loads no script from src');
  }
  const starts = [
    ...entries,
    ...[...files.keys()].filter((path) => isCatalogue(path) || isKnownOfKinds(path)),
  ];
  const seen = new Map<string, string | undefined>(starts.map((path) => [path, undefined]));
  for (const [path] of seen) {
    if (isSolver(path)) {
      const way = [path];
      for (let back = seen.get(path); back !== undefined; back = seen.get(back)) way.unshift(back);
      const whose = isCatalogue(way[0]!) ? 'a catalogue' : 'the page';
      faults.push(`${whose} reaches a solver without the worker: ${way.join(' -> ')}`);
      continue;
    }
    // A Map yields what is added while it is walked: this is a breadth-first search.
    for (const to of next.get(path) ?? []) if (!seen.has(to)) seen.set(to, path);
  }
  return faults;
}

function grouped(edges: readonly Edge[]): Map<string, string[]> {
  const next = new Map<string, string[]>();
  for (const { from, to } of edges) next.set(from, [...(next.get(from) ?? []), to]);
  return next;
}
