import type { StreamId } from '../../engine/ids';
import type { FlowSI } from '../../engine/units/types';
import { word } from '../findings';
import { isObject, own } from '../json';
import type { Json } from '../types';
import { isGiven, readBasis, readQuantity } from './quantity';
import { GAP, gap, type Scope, under } from './scope';

const SHARE_KEYS = ['share', 'of', 'basis', 'chemical'];

/**
 * A flow: molar, mass, or a share of the unit's feeds or of a stream. A share of a stream is put among the reads, for the
 * network to resolve before the unit sees it.
 */
export function readFlow(value: Json, path: string, scope: Scope, bareShare: boolean): FlowSI | typeof GAP {
  if (isObject(value)) return readShare(value, path, scope);
  const dims = bareShare
    ? (['fraction', 'molarFlow', 'massFlow'] as const)
    : (['molarFlow', 'massFlow'] as const);
  const parsed = readQuantity(value, dims, path, scope);
  if (parsed === GAP) return GAP;
  if (parsed.dim === 'fraction') return { is: 'share', share: parsed.si, of: 'feed', basis: 'mole' };
  return parsed.dim === 'molarFlow' ? { is: 'molar', n_mol_s: parsed.si } : { is: 'mass', m_kg_s: parsed.si };
}

function readShare(value: { readonly [key: string]: Json }, path: string, scope: Scope): FlowSI | typeof GAP {
  let broken = false;
  for (const key of Object.keys(value))
    if (!SHARE_KEYS.includes(key)) {
      gap(scope, 'sketch/unknown-setting', under(path, key), word('known', SHARE_KEYS.join(', ')));
      broken = true;
    }
  for (const key of ['share', 'of', 'basis'])
    if (!isGiven(own(value, key))) {
      gap(scope, 'sketch/needs-value', under(path, key));
      broken = true;
    }
  if (broken) return GAP;
  const share = readQuantity(own(value, 'share') as Json, ['fraction'], under(path, 'share'), scope, {
    min: 0,
  });
  const of = own(value, 'of') as Json;
  const id = own(value, 'chemical');
  const chemical = typeof id === 'string' ? scope.indexOf.get(id) : undefined;
  const basis = readBasis(own(value, 'basis'), under(path, 'basis'), scope);
  if (basis === GAP) return GAP;
  if (id !== undefined && chemical === undefined)
    return gap(scope, 'sketch/unknown-chemical', under(path, 'chemical'), word('chemical', String(id)));
  if (share === GAP) return GAP;
  const rest = { basis, ...(chemical === undefined ? {} : { chemical }) } as const;
  if (of === 'feed') return { is: 'share', share: share.si, of, ...rest };
  const stream = isObject(of) && Object.keys(of).length === 1 ? own(of, 'stream') : undefined;
  if (typeof stream !== 'string')
    return gap(scope, 'sketch/unknown-option', under(path, 'of'), word('known', 'feed, stream'));
  scope.reads.push({
    unit: scope.unit,
    path,
    stream: stream as StreamId,
    of: basis === 'mole' ? 'mol' : 'mass',
    ...(chemical === undefined ? {} : { chemical }),
  });
  return { is: 'share', share: share.si, of: { stream: stream as StreamId }, ...rest };
}
