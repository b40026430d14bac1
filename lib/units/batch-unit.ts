import { factorFor, parseUnit, type Unit } from '@/lib/units/parse-unit';
import { quantities, type Quantity, type System } from '@/lib/units/quantity';

const written: Readonly<Record<Quantity, readonly [metric: string, us: string]>> = {
  length: ['m', 'ft'],
  dimension: ['mm', 'in'],
  displacement: ['mm', 'in'],
  area: ['cm²', 'in²'],
  secondMoment: ['cm⁴', 'in⁴'],
  modulus: ['cm³', 'in³'],
  warping: ['cm⁶', 'in⁶'],
  force: ['kN', 'kip'],
  moment: ['kN·m', 'kip·ft'],
  lineLoad: ['kN/m', 'kip/ft'],
  areaLoad: ['kN/m²', 'psf'],
  stress: ['MPa', 'ksi'],
  density: ['kg/m³', 'lb/ft³'],
  temperature: ['°C', '°F'],
  expansion: ['1/°C', '1/°F'],
  springTranslation: ['kN/m', 'kip/in'],
  springRotation: ['kN·m/rad', 'kip·in/rad'],
  angle: ['deg', 'deg'],
  rotation: ['rad', 'rad'],
  number: ['-', '-'],
  mass: ['kg', 'lb'],
};

const build = (index: 0 | 1): Readonly<Record<Quantity, { unit: Unit; factor: number }>> => {
  const entries = quantities.map((quantity) => {
    const unit = parseUnit(written[quantity][index]);
    const factor = unit && factorFor(unit, quantity);
    if (!unit || factor === null) throw new RangeError(`Expected a unit for ${quantity}, got ${written[quantity][index]}`);
    return [quantity, { unit, factor }] as const;
  });
  return Object.fromEntries(entries) as Record<Quantity, { unit: Unit; factor: number }>;
};

const units = { metric: build(0), us: build(1) };

/** The unit of a quantity where neither its heading nor a unit row says one (the table of sheets §2). */
export function batchUnit(quantity: Quantity, system: System): Unit {
  return units[system][quantity].unit;
}

/** The unit as printed under a heading: `kN·m`, `cm²`, `1/°C`; '' for a plain number. */
export function unitLabel(quantity: Quantity, system: System): string {
  return quantity === 'number' ? '' : written[quantity][system === 'metric' ? 0 : 1];
}

/** value × factor, by division where the factor is 1/10ⁿ: 35 mm is 0.035 m and not 0.035000000000000003. */
export function scaled(value: number, factor: number): number {
  const inverse = Math.round(1 / factor);
  return factor < 1 && Math.abs(inverse * factor - 1) < 1e-14 ? value / inverse : value * factor;
}

/** A number in the batch's unit of this quantity → SI. */
export function toSI(value: number, quantity: Quantity, system: System): number {
  return scaled(value, units[system][quantity].factor);
}

/** SI → the batch's unit. */
export function fromSI(value: number, quantity: Quantity, system: System): number {
  const { factor } = units[system][quantity];
  const inverse = Math.round(1 / factor);
  return factor < 1 && Math.abs(inverse * factor - 1) < 1e-14 ? value * inverse : value / factor;
}
