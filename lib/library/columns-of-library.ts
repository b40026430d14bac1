/** What the section library shows, sorts, filters and exports of a section; values are SI and derived from nominal dimensions. */
import type { Section } from '@/lib/model/frame';
import { fromSI, toSI, unitLabel } from '@/lib/units/batch-unit';
import { foot_m, pound_kg } from '@/lib/units/constants';
import type { Quantity, System } from '@/lib/units/quantity';

/** The density that EN 1991-1-1 (annex A) and the product standards give steel with; its mass per metre goes with it. */
const steelDensity_kg_m3 = 7850;

type LibraryQuantity = Quantity | 'massPerLength';

export interface LibraryColumn {
  readonly key: string;
  /** Over the column: "I". */
  readonly label: string;
  /** In a sentence and in the list of one section's properties. */
  readonly what: string;
  readonly quantity: LibraryQuantity;
  /** SI; null = not available: no closed form, or the shape has none. */
  readonly value: (section: Section) => number | null;
}

const column = (
  key: string,
  label: string,
  what: string,
  quantity: LibraryQuantity,
  value: LibraryColumn['value'],
): LibraryColumn => ({ key, label, what, quantity, value });

export const columnsOfLibrary: readonly LibraryColumn[] = [
  column('mass', 'Mass', 'mass per length', 'massPerLength', ({ properties }) => properties.A_m2 * steelDensity_kg_m3),
  column('depth', 'Depth', 'depth', 'dimension', ({ properties }) => properties.depth_m),
  column('width', 'Width', 'width', 'dimension', ({ properties }) => properties.width_m),
  column('A', 'A', 'area', 'area', ({ properties }) => properties.A_m2),
  column('I', 'I', 'second moment, major axis', 'secondMoment', ({ properties }) => properties.I_m4),
  column('W', 'W', 'elastic modulus, major axis', 'modulus', ({ properties }) => properties.Wtop_m3),
  column('Wpl', 'W pl', 'plastic modulus, major axis', 'modulus', ({ properties }) => properties.Wpl_m3),
  column('Iminor', 'I minor', 'second moment, minor axis', 'secondMoment', ({ properties }) => properties.Iminor_m4),
  column('Wminor', 'W minor', 'smaller elastic modulus, minor axis', 'modulus', ({ properties }) => properties.Wminor_m3),
  column('WplMinor', 'W pl minor', 'plastic modulus, minor axis', 'modulus', ({ properties }) => properties.WplMinor_m3),
  column('It', 'I t', 'torsion constant', 'secondMoment', ({ properties }) => properties.It_m4),
  column('Iw', 'I w', 'warping constant', 'warping', ({ properties }) => properties.Iw_m6),
  column('Av', 'A v', 'shear area along the depth, elastic peak', 'area', ({ properties }) => properties.AvPeak_m2),
  column('t', 't', 'thickest part, for yield by thickness', 'dimension', ({ properties }) => properties.t_m),
];

const byKey = new Map(columnsOfLibrary.map((one) => [one.key, one]));
export const libraryColumn = (key: string): LibraryColumn | undefined => byKey.get(key);

/** Columns that a view may be bounded by: at least, at most. */
export const boundedKeys = ['mass', 'depth', 'A', 'I', 'W'] as const;

const pound_ft = pound_kg / foot_m;

/** SI → the unit shown (`libraryUnit`). */
export function libraryNumber(si: number, quantity: LibraryQuantity, system: System): number {
  if (quantity !== 'massPerLength') return fromSI(si, quantity, system);
  return system === 'metric' ? si : si / pound_ft;
}

/** The unit shown → SI. */
export function libraryToSI(value: number, quantity: LibraryQuantity, system: System): number {
  if (quantity !== 'massPerLength') return toSI(value, quantity, system);
  return system === 'metric' ? value : value * pound_ft;
}

export function libraryUnit(quantity: LibraryQuantity, system: System): string {
  if (quantity !== 'massPerLength') return unitLabel(quantity, system);
  return system === 'metric' ? 'kg/m' : 'lb/ft';
}
