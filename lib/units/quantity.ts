/** Quantities that cells, screens and files carry, and the unit each has when nothing else is said (sheets §2). */

export const quantities = [
  'length', 'dimension', 'displacement', 'area', 'secondMoment', 'modulus', 'warping', 'force', 'moment', 'lineLoad',
  'areaLoad', 'stress', 'density', 'temperature', 'expansion', 'springTranslation', 'springRotation', 'angle', 'rotation',
  'number', 'mass',
] as const; // prettier-ignore
export type Quantity = (typeof quantities)[number];

export type System = 'metric' | 'us';

/** Powers of force, mass, length, temperature difference and angle. */
export interface Dimension {
  readonly force: number;
  readonly mass: number;
  readonly length: number;
  readonly temperature: number;
  readonly angle: number;
}

const dim = (force: number, mass: number, length: number, temperature = 0, angle = 0): Dimension => ({
  force,
  mass,
  length,
  temperature,
  angle,
});

/** What a unit must be made of to fit each quantity. */
export const dimensionOf: Readonly<Record<Quantity, Dimension>> = {
  length: dim(0, 0, 1),
  dimension: dim(0, 0, 1),
  displacement: dim(0, 0, 1),
  area: dim(0, 0, 2),
  secondMoment: dim(0, 0, 4),
  modulus: dim(0, 0, 3),
  warping: dim(0, 0, 6),
  force: dim(1, 0, 0),
  moment: dim(1, 0, 1),
  lineLoad: dim(1, 0, -1),
  areaLoad: dim(1, 0, -2),
  stress: dim(1, 0, -2),
  density: dim(0, 1, -3),
  temperature: dim(0, 0, 0, 1),
  expansion: dim(0, 0, 0, -1),
  springTranslation: dim(1, 0, -1),
  springRotation: dim(1, 0, 1, 0, -1),
  angle: dim(0, 0, 0, 0, 1),
  rotation: dim(0, 0, 0, 0, 1),
  number: dim(0, 0, 0),
  mass: dim(0, 1, 0),
};

/** A quantity's name in a sentence: "a spring stiffness". */
export const quantityWords: Readonly<Record<Quantity, string>> = {
  length: 'a length',
  dimension: 'a section dimension',
  displacement: 'a displacement',
  area: 'an area',
  secondMoment: 'a second moment of area',
  modulus: 'a section modulus',
  warping: 'a warping constant',
  force: 'a force',
  moment: 'a moment',
  lineLoad: 'a line load',
  areaLoad: 'an area load',
  stress: 'a stress',
  density: 'a density',
  temperature: 'a temperature change',
  expansion: 'a coefficient of expansion',
  springTranslation: 'a spring stiffness',
  springRotation: 'a rotational spring stiffness',
  angle: 'an angle',
  rotation: 'a rotation',
  number: 'a plain number',
  mass: 'a mass',
};

export function sameDimension(a: Dimension, b: Dimension): boolean {
  return (
    a.force === b.force && a.mass === b.mass && a.length === b.length && a.temperature === b.temperature && a.angle === b.angle
  );
}
