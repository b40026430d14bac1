import { describe, expect, it, test } from 'vitest';
import { lines, readSheets, sound, type TestCell, type TestSheets, withCells } from '@/lib/intake/sheets-of';

const good = (sheets: TestSheets): string[] => readSheets(sheets).frames.flatMap((f) => (f.frame ? [f.id] : []));

/** [what, changes to sound sheets, every problem there then is, frames that still run]. */
type Case = [string, Record<string, TestCell | TestCell[]>, string[], string[]];

const F1 = ['F1'];
const F2 = ['F2'];
const both = ['F1', 'F2'];

const cases: Case[] = [
  ['a blank frame cell is not filled down', { 'Nodes!A3': null, 'Members!D2': 'A' }, ['error missing-id Nodes!A3 –', 'error zero-length Members!D2 F1', 'error unknown-node Supports!B3 F1'], F2],
  ['a member without an id', { 'Members!B3': null }, ['error missing-id Members!B3 F2'], F1],
  ['a node given twice with other coordinates', { 'Nodes+': ['F2', 'b', 1, 4, null] }, ['error duplicate-id Nodes!B8 F2'], F1],
  ['a node given twice with the same', { 'Nodes+': ['F2', 'B', 0, 4, 'eaves'] }, ['warning duplicate-id Nodes!B8 F2'], both],
  ['a support given twice with other fixity', { 'Supports+': ['F1', 'A', 'fixed', 'fixed', 'free'] }, ['error conflicting-row Supports!B6 F1'], F2],
  ['a support given twice with the same', { 'Supports+': ['F1', 'A', 'fixed', 'fixed', 'fixed'] }, ['warning repeated-row Supports!B6 F1'], both],
  ['an end that is no node', { 'Members!D3': 'Z' }, ['error unknown-node Members!D3 F2', 'warning crossing Members!B4 F2'].slice(0, 1), F1],
  ['a load on no member', { 'Member loads!C3': 'XY' }, ['error unknown-member Member loads!C3 F2'], F1],
  ['a section that is nowhere', { 'Members!E2': 'IPE 999' }, ['error unknown-section Members!E2 F1'], F2],
  ['a material that is nowhere', { 'Members!G1': 'material', 'Members!G2': 'S999' }, ['error unknown-material Members!G2 F1'], F2],
  ['a case that is not in Load cases', { 'Member loads!B2': 'daed' }, ['error unknown-case Member loads!B2 F1'], F2],
  ['a unit that is none', { 'Nodes!C1': 'x [furlong]' }, ['error unknown-unit Nodes!C1 F1,F2'], []],
  ['a unit of the wrong kind', { 'Node loads!D1': 'Fx [m]' }, ['error wrong-unit-kind Node loads!D1 F2'], F1],
  ['a role that is none', { 'Members!F2': 'purlin' }, ['error unknown-word Members!F2 F1'], F2],
  ['a coordinate that is no number', { 'Nodes!C3': '6,O' }, ['error not-a-number Nodes!C3 F1'], F2],
  ['a coordinate with a comma that reads two ways', { 'Nodes!C3': '6,000' }, ['error not-a-number Nodes!C3 F1'], F2],
  ['a date where a number belongs', { 'Node loads!D2': { date: '2026-02-01' } }, ['error date-for-number Node loads!D2 F2'], F1],
  ['a date where an id belongs', { 'Node loads!C2': { date: '2026-02-01' } }, ['error date-for-number Node loads!C2 F2'], F1],
  ['an error value', { 'Node loads!D2': { error: '#REF!' } }, ['error error-value Node loads!D2 F2'], F1],
  ['a formula without a stored value', { 'Node loads!D2': { formula: '=A1+1' } }, ['error no-stored-value Node loads!D2 F2'], F1],
  ['a member of no length', { 'Nodes!C3': 0.0005 }, ['warning coincident-nodes Nodes!B3 F1', 'error zero-length Members!D2 F1'], F2],
  ['a load beyond the end', { 'Member loads!J2': 6.1 }, ['error load-beyond-end Member loads!J2 F1'], F2],
  ['a load a little beyond the end', { 'Member loads!J2': 6.004 }, ['note clipped Member loads!J2 F1'], both],
  ['from beyond to', { 'Member loads!I2': 4, 'Member loads!J2': 3 }, ['error out-of-range Member loads!I2 F1'], F2],
  ['a frame without supports', { 'Supports!A2': 'F2', 'Supports!B2': 'B', 'Supports!A3': 'F2', 'Supports!B3': 'C' }, ['error no-supports Nodes!A2 F1'], F2],
  ['a part joined to nothing', { 'Nodes+': ['F2', 'E', 20, 0, null], 'Nodes+2': ['F2', 'G', 22, 0, null], 'Members+': ['F2', 'EG', 'E', 'G', 'IPE 300', 'beam'] }, ['error not-connected Nodes!B8 F2'], F1],
  ['a node that no member reaches', { 'Nodes+': ['F2', 'E', 20, 0, null] }, ['error not-connected Nodes!B8 F2'], F1],
  ['tension only that is none', { 'Members!G1': 'tension only', 'Members!G2': 'none', 'Supports!F1': 'pushes only', 'Supports!F2': 'none' }, [], both],
  ['a tension-only member with a rigid joint', { 'Members+': ['F2', 'AC', 'A', 'C', 'IPE 300', 'tie', 'x', 'rigid'], 'Members!G1': 'tension only', 'Members!H1': 'end joint' }, ['error unknown-word Members!H6 F2'], F1],
  ['a load between the ends of a tension-only member', { 'Members+': ['F2', 'AC', 'A', 'C', 'IPE 300', 'tie', 'x'], 'Members!G1': 'tension only', 'Member loads+': ['F2', 'dead', 'AC', 'distributed', 'global', 'y', -1, null, null, null] }, ['error not-supported Member loads!C4 F2'], F1],
  ['a load of nothing on a tension-only member', { 'Members+': ['F2', 'AC', 'A', 'C', 'IPE 300', 'tie', 'x'], 'Members!G1': 'tension only', 'Member loads+': ['F2', 'dead', 'AC', 'distributed', 'global', 'y', 0, null, null, null] }, [], both],
  ['rods that pass each other without a node', { 'Members+': ['F2', 'AC', 'A', 'C', 'IPE 300', 'brace', 'yes'], 'Members+2': ['F2', 'BD', 'B', 'D', 'IPE 300', 'brace', 'yes'], 'Members!G1': 'tension only' }, [], both],
  ['a tapered member', { 'Members!G1': 'end section', 'Members!G2': 'IPE 200' }, ['error not-supported Members!G2 F1'], F2],
  ['an offset', { 'Members!G1': 'offset', 'Members!G2': '0.1', 'Members!G3': 'none' }, ['error not-supported Members!G2 F1'], F2],
  ['a support that is TRUE', { 'Supports!D2': true }, ['error unknown-word Supports!D2 F1'], F2],
  ['a support that only pushes', { 'Supports!F1': 'pushes only', 'Supports!F2': 'x' }, ['error not-supported Supports!F2 F1'], F2],
  ['a negative spring', { 'Supports!E2': -3 }, ['error not-positive Supports!E2 F1'], F2],
  ['a kind of support in place of its directions', { 'Supports!C4': 'roller' }, ['error unknown-word Supports!C4 F2'], F1],
  ['two members with the same ends', { 'Members+': ['F2', 'CB', 'C', 'B', 'IPE 300', 'beam'] }, ['warning same-ends Members!B6 F2'], both],
  ['members that cross without a node', { 'Members+': ['F2', 'AC', 'A', 'C', 'IPE 300', 'brace'], 'Members+2': ['F2', 'BD', 'B', 'D', 'IPE 300', 'brace'] }, ['warning crossing Members!B7 F2'], both],
  ['a node on a member that passes it by', { 'Nodes+': ['F2', 'E', 4, 4, null], 'Members+': ['F2', 'AE', 'A', 'E', 'IPE 300', 'brace'] }, ['warning crossing Members!B6 F2'], both],
  ['coordinates in millimetres under metres', { 'Nodes!C6': 8000, 'Nodes!C7': 8000 }, ['warning suspect-unit Nodes!C6 F2', 'warning suspect-unit Nodes!C7 F2'], both],
  ['no case with self-weight', { 'Load cases!C2': null }, ['warning no-self-weight Load cases!C1 –'], both],
  ['two cases with self-weight in one combination', { 'Load cases!C3': 1 }, ['warning no-self-weight Combinations!A2 –'], both],
  ['a stress factor of unfactored loads with factored ones', { 'Setup+': ['stress factor', 0.6], 'Combinations!C2': 1.35 }, ['warning stress-factor Setup!B5 –'], both],
  ['a stress factor of factored loads with unfactored ones', { 'Setup+': ['stress factor', 0.9] }, ['warning stress-factor Setup!B5 –'], both],
  ['the stress factor nobody gave, with factored loads', { 'Combinations!C2': 1.35 }, ['warning stress-factor Combinations!A2 –'], both],
  ['a column nearly named', { 'Members!G1': 'axail only', 'Members!G2': null }, ['warning near-miss-column Members!G1 –'], both],
  ['a column nobody knows', { 'Members!G1': 'paint', 'Members!G2': 'red' }, ['note column-ignored Members!G1 –'], both],
  ['a setting nobody knows', { 'Setup+': ['near limmit', 0.8] }, ['warning near-miss-column Setup!A5 –'], both],
  ['a number stored as text', { 'Nodes!C3': '6' }, ['note text-number Nodes!C3 F1'], both],
  ['a unit typed in the cell', { 'Nodes!C3': '6000 mm' }, ['note text-number Nodes!C3 F1'], both],
  ['a unit of the wrong kind in the cell', { 'Nodes!C3': '6 kN' }, ['error wrong-unit-kind Nodes!C3 F1'], F2],
  ['an unknown unit in the cell', { 'Nodes!C3': '6 furlongs' }, ['error unknown-unit Nodes!C3 F1'], F2],
  ['a node load without a figure', { 'Node loads+': ['F2', 'wind', 'C', null, null, null] }, ['note default-used Node loads!D3 F2'], both],
  ['node loads without a column of figures', { 'Node loads!D1': 'Px', 'Node loads!E1': 'Py', 'Node loads!F1': 'Pm' }, ['error missing-column Node loads!Fx or Fy or Mz F2', 'note column-ignored Node loads!D1 –', 'note column-ignored Node loads!E1 –', 'note column-ignored Node loads!F1 –'], F1],
  ['a merged cell', { 'Nodes!A3': { merged: 'A2', value: 'F1' } }, ['note derived Nodes!A3 F1'], both],
  ['a limit on a node whose row is wrong', { 'Nodes!C3': 'six', 'Limits+': ['applies to', 'measure', 'absolute'], 'Limits+2': ['B', 'displacement', 5], 'Nodes!B5': 'Q', 'Members!D3': 'Q', 'Members!C4': 'Q', 'Node loads!C2': 'Q' }, ['error not-a-number Nodes!C3 F1'], F2],
  ['a row of totals', { 'Members+': ['Total', null, 4] }, ['error unknown-word Members!A6 –'], both],
  ['a frame that a present Frames does not list', { 'Frames+': ['frame', 'title'], 'Frames+2': ['F2', 'portal'] }, ['note default-used Nodes!A2 F1'], ['F2', 'F1']],
  ['a frame listed without nodes', { 'Frames+': ['frame'], 'Frames+2': ['F1'], 'Frames+3': ['F2'], 'Frames+4': ['F9'] }, ['error unknown-node Frames!A4 F9'], both],
  ['a row for a frame that is nowhere', { 'Node loads+': ['F7', 'wind', 'B', 1, null, null] }, ['error unknown-node Node loads!A3 F7'], both],
  ['a row for all frames that fits none', { 'Node loads+': ['*', 'wind', 'Q', 1, null, null] }, ['error unknown-node Node loads!A3 –'], both],
  ['a combination column that is no case', { 'Combinations!E1': 'wnd', 'Combinations!E2': 1 }, ['error combination-without-case Combinations!E1 F1,F2'], both],
  ['a combination column without figures', { 'Combinations!E1': 'remark', 'Combinations!E2': 'by hand' }, ['note column-ignored Combinations!E1 –'], both],
  ['the load of a sheet twice', { 'Node loads+': ['F2', 'wind', 'B', 10, null, null] }, ['warning repeated-row Node loads!A3 F2'], both],
]; // prettier-ignore

describe('every problem stands at its cell with its severity, and stops only the frames it touches', () => {
  it('finds nothing wrong with sound sheets', () => {
    expect(lines(readSheets(sound()))).toEqual([]);
    expect(good(sound())).toEqual(both);
  });

  test.each(cases)('%s', (_, changes, problems, running) => {
    const sheets = withCells(changes);
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual(problems);
    for (const { message } of intake.problems) {
      expect(message).not.toMatch(/undefined|NaN|\[object|please|sorry|oops|invalid/i);
      expect(message.length).toBeLessThan(260);
    }
    expect(intake.frames.flatMap((f) => (f.frame ? [f.id] : []))).toEqual(running);
  });
});

describe('what the whole batch lacks', () => {
  test.each(['Nodes', 'Members', 'Supports'])('a batch without %s says so once', (name) => {
    const { [name]: _, ...rest } = sound();
    const found = lines(readSheets(rest)).filter((each) => each.includes('missing-sheet'));
    expect(found).toEqual([`error missing-sheet ${name}!– –`]);
    expect(good(rest)).toEqual([]);
  });

  it('what leans on a sheet that is missing, or on a frame without nodes or members, does not say so again', () => {
    const without = (name: string, more: TestSheets = {}): string[] => {
      const { [name]: _, ...rest } = sound();
      return lines(readSheets({ ...rest, ...more }));
    };
    expect(without('Nodes')).toEqual(['error missing-sheet Nodes!– –']);
    expect(without('Members')).toEqual(['error missing-sheet Members!– –']);
    const bare = sound();
    bare.Nodes.length = 3;
    bare.Frames = [['frame'], ['F1'], ['F2']];
    expect(lines(readSheets(bare))).toEqual(['error unknown-node Frames!A3 F2']);
  });

  it('says once that Supports are missing, not for every frame', () => {
    const { Supports: _, ...rest } = sound();
    expect(lines(readSheets(rest))).toEqual(['error missing-sheet Supports!– –']);
  });

  it('a column that is missing stops the frames with rows there', () => {
    const sheets = sound();
    sheets.Nodes = sheets.Nodes.map((row) => row.filter((_, i) => i !== 3));
    expect(lines(readSheets(sheets))).toEqual(['error missing-column Nodes!y F1,F2']);
  });

  it('more than 20,000 frames are refused', () => {
    const sheets: TestSheets = sound();
    const rows: TestCell[][] = [['frame', 'node', 'x', 'y']];
    for (let i = 0; i <= 20_000; i += 1) rows.push([`G${i}`, 'A', 0, 0]);
    const intake = readSheets({
      ...sheets,
      Nodes: rows,
      Frames: [['frame', 'run'], ...rows.slice(1).map((r) => [r[0] ?? null, 'no'])],
    });
    expect(lines(intake)).toContain('error too-large Frames!A20002 –');
  });
});
