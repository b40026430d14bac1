import type { Verdict } from '@/lib/results/result';

/** Colours on paper: the tokens of the light theme. Blue never prints. */
export const ink = {
  sheet: '#FDFEFC',
  white: '#FFFFFF',
  band: '#F0F4EF',
  grid: '#DCEADF',
  hair: '#CBD6CD',
  rule: '#7A8B83',
  ink: '#12212D',
  ink2: '#3F515A',
  ink3: '#54656B',
  red: '#B3241A',
  amber: '#7F4D00',
  amberLine: '#B87A0A',
  amberWash: '#FBF0D3',
  green: '#17653A',
  plain: '#B9C7C2',
  plainCap: '#43565C',
  /** 5 % of ink on the sheet. */
  tint: '#F1F3F2',
} as const;
export type Ink = keyof typeof ink;

/** Colour of a ratio or a verdict's word: within has none. */
export const verdictInk: Readonly<Record<Verdict, Ink>> = { over: 'red', near: 'amber', within: 'ink', 'not checked': 'ink2' };
