import type { Random } from './random';

/** Ways to spoil a file: its bytes, or the values that its text stands for. */

type Node = { [key: string]: unknown } | unknown[];

export const STRANGE: readonly unknown[] = [
  null,
  '',
  ' ',
  'x',
  '-1 bar',
  '1e400 K',
  '3 barg',
  '14 %',
  '−5 °C',
  '\u0000',
  '\ud800',
  '蒸留',
  'a'.repeat(5000),
  0,
  -0,
  -1,
  0.1,
  1e308,
  5e-324,
  Number.MAX_SAFE_INTEGER + 2,
  true,
  false,
  [],
  {},
  ['u1', 'out'],
  [0, 0],
  [99_999, -99_999],
  { P: '1 bar' },
  { share: '1 %', of: { stream: 's1' }, basis: 'mole' },
  { preset: 'humid air' },
  { flows: { methane: '1 kg/h' } },
  { id: 'oil', own: { name: 'Oil', MW: 200, Cp: [{ form: 'poly5', c: [200] }] } },
  'methane',
  'water',
  'feed',
  'column',
  'peng-robinson',
  '__proto__',
  'constructor',
  'toString',
  [[[[[[]]]]]],
];

const KEYS: readonly string[] = [
  'id',
  'tag',
  'kind',
  'settings',
  'from',
  'to',
  'via',
  'at',
  'mirror',
  'own',
  'text',
  'version',
  'format',
  'labels',
  'pairs',
  '__proto__',
  'hasOwnProperty',
  '0',
  'ключ',
];

interface Place {
  readonly node: Node;
  readonly key: string;
}

function placesIn(root: Node): Place[] {
  const places: Place[] = [];
  const walk = (node: Node): void => {
    for (const [key, value] of Object.entries(node)) {
      places.push({ node, key });
      if (typeof value === 'object' && value !== null) walk(value as Node);
    }
  };
  walk(root);
  return places;
}

/** Also under the key __proto__, as JSON.parse does. */
const put = (node: Node, key: string, value: unknown): void => {
  Object.defineProperty(node, key, { value, writable: true, enumerable: true, configurable: true });
};
const valueAt = ({ node, key }: Place): unknown => (node as { [key: string]: unknown })[key];

/** One change somewhere in a document; the name of what was done. */
export function spoilValues(root: Node, random: Random): string {
  const places = placesIn(root);
  if (places.length === 0) return 'nothing left';
  const place = random.of(places);
  const { node, key } = place;
  const other = random.of(places);
  const ways: readonly (readonly [string, () => void])[] = [
    ['another value', () => put(node, key, structuredClone(random.of(STRANGE)))],
    ['a value from elsewhere', () => put(node, key, structuredClone(valueAt(other)))],
    [
      'taken away',
      () => {
        if (Array.isArray(node)) node.splice(Number(key), 1);
        else delete (node as { [key: string]: unknown })[key];
      },
    ],
    [
      'twice',
      () => {
        if (Array.isArray(node)) node.splice(Number(key), 0, structuredClone(valueAt(place)));
        else put(node, random.of(KEYS), structuredClone(valueAt(place)));
      },
    ],
    [
      'two exchanged',
      () => {
        const [a, b] = [structuredClone(valueAt(place)), structuredClone(valueAt(other))];
        put(node, key, b);
        put(other.node, other.key, a);
      },
    ],
    [
      'a number a little off',
      () => {
        const value = valueAt(place);
        if (typeof value === 'number') put(node, key, value * random.of([-1, 0, 1e-300, 1e300, 0.5]));
        else if (typeof value === 'string')
          put(
            node,
            key,
            value.replace(/\d+/, () => random.of(['', '9'.repeat(30), '1e', '1e3', '-1'])),
          );
      },
    ],
    [
      'nested',
      () => put(node, key, random.whole(0, 1) ? [valueAt(place)] : { [random.of(KEYS)]: valueAt(place) }),
    ],
    ['another key', () => put(node, random.of(KEYS), structuredClone(random.of(STRANGE)))],
  ];
  const [name, change] = random.of(ways);
  change();
  return name;
}

const TOKENS: readonly string[] = [
  '{',
  '}',
  '[',
  ']',
  ',',
  ':',
  '"',
  '\\',
  '1e999',
  'null',
  '\ufeff',
  '/*',
  '\r',
];

/** One change somewhere in the bytes of a file; the name of what was done. */
export function spoilBytes(bytes: Uint8Array, random: Random): readonly [string, Uint8Array] {
  const at = random.whole(0, Math.max(0, bytes.length - 1));
  const length = Math.min(random.of([1, 2, 8, 200]), bytes.length - at);
  const around = (...middle: readonly Uint8Array[]): Uint8Array => {
    const parts = [bytes.subarray(0, at), ...middle, bytes.subarray(at + length)];
    const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
    let start = 0;
    for (const part of parts) {
      whole.set(part, start);
      start += part.length;
    }
    return whole;
  };
  const piece = bytes.subarray(at, at + length);
  const ways: readonly (readonly [string, () => Uint8Array])[] = [
    ['a bit', () => around(piece.map((byte, k) => (k === 0 ? byte ^ (1 << random.whole(0, 7)) : byte)))],
    ['bytes by chance', () => around(piece.map(() => random.whole(0, 255)))],
    ['a piece lost', () => around()],
    ['a piece twice', () => around(piece, piece)],
    ['cut short', () => bytes.slice(0, at)],
    ['the beginning lost', () => bytes.slice(at)],
    ['a sign put in', () => around(new TextEncoder().encode(random.of(TOKENS)), piece)],
    [
      'a digit changed',
      () => around(piece.map((b) => (b >= 0x30 && b <= 0x39 ? 0x30 + random.whole(0, 9) : b))),
    ],
  ];
  const [name, change] = random.of(ways);
  return [name, change()];
}
