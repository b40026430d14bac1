import { KSI, type Steps } from '@/lib/materials/grades';

const step = /^([\d.]+)\s*(mpa|n\/mm2|n\/mm²|ksi)\s*(?:up\s*to|to|≤|<=)\s*([\d.]+)\s*(mm|in)$/i;

/**
 * Yield strength by thickness as it is typed in one cell: `355 MPa to 16 mm; 345 MPa to 40 mm`, thinnest first, each with its
 * units. Above the last thickness there is none.
 *
 * @returns null where the text is anything else, a thickness does not grow or a strength is not above zero
 */
export function readYieldSteps(text: string): Steps | null {
  const steps: [number, number][] = [];
  for (const piece of text
    .split(';')
    .map((each) => each.trim())
    .filter((each) => each !== '')) {
    const [, strength = '', unit = '', thickness = '', length = ''] = step.exec(piece) ?? [];
    const MPa = Number(strength) * (unit.toLowerCase() === 'ksi' ? KSI : 1);
    const upTo = Number(thickness) * (length.toLowerCase() === 'in' ? 25.4 : 1);
    const grows = upTo > (steps.at(-1)?.[0] ?? 0);
    if (strength === '' || !(MPa > 0) || !Number.isFinite(MPa) || !Number.isFinite(upTo) || !grows) return null;
    steps.push([upTo, MPa]);
  }
  return steps.length === 0 ? null : steps;
}
