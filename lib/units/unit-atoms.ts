import { degree_rad, fahrenheit_K, foot_m, g_m_s2, inch_m, kip_N, lbf_N, pound_kg } from '@/lib/units/constants';
import type { Dimension } from '@/lib/units/quantity';

/**
 * One thing that a unit's word can mean. `force` and `length` are the units of force (N) and length (m) it is made of,
 * null where it has none or more than one would do (MPa: N and mm, or MN and m).
 */
export interface Atom {
  readonly factor: number;
  readonly dimension: Dimension;
  readonly force: number | null;
  readonly length: number | null;
  /** How it is written in print. */
  readonly symbol: string;
}

const none = { force: 0, mass: 0, length: 0, temperature: 0, angle: 0 };
const length = (symbol: string, m: number): Atom => ({
  symbol,
  factor: m,
  dimension: { ...none, length: 1 },
  force: null,
  length: m,
});
const force = (symbol: string, N: number): Atom => ({
  symbol,
  factor: N,
  dimension: { ...none, force: 1 },
  force: N,
  length: null,
});
const mass = (symbol: string, kg: number): Atom => ({
  symbol,
  factor: kg,
  dimension: { ...none, mass: 1 },
  force: null,
  length: null,
});
const temperature = (symbol: string, K: number): Atom => ({
  symbol,
  factor: K,
  dimension: { ...none, temperature: 1 },
  force: null,
  length: null,
});
const angle = (symbol: string, rad: number): Atom => ({
  symbol,
  factor: rad,
  dimension: { ...none, angle: 1 },
  force: null,
  length: null,
});
const perLength = (symbol: string, N: number, m: number): Atom => ({
  symbol,
  factor: N / m,
  dimension: { ...none, force: 1, length: -1 },
  force: N,
  length: m,
});
const perArea = (symbol: string, N: number, m: number): Atom => ({
  symbol,
  factor: N / m ** 2,
  dimension: { ...none, force: 1, length: -2 },
  force: N,
  length: m,
});
const pressure = (symbol: string, Pa: number): Atom => ({
  symbol,
  factor: Pa,
  dimension: { ...none, force: 1, length: -2 },
  force: null,
  length: null,
});
const plain = (symbol: string, factor: number): Atom => ({ symbol, factor, dimension: none, force: null, length: null });

const table: readonly (readonly [words: string, ...atoms: Atom[]])[] = [
  ['mm millimetre millimetres millimeter millimeters', length('mm', 0.001)],
  ['cm centimetre centimetres centimeter centimeters', length('cm', 0.01)],
  ['dm', length('dm', 0.1)],
  ['m metre metres meter meters', length('m', 1)],
  ['in inch inches " ″', length('in', inch_m)],
  ["ft foot feet ' ′", length('ft', foot_m)],
  ['n newton newtons', force('N', 1)],
  ['dan', force('daN', 10)],
  ['kn kilonewton kilonewtons', force('kN', 1e3)],
  ['mn', force('MN', 1e6)],
  ['lbf', force('lbf', lbf_N)],
  // a pound is a force in a load's heading and a mass in a density's: the quantity decides
  ['lb lbs pound pounds', force('lb', lbf_N), mass('lb', pound_kg)],
  ['kip kips', force('kip', kip_N)],
  ['k', force('kip', kip_N), temperature('K', 1)],
  ['kgf', force('kgf', g_m_s2)],
  ['tf', force('tf', 1e3 * g_m_s2)],
  ['kg', mass('kg', 1)],
  ['t tonne tonnes', mass('t', 1e3)],
  ['pa', perArea('Pa', 1, 1)],
  ['kpa', perArea('kPa', 1e3, 1)],
  ['mpa', pressure('MPa', 1e6)],
  ['gpa', pressure('GPa', 1e9)],
  ['psi', perArea('psi', lbf_N, inch_m)],
  ['psf', perArea('psf', lbf_N, foot_m)],
  ['ksi', perArea('ksi', kip_N, inch_m)],
  ['ksf', perArea('ksf', kip_N, foot_m)],
  ['plf', perLength('plf', lbf_N, foot_m)],
  ['klf', perLength('klf', kip_N, foot_m)],
  ['pli', perLength('pli', lbf_N, inch_m)],
  [
    'pcf',
    {
      symbol: 'pcf',
      factor: pound_kg / foot_m ** 3,
      dimension: { ...none, mass: 1, length: -3 },
      force: null,
      length: null,
    },
  ],
  ['°c degc c kelvin', temperature('°C', 1)],
  ['°f degf f', temperature('°F', fahrenheit_K)],
  ['rad radian radians', angle('rad', 1)],
  ['mrad', angle('mrad', 1e-3)],
  ['deg degree degrees °', angle('deg', degree_rad)],
  ['%', plain('%', 0.01)],
];

/** Every word (lower case) with the meanings it can have. */
export const atoms: ReadonlyMap<string, readonly Atom[]> = new Map(
  table.flatMap(([words, ...meanings]) => words.split(' ').map((word) => [word, meanings] as const)),
);
