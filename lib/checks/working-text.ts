import type { WorkingPart } from './working-parts';

/** A line of calculation as one line of text: `N_b,Rd = (χ A f_y) / γ_M1 = (0.61 · 53.8 cm² · 355 MPa) / 1.0 = 1,165 kN`. */
export function textOf(parts: readonly WorkingPart[]): string {
  let line = '';
  for (const part of parts) {
    const next = one(part);
    const tight = line === '' || line.endsWith('(') || /^[,;:)²³]/.test(next);
    line += tight ? next : ` ${next}`;
  }
  return line;
}

function one(part: WorkingPart): string {
  switch (part.kind) {
    case 'text':
      return part.text;
    case 'symbol':
      return `${part.symbol}${part.sub ? `_${part.sub}` : ''}${part.sup ? power(part.sup) : ''}`;
    case 'number':
    case 'result':
      return part.unit ? `${part.text} ${part.unit}` : part.text;
    case 'fraction':
      return `${bracketed(part.over)} / ${bracketed(part.under)}`;
    case 'root':
      return `√${part.of.length === 1 && part.of[0]?.kind === 'symbol' ? one(part.of[0]) : `(${textOf(part.of)})`}`;
  }
}

const power = (sup: string): string => (sup === '2' ? '²' : sup === '3' ? '³' : `^${sup}`);
const bracketed = (parts: readonly WorkingPart[]): string =>
  parts.length === 1 && parts[0]?.kind !== 'fraction' ? textOf(parts) : `(${textOf(parts)})`;
