import type { StreamState } from '../equilibrium/types';
import { totalOf } from '../units/streams';
import type { FlowSI } from '../units/types';
import type { Read } from './types';

type Tree = { readonly [key: string]: unknown };
const isTree = (x: unknown): x is Tree => typeof x === 'object' && x !== null;

type Share = Extract<FlowSI, { is: 'share' }>;
const isShare = (x: unknown): x is Share => isTree(x) && x.is === 'share';

/** What a read sees of a stream: all of it or one chemical [mol/s or kg/s, as the read says]. */
export function seenBy(read: Read, { n_mol_s }: StreamState, MW_kg_mol: Float64Array): number {
  if (read.of === 'mol') return read.chemical === undefined ? totalOf(n_mol_s) : n_mol_s[read.chemical]!;
  let m = 0;
  for (let i = 0; i < n_mol_s.length; i++)
    if (read.chemical === undefined || read.chemical === i) m += n_mol_s[i]! * MW_kg_mol[i]!;
  return m;
}

/**
 * Settings with the flow at the read's path resolved to its share of what is seen; only what lies on the path is copied. Throws
 * when nothing is there.
 *
 * @param seen  mol/s or kg/s, as the read says
 */
export function withRead(settings: unknown, read: Read, seen: number): unknown {
  const put = (node: unknown, keys: readonly string[]): unknown => {
    const [key, ...rest] = keys;
    if (key === undefined) {
      if (!isShare(node)) throw new Error(`no share of a stream at ${read.path}`);
      const flow = node.share * seen;
      return (
        read.of === 'mol' ? { is: 'molar', n_mol_s: flow } : { is: 'mass', m_kg_s: flow }
      ) satisfies FlowSI;
    }
    if (!isTree(node) || !Object.hasOwn(node, key)) throw new Error(`no setting at ${read.path}`);
    const value = put(node[key], rest);
    return Array.isArray(node)
      ? node.map((item, i) => (String(i) === key ? value : item))
      : { ...node, [key]: value };
  };
  return put(settings, read.path.split('.'));
}
