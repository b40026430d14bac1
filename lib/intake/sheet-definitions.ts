import type { Quantity } from '@/lib/units/quantity';

/** The sheets of the contract and their columns (sheets §3). */
export const sheetNames = [
  'Setup', 'Frames', 'Nodes', 'Members', 'Sections', 'Materials', 'Supports', 'Load cases', 'Node loads', 'Member loads',
  'Settlements', 'Combinations', 'Limits', 'Families', 'Variants',
] as const; // prettier-ignore
export type SheetName = (typeof sheetNames)[number];

/** `load` = the value of a member load, whose powers of force and length its row fixes; null = text. */
export type ColumnQuantity = Quantity | 'load' | null;

export interface SheetDefinition {
  /** `Changes` is a sheet of its own errand, and none of a batch. */
  readonly name: SheetName | 'Changes';
  readonly columns: ReadonlyMap<string, ColumnQuantity>;
  /** Each entry: a column, or columns of which one is enough. */
  readonly required: readonly (readonly string[])[];
}

const define = (
  name: SheetName,
  required: readonly (string | readonly string[])[],
  columns: Record<string, ColumnQuantity>,
): SheetDefinition => ({
  name,
  columns: new Map([...Object.entries(columns), ['when', null]]),
  required: required.map((each) => (typeof each === 'string' ? [each] : each)),
});

const definitions: readonly SheetDefinition[] = [
  define('Setup', ['setting', 'value'], { setting: null, value: 'number' }),
  define('Frames', ['frame'], {
    frame: null, title: null, group: null, count: 'number', spacing: 'length', run: null, note: null,
  }), // prettier-ignore
  define('Nodes', ['frame', 'node', 'x', 'y'], { frame: null, node: null, x: 'length', y: 'length', place: null }),
  define('Members', ['frame', 'member', 'start', 'end', 'section'], {
    frame: null, member: null, start: null, end: null, section: null, material: null, role: null,
    'start joint': 'springRotation', 'end joint': 'springRotation', 'axial only': null, 'tension only': null, turned: null,
    span: null, 'length major': 'length', 'length minor': 'length', 'length LTB': 'length', 'length LTB top': 'length',
    'length LTB bottom': 'length', group: null, 'end section': null, offset: null,
  }), // prettier-ignore
  define('Sections', ['section'], {
    section: null, designation: null, shape: null, h: 'dimension', b: 'dimension', tw: 'dimension', tf: 'dimension',
    r: 'dimension', t: 'dimension', d: 'dimension', A: 'area', I: 'secondMoment', W: 'modulus', 'W top': 'modulus',
    'W bottom': 'modulus', depth: 'dimension', Av: 'area', Wpl: 'modulus', 'I minor': 'secondMoment', 'W minor': 'modulus',
    'Wpl minor': 'modulus', It: 'secondMoment', Iw: 'warping', material: null, published: null, source: null,
  }), // prettier-ignore
  define('Materials', ['material', ['grade', 'E']], {
    material: null, grade: null, E: 'stress', fy: 'stress', fu: 'stress', density: 'density', expansion: 'expansion', G: 'stress',
    'fy by thickness': null, source: null,
  }), // prettier-ignore
  define('Supports', ['frame', 'node'], {
    frame: null, node: null, ux: 'springTranslation', uy: 'springTranslation', rz: 'springRotation', angle: 'angle',
    'pushes only': null,
  }), // prettier-ignore
  define('Load cases', ['case'], {
    case: null, kind: null, 'self weight': 'number', alternative: null, reversible: null, note: null, frame: null,
  }), // prettier-ignore
  define('Node loads', ['frame', 'case', 'node', ['Fx', 'Fy', 'Mz']], {
    frame: null, case: null, node: null, Fx: 'force', Fy: 'force', Mz: 'moment',
  }), // prettier-ignore
  define('Member loads', ['frame', 'case', 'member', 'load'], {
    frame: null, case: null, member: null, load: null, axes: null, direction: null, value: 'load', 'end value': 'load',
    from: 'length', to: 'length', width: 'length', dT: 'temperature', 'dT across': 'temperature',
  }), // prettier-ignore
  define('Settlements', ['frame', 'case', 'node', ['dx', 'dy', 'rz']], {
    frame: null, case: null, node: null, dx: 'displacement', dy: 'displacement', rz: 'rotation',
  }), // prettier-ignore
  define('Combinations', ['combination', 'purpose'], {
    combination: null, purpose: null, case: null, factor: 'number', frame: null,
  }), // prettier-ignore
  define('Limits', ['applies to', 'measure'], {
    'applies to': null, measure: null, direction: null, 'to node': null, ratio: 'number', absolute: 'displacement',
    combination: null, frame: null,
  }), // prettier-ignore
  define('Families', ['family', 'parameter', 'quantity'], {
    family: null, parameter: null, quantity: null, unit: null, default: null, min: null, max: null, choices: null, note: null,
  }), // prettier-ignore
  define('Variants', ['frame', 'family'], { frame: null, family: null }),
];

export const sheetDefinitions: ReadonlyMap<SheetName, SheetDefinition> = new Map(
  sheetNames.flatMap((name) => definitions.filter((each) => each.name === name).map((each) => [name, each] as const)),
);

/** Sheets with columns of the file's own: parameters in Variants, cases in wide Combinations. */
export const openEnded: ReadonlySet<string> = new Set(['Variants', 'Combinations']);
