import { describe, expect, it } from 'vitest';
import { readSheets, sound, type TestCell } from '@/lib/intake/sheets-of';
import type { OfficeLimit } from '@/lib/model/office-limit';

const office: OfficeLimit[] = [
  { appliesTo: '*', measure: 'deflection', ratio: 180, source: 'IBC Table 1604.3' },
  { appliesTo: 'beam', measure: 'deflection', ratio: 360, source: '' },
  { appliesTo: 'column', measure: 'sway', ratio: 150, source: '' },
];

/** Limits of F2 (columns AB, CD, beam BC): "name measure n source". */
function limits(setup: TestCell[][], rows: TestCell[][] = []): string[] {
  const sheets = sound();
  sheets.Setup = [['setting', 'value'], ['material', 'S275'], ...setup];
  if (rows.length > 0) sheets['Limits'] = [['applies to', 'measure', 'ratio'], ...rows];
  const { frames } = readSheets(sheets, { officeLimits: office });
  return (frames[1]?.frame?.limits ?? []).map(({ name, measure, ratio, source }) => `${name} ${measure} ${ratio} ${source}`);
}

describe('the office’s limits', () => {
  it('hold where the sheets are silent, and say that they are the office’s', () => {
    expect(limits([])).toEqual([
      '* deflection 180 office (IBC Table 1604.3)',
      'beam deflection 360 office',
      'column sway 150 office',
    ]);
  });

  it('give way to whatever the sheets say for everything: a ratio in Setup, none, a row for *', () => {
    expect(limits([['deflection ratio', 250]])).toEqual(['* deflection 250 Setup B3', 'column sway 150 office']);
    expect(limits([['deflection ratio', 'none'], ['sway ratio', 'none']])).toEqual([]); // prettier-ignore
    expect(limits([], [['*', 'sway', 200]])).toContain('* sway 200 Limits row 2');
    expect(limits([], [['*', 'sway', 200]])).not.toContain('column sway 150 office');
  });

  it('give way to a row for the same role only', () => {
    expect(limits([], [['beam', 'deflection', 200]])).toEqual([
      'beam deflection 200 Limits row 2',
      '* deflection 180 office (IBC Table 1604.3)',
      'column sway 150 office',
    ]);
  });
});
