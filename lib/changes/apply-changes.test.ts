import { describe, expect, it } from 'vitest';
import { applyChanges } from '@/lib/changes/apply-changes';
import type { Change } from '@/lib/changes/change';
import type { InputRow } from '@/lib/intake/intake';
import { readRows } from '@/lib/intake/rows/read-rows';
import { readSheets, sound, type TestSheets } from '@/lib/intake/sheets-of';
import type { SettingName } from '@/lib/model/settings';

const identity = { name: 'batch.xlsx', sha256: '0'.repeat(64), files: [] };
const set = (setting: SettingName, value: string): Change => ({ kind: 'setting', setting, value });

function changed(sheets: TestSheets, changes: readonly Change[], csv = false) {
  const before = readSheets(sheets, { csv });
  const after = applyChanges(before, changes, 'Ana Lyst');
  return { before, after, read: readRows({ ...after, identity, problems: [] }) };
}
const setupRows = (rows: readonly InputRow[]) => rows.filter((row) => row.sheet === 'Setup').map((row) => row.cells);

describe('a setting chosen on screen', () => {
  it('takes the place of the value in its row of Setup, and says who chose it', () => {
    const { after, read, before } = changed(sound(), [set('deflectionRatio', '300')]);
    expect(setupRows(after.rows)).toEqual([
      ['setting', 'value'],
      ['material', 'S275'],
      ['deflection ratio', '300'],
      ['sway ratio', 'none'],
    ]);
    expect(read.settings).toEqual({ ...before.settings, deflectionRatio: 300 });
    expect(read.origins.deflectionRatio).toEqual({ source: 'sheet', cell: 'Setup B3', changedBy: 'Ana Lyst' });
    expect(read.origins.swayRatio).toEqual(before.origins.swayRatio);
    expect(read.problems).toEqual(before.problems);
  });

  it('comes into a new last row where Setup is silent about it', () => {
    const { after, read, before } = changed(sound(), [set('nearLimit', '0,85')]);
    expect(setupRows(after.rows).at(-1)).toEqual(['near limit', '0.85']);
    expect(read.settings).toEqual({ ...before.settings, nearLimit: 0.85 });
    expect(read.origins.nearLimit).toEqual({ source: 'sheet', cell: 'Setup B5', changedBy: 'Ana Lyst' });
  });

  it('leaves every row that is not of Setup the very same', () => {
    const { before, after } = changed(sound(), [set('stability', 'by others')]);
    const others = (rows: readonly InputRow[]) => rows.filter((row) => row.sheet !== 'Setup');
    expect(others(after.rows).every((row, i) => row === others(before.rows)[i])).toBe(true);
    expect(others(after.rows)).toHaveLength(others(before.rows).length);
  });

  it('brings a Setup sheet where there is none', () => {
    const { Setup: _, ...without } = sound();
    without['Sections'] = [
      ['section', 'designation', 'material'],
      ['IPE 300', 'IPE 300', 'S275'],
      ['HE 200 A', 'HE 200 A', 'S275'],
    ];
    const { before, after, read } = changed(without, [set('stressFactor', '0.9'), set('stability', 'by others')]);
    expect(setupRows(after.rows)).toEqual([
      ['setting', 'value'],
      ['stress factor', '0.9'],
      ['stability', 'by others'],
    ]);
    expect(after.sheets.at(-1)).toMatchObject({ name: 'Setup', file: 'batch.xlsx' });
    expect(read.settings).toEqual({ ...before.settings, stressFactor: 0.9, stability: 'by others' });
    expect(read.frames.every(({ frame }) => frame !== null)).toBe(true);
  });

  it('is read in text files too, whatever their decimal mark', () => {
    const sheets = sound();
    sheets.Nodes[2] = ['F1', 'B', '6,0', 0, 'tip'];
    const { after, read } = changed(sheets, [set('stressFactor', '0.66')], true);
    expect(after.rows.filter((row) => row.changedBy)).toHaveLength(1);
    expect(read.settings.stressFactor).toBe(0.66);
  });

  it('is written wherever Setup names it, so that its rows agree', () => {
    const sheets = sound();
    sheets.Setup.push(['Deflection-Ratio', 200]);
    const { before, read } = changed(sheets, [set('deflectionRatio', 'none')]);
    expect(before.problems.map(({ code }) => code)).toContain('conflicting-row');
    expect(read.problems.map(({ code }) => code)).not.toContain('conflicting-row');
    expect(read.settings.deflectionRatio).toBe('none');
  });

  it('passes by comments, titles and whatever else is no row of data', () => {
    const sheets = sound();
    sheets.Setup = [
      ['The office’s usual'],
      [null, 'value', 'setting'],
      [null, '# 100', '# sway ratio'],
      [null, 'S275', 'material'],
    ];
    const { after, read } = changed(sheets, [set('swayRatio', 'h/150')]);
    expect(setupRows(after.rows).at(-1)).toEqual([null, '150', 'sway ratio']);
    expect(read.settings.swayRatio).toBe(150);
  });

  it('parts merged cells, the others keeping their value', () => {
    const sheets = sound();
    sheets.Setup.push(['near limit', 0.8], ['stress factor', { merged: 'B5', value: 0.8 }]);
    const { read } = changed(sheets, [set('nearLimit', '0.9')]);
    expect(read.settings).toMatchObject({ nearLimit: 0.9, stressFactor: 0.8 });
    expect(read.problems.map(({ code }) => code)).not.toContain('derived');
  });

  it('may be changed again', () => {
    const once = changed(sound(), [set('nearLimit', '0.8')]);
    const twice = applyChanges(once.after, [set('nearLimit', '0.7')], 'Ben Eak');
    const { origins, settings } = readRows({ ...twice, identity, problems: [] });
    expect([settings.nearLimit, origins.nearLimit.changedBy]).toEqual([0.7, 'Ben Eak']);
    expect(twice.rows).toHaveLength(once.after.rows.length);
  });

  it('that its sheet would refuse is a caller’s mistake', () => {
    const { before } = changed(sound(), []);
    expect(() => applyChanges(before, [set('nearLimit', '2')], 'Ana Lyst')).toThrow(RangeError);
  });
});
