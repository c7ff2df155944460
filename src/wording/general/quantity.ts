import type { Refusal } from '../../quantity';
import { orList, ownWords, quoted } from './slots';

export interface QuantitySaid {
  /** Why the text is not taken. */
  readonly sentence: string;
  /** What to type instead. */
  readonly fits: string;
}

type Seen = Pick<Refusal, 'found' | 'fits'> & { readonly near?: string };

/** Why a text is not taken, by code. */
export const QUANTITY_WORDS: Readonly<Record<string, (seen: Seen) => string>> = {
  'quantity/empty': () => 'Nothing was typed.',
  'quantity/not-a-number': ({ found }) =>
    found ? `${quoted(found)} is not a number.` : 'A number is missing at the start.',
  'quantity/decimal-comma': ({ found }) => `${quoted(found)} has a comma, and the decimal sign is a point.`,
  'quantity/digit-grouping': ({ found }) => `${quoted(found)} has grouped digits, which could be misread.`,
  'quantity/out-of-range': ({ found }) => `The number ${quoted(found)} is too large or too small to be held.`,
  'quantity/no-unit': () => 'The number has no unit, and without one it can mean many things.',
  'quantity/unknown-unit': ({ found }) => `${quoted(found)} is not a unit known here.`,
  'quantity/unit-syntax': ({ found }) =>
    found ? `${quoted(found)} stands where it makes no unit.` : 'The unit breaks off.',
  'quantity/second-slash': () => 'A unit may have one slash only.',
  'quantity/unbracketed': ({ found }) =>
    `Whether ${quoted(found)} stands above or under the slash is not clear without brackets.`,
  'quantity/reference-in-compound': ({ found }) =>
    `${quoted(found)} is a gauge or absolute pressure and cannot be part of a compound unit.`,
  'quantity/wrong-dimension': ({ found }) =>
    `${quoted(found)} measures something else than is asked for here.`,
  'quantity/volume-flow': ({ found }) =>
    `${quoted(found)} does not say how much flows: a volume holds more or less with temperature and pressure.`,
  'quantity/drop-has-no-reference': ({ found }) =>
    `${quoted(found)} cannot be used for a drop: a pressure difference is neither gauge nor absolute.`,
  'quantity/below-absolute-zero': ({ found }) =>
    `A temperature of ${quoted(found)} in this unit is below absolute zero.`,
  'quantity/below-vacuum': ({ found }) =>
    `A pressure of ${quoted(found)} in this unit is below a full vacuum.`,
};

const usual = (fits: readonly string[]): string =>
  fits.length > 0 ? `Units that fit: ${orList(fits)}.` : 'Type a number without a unit.';
const withUnit = ({ fits }: Seen): string =>
  fits.length > 0
    ? `Type a number with its unit: ${orList(fits)}.`
    : 'Type a number without a unit, such as 0.5.';
const write = (near: string): string => `Write ${quoted(near)}.`;

const INSTEAD: Readonly<Record<string, (seen: Seen) => string>> = {
  'quantity/empty': withUnit,
  'quantity/not-a-number': withUnit,
  'quantity/no-unit': ({ fits }) => `Type a unit behind the number: ${orList(fits)}.`,
  'quantity/decimal-comma': ({ near }) => (near ? write(near) : 'Write a point instead of the comma.'),
  'quantity/digit-grouping': ({ near }) =>
    near ? `${write(near).slice(0, -1)} if that is meant.` : 'Write the digits without gaps.',
  'quantity/out-of-range': ({ fits }) =>
    fits.length > 0
      ? `Choose a unit in which the number is of ordinary size: ${orList(fits)}.`
      : 'Type a number of ordinary size.',
  'quantity/volume-flow': ({ fits }) => {
    const [amount = 'kmol/h', mass = 'kg/h', gas = 'Nm3/h'] = fits;
    return `Say it as an amount in ${amount}, as a mass in ${mass}, or as a gas volume at its reference state in ${gas}.`;
  },
  'quantity/below-absolute-zero': () => 'The lowest temperature is 0 K, −273.15 degC or −459.67 degF.',
  'quantity/below-vacuum': () =>
    'Zero absolute, 0 bar(a), is the lowest; a gauge pressure counts from the site pressure.',
};

/** Why a typed text is not the quantity asked for, and what to type instead. */
export function sayQuantityRefusal(
  refusal: Omit<Refusal, 'ok' | 'code' | 'at'> & { readonly code: string },
): QuantitySaid {
  const { code, fits, near } = refusal;
  const why = Object.hasOwn(QUANTITY_WORDS, code) ? QUANTITY_WORDS[code] : undefined;
  const instead = Object.hasOwn(INSTEAD, code) ? INSTEAD[code] : undefined;
  const guess = near ? `Perhaps ${quoted(near)} is meant. ` : '';
  return {
    sentence: why ? why(refusal) : ownWords(code),
    fits: instead ? instead(refusal) : guess + usual(fits),
  };
}
