/**
 * Depot sheds as variants of the built-in portal family. The rafters' and columns' sections step up with span
 * and load, as an office's catalogue would; restraints stand close enough that buckling is negligible in most
 * frames, so that they come out within, near or over rather than not checked.
 */
import type { SampleCell, SampleSheet } from './write';

const setup: SampleSheet = {
  name: 'Setup',
  rows: [
    ['setting', 'value'],
    ['title', 'Tarnwick depots, portal sheds'],
    ['units', 'metric'],
    ['material', 'S275'],
    ['stress factor', 0.6],
    ['near limit', 0.9],
    ['deflection ratio', 250],
    ['sway ratio', 200],
  ],
};

const combinations: SampleSheet = {
  name: 'Combinations',
  rows: [
    ['combination', 'purpose', 'dead', 'snow', 'live', 'wind', 'wind 2', 'inside'],
    ['C1', 'strength', 1, 1, null, null, null, null],
    ['C2', 'strength', 1, null, 1, null, null, null],
    ['C3', 'strength', 1, null, null, 1, null, 1],
    ['C4', 'strength', 1, null, null, null, 1, -1],
    ['C5', 'strength', 1, 0.75, null, 0.75, null, null],
    ['S1', 'service', 1, 1, null, null, null, null],
    ['S2', 'service', 1, null, null, 1, null, null],
    ['S3', 'service', 1, 0.5, null, 0.5, null, null],
  ],
};

const limits: SampleSheet = {
  name: 'Limits',
  rows: [
    ['applies to', 'measure', 'direction', 'absolute', 'ratio'],
    ['apex', 'displacement', 'y', 75, null],
  ],
};

const families = ['IPE 270', 'IPE 300', 'IPE 330', 'IPE 360', 'IPE 400', 'IPE 450', 'IPE 500', 'IPE 550', 'IPE 600'];
const columns = [
  'HE 200 A',
  'HE 220 A',
  'HE 240 A',
  'HE 260 A',
  'HE 280 A',
  'HE 300 A',
  'HE 320 A',
  'HE 360 A',
  'HE 400 A',
  'HE 450 A',
];

const headings = [
  'frame', 'family', 'span [m]', 'eaves [m]', 'rise [m]', 'spacing [m]', 'column', 'rafter', 'base', 'wall dead [kN/m2]',
  'dead [kN/m2]', 'live [kN/m2]', 'snow [kN/m2]', 'wind left wall [kN/m2]', 'wind left roof [kN/m2]', 'wind right roof [kN/m2]',
  'wind right wall [kN/m2]', 'wind 2 left wall [kN/m2]', 'wind 2 left roof [kN/m2]', 'wind 2 right roof [kN/m2]',
  'wind 2 right wall [kN/m2]', 'column restraint [m]', 'rafter restraint top [m]', 'rafter restraint bottom [m]',
  'pressure inside [kN/m2]',
]; // prettier-ignore

const round = (value: number, digits: number): number => Number(value.toFixed(digits));

/** Depots of twenty sheds each: spans grow within a depot, snow and wind differ between depots. */
function variant(depot: number, shed: number, base: 'fixed' | 'pinned' = 'fixed'): SampleCell[] {
  const span = 10 + shed * 0.5;
  const eaves = [4.2, 4.8, 5.4, 4.5, 5.0, 6.0][depot % 6] ?? 5;
  const rise = round((span / 2) * Math.tan(((6 + (depot % 4)) * Math.PI) / 180), 3);
  const spacing = [5, 6, 5.5][depot % 3] ?? 5;
  const snow = [0.6, 0.75, 0.9, 0.6, 1.0][depot % 5] ?? 0.6;
  const pressure = [0.45, 0.5, 0.6, 0.55][depot % 4] ?? 0.5;
  // Line load on plan × span² is what an eaves moment goes with; the catalogue steps at fixed values of it.
  const demand = (snow + 0.4) * spacing * span * span;
  const thresholds = [725, 1060, 1470, 1975, 2660, 3620, 4930, 6300];
  const step = thresholds.filter((each) => demand > each).length;
  const rafter = families[Math.min(step, families.length - 1)] ?? 'IPE 600';
  const column = columns[Math.min(step + (eaves > 5 ? 1 : 0), columns.length - 1)] ?? 'HE 450 A';
  // One depot's widest sheds lack the stays of the inner flange: their rafters come out not checked.
  const bottom = depot % 12 === 6 && shed > 15 ? 3 : 1;
  return [
    `T${String(depot + 1).padStart(2, '0')}-${String(shed + 1).padStart(2, '0')}`, 'portal', span, eaves, rise, spacing, column, rafter,
    base, 0.15, 0.25, 0.6, snow, round(0.7 * pressure, 3), round(-0.5 * pressure, 3), round(-0.4 * pressure, 3),
    round(-0.3 * pressure, 3), round(-0.3 * pressure, 3), round(-0.4 * pressure, 3), round(-0.5 * pressure, 3),
    round(0.7 * pressure, 3), 1, 1, bottom, 0.15,
  ]; // prettier-ignore
}

/**
 * Two dozen sheds on pinned bases, soft enough for second order: each combination on its deformed shape, strength leaning
 * both ways, members that shear.
 */
export function slenderSheds(): SampleSheet[] {
  const more: SampleCell[][] = [['analysis', 'second order'], ['imperfections', 'EN 1993-1-1'], ['shear deformation', 'yes']]; // prettier-ignore
  const rows = setup.rows.map((row) => (row[0] === 'title' ? ['title', 'Tarnwick depots, sheds on pinned bases'] : row));
  const lighter = (list: readonly string[], section: SampleCell, by: number): string =>
    list[Math.max(0, list.indexOf(String(section)) - by)] ?? '';
  const picked = Array.from({ length: 24 }, (_, i) => {
    const row = variant(i % 4, 2 + Math.floor(i / 2), 'pinned');
    row[3] = round(1.3 * Number(row[3]), 2);
    row[6] = lighter(columns, row[6] ?? '', 2);
    row[7] = lighter(families, row[7] ?? '', 1);
    return row;
  });
  const softer = { ...limits, rows: [limits.rows[0] ?? [], ['apex', 'displacement', 'y', 110, null]] };
  const limit = setup.rows.findIndex((row) => row[0] === 'sway ratio');
  rows[limit] = ['sway ratio', 70];
  return [{ ...setup, rows: [...rows, ...more] }, { name: 'Variants', rows: [headings, ...picked] }, combinations, softer];
}

/** @param depots 12 depots make the sample of 240, 50 the batch of 1,000 */
export function portalSheds(depots: number): SampleSheet[] {
  const rows: SampleCell[][] = [headings];
  for (let depot = 0; depot < depots; depot += 1) for (let shed = 0; shed < 20; shed += 1) rows.push(variant(depot, shed));
  const groups: SampleCell[][] = [['frame', 'group', 'count']];
  for (const row of rows.slice(1)) groups.push([row[0] ?? '', `site ${String(row[0]).slice(0, 3)}`, 2]);
  return [setup, { name: 'Frames', rows: groups }, { name: 'Variants', rows }, combinations, limits];
}
