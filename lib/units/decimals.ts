import type { Quantity, System } from './quantity';

/** Further decimals that a US unit needs to say as much as its metric one: 0.1 mm is 0.004 in, 0.1 kN is 0.02 kip, 1 MPa is 0.15 ksi. */
const furtherInUs: Partial<Record<Quantity, number>> = { displacement: 2, force: 1, moment: 1, stress: 1 };

/** Decimals of a column, given as its metric figures have them, in the units that are shown. A column of whole numbers stays one. */
export function decimalsIn(units: System, quantity: Quantity, decimals: number): number {
  return units === 'us' && decimals > 0 ? decimals + (furtherInUs[quantity] ?? 0) : decimals;
}
