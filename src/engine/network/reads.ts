import type { StreamState } from '../equilibrium/types';
import { totalOf } from '../units/streams';
import type { FlowSI } from '../units/types';
import type { Read } from './types';

type Tree = { readonly [key: string]: unknown };
const isTree = (x: unknown): x is Tree => typeof x === 'object' && x !== null;

const isShare = (x: unknown): x is Extract<FlowSI, { is: 'share' }> => isTree(x) && x.is === 'share';

/** The flow that a share of a stream stands for: of all of it or of one chemical, by mole or by mass. */
export function flowOfShare(share: number, read: Read, stream: StreamState, MW_kg_mol: Float64Array): FlowSI {
  const { n_mol_s } = stream;
  if (read.of === 'mol')
    return {
      is: 'molar',
      n_mol_s: share * (read.chemical === undefined ? totalOf(n_mol_s) : n_mol_s[read.chemical]!),
    };
  let m = 0;
  for (let i = 0; i < n_mol_s.length; i++)
    if (read.chemical === undefined || read.chemical === i) m += n_mol_s[i]! * MW_kg_mol[i]!;
  return { is: 'mass', m_kg_s: share * m };
}

/** Settings with the flow at the read's path resolved; only what lies on the path is copied. Throws when nothing is there. */
export function withRead(
  settings: unknown,
  read: Read,
  stream: StreamState,
  MW_kg_mol: Float64Array,
): unknown {
  const put = (node: unknown, keys: readonly string[]): unknown => {
    const [key, ...rest] = keys;
    if (key === undefined) {
      if (!isShare(node)) throw new Error(`no share of a stream at ${read.path}`);
      return flowOfShare(node.share, read, stream, MW_kg_mol);
    }
    if (!isTree(node) || !Object.hasOwn(node, key)) throw new Error(`no setting at ${read.path}`);
    const value = put(node[key], rest);
    return Array.isArray(node)
      ? node.map((item, i) => (String(i) === key ? value : item))
      : { ...node, [key]: value };
  };
  return put(settings, read.path.split('.'));
}
