/** The built-in families in the form in which an office would write its own: under another name, with a few variants. */
import { builtInDescriptions } from '@/lib/intake/families/built-in';
import type { SampleCell, SampleSheet } from './write';

const variants: Readonly<Record<string, readonly (readonly SampleCell[])[]>> = {
  portal: [
    ['frame', 'family', 'span [m]', 'eaves [m]', 'rise [m]', 'spacing [m]', 'column', 'rafter', 'material', 'base', 'dead [kN/m2]', 'snow [kN/m2]', 'column restraint [m]', 'rafter restraint top [m]', 'rafter restraint bottom [m]'],
    ['S1', 'portal', 12, 4.5, 1, 5, 'HE 220 A', 'IPE 300', 'S275', 'fixed', 0.3, 0.6, 1, 1, 1],
    ['S2', 'portal', 14, 4.5, 1.2, 5, 'HE 240 A', 'IPE 330', 'S275', 'fixed', 0.3, 0.6, 1, 1, 1],
  ],
  bracket: [
    ['frame', 'family', 'reach [m]', 'rise [m]', 'drop [m]', 'strut at', 'arm', 'strut', 'material', 'tip Fy [kN]', 'line load [kN/m]', 'arm restraint [m]'],
    ['K1', 'bracket', 1.2, 0, 0.9, 0.75, 'IPE 140', 'HE 100 A', 'S275', -6, 0.5, 0.4],
    ['K2', 'bracket', 1.4, 0, 0, 0, 'IPE 160', 'HE 100 A', 'S275', -4, 0.5, 0.4],
  ],
}; // prettier-ignore

const combinations: SampleSheet = {
  name: 'Combinations',
  rows: [
    ['combination', 'purpose', 'case', 'factor'],
    ['C1', 'strength', 'dead', 1],
    ['S1', 'service', 'dead', 1],
  ],
};
const setup: SampleSheet = {
  name: 'Setup',
  rows: [
    ['setting', 'value'],
    ['deflection ratio', 200],
    ['sway ratio', 150],
  ],
};

/** Workbooks by built-in family. The family is called "own NAME", since the built-in one has its name already. */
export function familySamples(): [string, SampleSheet[]][] {
  return builtInDescriptions.map(({ name, sheets }) => {
    const own = (cell: SampleCell): SampleCell => (cell === name ? `own ${name}` : cell);
    const described = Object.entries(sheets).map(([sheet, rows]) => ({ name: sheet, rows: rows.map((row) => row.map(own)) }));
    const rows = (variants[name] ?? []).map((row) => row.map(own));
    return [name, [setup, ...described, { name: 'Variants', rows }, combinations]];
  });
}
