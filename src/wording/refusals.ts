/** Why a typed quantity is not taken; `{found}` is the piece of text where the trouble begins. */
const REFUSALS: Readonly<Record<string, string>> = {
  'quantity/empty': 'Nothing is typed.',
  'quantity/not-a-number': 'It does not begin with a number.',
  'quantity/decimal-comma': 'The decimal sign is a point.',
  'quantity/digit-grouping': 'Digits are not grouped.',
  'quantity/out-of-range': 'The number is too large or too small to be held.',
  'quantity/no-unit': 'A unit is missing.',
  'quantity/unknown-unit': '“{found}” is no unit known here.',
  'quantity/unit-syntax': '“{found}” cannot be read as part of a unit.',
  'quantity/second-slash': 'A unit has one slash only.',
  'quantity/unbracketed': 'What is divided by needs brackets.',
  'quantity/reference-in-compound': 'Gauge and absolute have no meaning inside a compound unit.',
  'quantity/wrong-dimension': '“{found}” measures something else.',
  'quantity/volume-flow':
    'A volume flow does not say how much it is: give moles, a mass, or a gas volume at normal or standard conditions.',
  'quantity/drop-has-no-reference': 'A pressure difference is neither gauge nor absolute.',
  'quantity/below-absolute-zero': 'It is below absolute zero.',
  'quantity/below-vacuum': 'It is below full vacuum.',
};

/** One sentence for a refused quantity; `near` is what was most likely meant. */
export function sayRefusal(code: string, found = '', near?: string): string {
  const why = (REFUSALS[code] ?? 'It cannot be read.').replace('{found}', found);
  return near ? `${why} Perhaps ${near}?` : why;
}

export const REFUSAL_CODES = Object.keys(REFUSALS);
