import { propertyWord, quoted, type Slots, type Words } from './slots';

/** "The vapour pressure of Heavy oil", with the row where there are several. */
const correlation = (s: Slots): string => {
  const of = s.has('property') ? propertyWord(s.text('property')) : 'correlation';
  const several = (s.value('rows') ?? 1) > 1 && s.value('row') !== undefined;
  return `The ${of} of ${s.chemical()}${several ? ` (correlation ${s.number('row')})` : ''}`;
};

/** Why a correlation cannot be used, and what helps. */
const FAULTS: Readonly<Record<string, { says(s: Slots): string; readonly next: string }>> = {
  form: {
    says: (s) => `its form${s.has('form') ? ` ${quoted(s.text('form'))}` : ''} is none for this property`,
    next: 'Choose a form that gives this property.',
  },
  coefficients: {
    says: () =>
      'coefficients are missing, or one that stands for a critical temperature or pressure is not above zero',
    next: 'Check the coefficients against their source, in number and order.',
  },
  range: {
    says: () => 'its range does not run from a lower to a higher temperature',
    next: 'Give the lower end as Tmin and the upper end as Tmax, in kelvin.',
  },
  overlap: {
    says: () => 'its range overlaps that of another, so that two hold at one temperature',
    next: 'Let one range end where the next begins.',
  },
  value: {
    says: (s) => `at ${s.number('temperature')} its value is not above zero, or beyond all measure`,
    next: 'Check coefficients and range: each must hold over the whole range that is stated.',
  },
  falling: {
    says: (s) => `at ${s.number('temperature')} it falls with rising temperature`,
    next: 'Check the coefficients and the range; a vapour pressure rises everywhere.',
  },
};
const faultOf = (s: Slots): string => FAULTS[s.text('fault')]?.says(s) ?? 'it makes no sense as it stands';

/** A correlation of a chemical of one's own that the file brings and that cannot be used. */
export const CORRELATION_WORDS: Words = {
  title: 'Correlation not usable',
  sentence: (s) => `${correlation(s)} cannot be used: ${faultOf(s)}.`,
  next: (s) => FAULTS[s.text('fault')]?.next ?? 'Correct the correlation.',
};
