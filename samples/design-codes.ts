/** The sheds and the halls again, checked clause by clause by a design code under factored loads. */
import { directAnalysis } from './direct-analysis';
import { slenderSheds } from './portal-sheds';
import type { SampleCell, SampleSheet } from './write';

/** Sheets with rows of Setup replaced or added, and other combinations. */
function under(
  sheets: readonly SampleSheet[],
  settings: readonly (readonly [string, SampleCell])[],
  combinations: SampleSheet['rows'],
): SampleSheet[] {
  const said = new Map(settings.map(([name, value]) => [name.toLowerCase(), value]));
  return sheets.map((sheet) => {
    if (sheet.name === 'Combinations') return { ...sheet, rows: combinations };
    if (sheet.name !== 'Setup') return sheet;
    const kept = sheet.rows.filter((row) => !said.has(String(row[0]).toLowerCase()) && row[0] !== 'stress factor');
    return { ...sheet, rows: [...kept, ...settings] };
  });
}

/** Sheds on pinned bases by EN 1993-1-1: second order, leaning both ways; members that shear. */
export const codeSheds = (): SampleSheet[] =>
  under(
    slenderSheds(),
    [
      ['title', 'Tarnwick depots, sheds by EN 1993-1-1'],
      ['strength check', 'EN 1993-1-1'],
      ['gamma M0', 1],
      ['gamma M1', 1],
      ['national annex', 'none, recommended values'],
      ['interaction', 'Annex B'],
      ['load height', 'shear centre'],
    ],
    [
      ['combination', 'purpose', 'dead', 'snow', 'live', 'wind', 'wind 2', 'inside'],
      ['1.35 dead + 1.5 snow', 'strength', 1.35, 1.5, null, null, null, null],
      ['1.35 dead + 1.5 live', 'strength', 1.35, null, 1.5, null, null, null],
      ['1.35 dead + 1.5 snow + 0.9 wind', 'strength', 1.35, 1.5, null, 0.9, null, null],
      ['1.35 dead + 0.75 snow + 1.5 wind', 'strength', 1.35, 0.75, null, 1.5, null, null],
      ['1.0 dead + 1.5 wind 2 − 1.5 inside', 'strength', 1, null, null, null, 1.5, -1.5],
      ['dead + snow', 'service', 1, 1, null, null, null, null],
      ['dead + wind', 'service', 1, null, null, 1, null, null],
    ],
  );

/** Halls with leaning columns by AISC 360-22 LRFD and the direct analysis method. */
export const codeHalls = (): SampleSheet[] =>
  under(
    directAnalysis(),
    [
      ['title', 'Fennmoor halls, frames by AISC 360-22 LRFD'],
      ['strength check', 'AISC 360-22 LRFD'],
    ],
    [
      ['Combination', 'Purpose', 'dead', 'roof live', 'wind'],
      ['1.4D', 'strength', 1.4, null, null],
      ['1.2D+1.6Lr', 'strength', 1.2, 1.6, '±0.5'],
      ['1.2D+1.0W', 'strength', 1.2, 0.5, '±1'],
      ['0.9D+1.0W', 'strength', 0.9, null, '±1'],
      ['service D+L', 'service', 1, 1, null],
      ['service D+W', 'service', 1, null, 0.5],
    ],
  );
