import type { Ink } from './types';

/** Line weights at 100 % [px]. */
export const WEIGHT = {
  material: 1.9,
  selected: 3,
  outline: 1.5,
  detail: 1,
  link: 1.2,
  tagRule: 0.9,
  leader: 0.7,
  diamond: 1.1,
  border: 1,
} as const;

export const GRID = 8;

/** Text of the sheet: size and line height [px]. */
export const TEXT = {
  tag: 12.5,
  flag: 11.5,
  label: 11.5,
  labelLine: 13,
  labelUnit: 11,
  duty: 11,
  note: 12,
  diamond: 11,
  zone: 10,
} as const;

export const FONT = 'SourceSans3';

export type Palette = Readonly<Record<Ink, string>>;

export const LIGHT: Palette = {
  ink: '#16191B',
  ink2: '#454D52',
  ink3: '#5F686D',
  hair: '#7F888C',
  rule: '#C6CDCB',
  paper: '#FDFDFB',
  accent: '#2336C4',
  caution: '#7A4A00',
  'caution-wash': '#FAEFD8',
  beyond: '#A3161B',
  'on-beyond': '#FFFFFF',
};

export const DARK: Palette = {
  ink: '#ECEFEE',
  ink2: '#B9C1C3',
  ink3: '#98A2A6',
  hair: '#788287',
  rule: '#3A4348',
  paper: '#14191C',
  accent: '#A9B7FF',
  caution: '#F2C069',
  'caution-wash': '#3A2E17',
  beyond: '#FF9C93',
  'on-beyond': '#1B1110',
};

/** Paper output is always light, on white. */
export const PRINT: Palette = { ...LIGHT, paper: '#FFFFFF' };
