import { describe, expect, it } from 'vitest';
import { lines, readSheets, type TestCell, type TestSheets, withCells } from '@/lib/intake/sheets-of';

/** The sound sheets, F1's beam of section S and material M, with a setting of Setup. */
function withParts(setting: [string, string], section: TestCell[][], materials: TestCell[][] = []): TestSheets {
  const sheets = withCells({ 'Members!E2': 'S', 'Members!G1': 'material', 'Members!G2': materials.length > 0 ? 'M' : null });
  const more: TestSheets = { Sections: section, ...(materials.length > 0 ? { Materials: materials } : {}) };
  const setup = [...(sheets['Setup'] ?? []), ['analysis', 'second order'], setting];
  return { ...sheets, ...more, Setup: setup };
}
const shear: [string, string] = ['shear deformation', 'yes'];
const reduction: [string, string] = ['stiffness reduction', 'AISC 360'];
const typed: TestCell[][] = [
  ['section', 'A', 'I', 'depth'],
  ['S', 50, 8000, 300],
];

describe('what the chosen analysis needs', () => {
  it('shear deformation: the shear area of a section given by its properties, at its row', () => {
    const intake = readSheets(withParts(shear, typed));
    expect(lines(intake).filter((line) => line.startsWith('error'))).toEqual(['error not-a-number Sections!A2 F1']);
    expect(intake.problems.find((each) => each.severity === 'error')?.message).toContain('give Av');
    expect(intake.frames.map((each) => each.frame !== null)).toEqual([false, true]);
  });

  it('at the cell Av where the sheet has the column, and content where it is filled', () => {
    const blank = [['section', 'A', 'I', 'Av'], ['S', 50, 8000, null]]; // prettier-ignore
    expect(lines(readSheets(withParts(shear, blank)))).toContain('error not-a-number Sections!D2 F1');
    const filled = [['section', 'A', 'I', 'Av'], ['S', 50, 8000, 20]]; // prettier-ignore
    expect(lines(readSheets(withParts(shear, filled)))).toEqual([]);
  });

  it('every shape and designation has its shear area, turned too', () => {
    const shapes = [['section', 'shape', 'h', 'b', 'tw', 'tf'], ['S', 'I', 300, 150, 8, 12]]; // prettier-ignore
    const sheets = withCells({ 'Members!H1': 'turned', 'Members!H2': 'yes' }, withParts(shear, shapes));
    expect(lines(readSheets(sheets)).filter((line) => line.startsWith('error'))).toEqual([]);
  });

  it('shear deformation: G of a material without a grade', () => {
    const shape = [['section', 'shape', 'h', 'b', 'tw', 'tf'], ['S', 'I', 300, 150, 8, 12]]; // prettier-ignore
    const noG = [['material', 'E [GPa]', 'density', 'fy'], ['M', 210, 7850, 275]]; // prettier-ignore
    expect(lines(readSheets(withParts(shear, shape, noG)))).toContain('error not-a-number Materials!A2 F1');
    const withG = [['material', 'E [GPa]', 'density', 'fy', 'G [GPa]'], ['M', 210, 7850, 275, 81]]; // prettier-ignore
    expect(lines(readSheets(withParts(shear, shape, withG))).filter((line) => line.startsWith('error'))).toEqual([]);
  });

  it('stiffness reduction: fy, typed or by a grade and the thickness', () => {
    const noYield = [['material', 'E [GPa]', 'density', 'fy'], ['M', 210, 7850, null]]; // prettier-ignore
    const intake = readSheets(withParts(reduction, typed, noYield));
    expect(lines(intake)).toContain('error not-a-number Materials!D2 F1');
    expect(intake.problems.find((each) => each.cell === 'D2')?.message).toContain('fy of material M');
    const byThickness = readSheets(withParts(reduction, typed));
    expect(byThickness.problems.find((each) => each.severity === 'error')).toMatchObject({ sheet: 'Sections', cell: 'A2' });
    expect(byThickness.problems.find((each) => each.severity === 'error')?.message).toContain('give t of section S');
  });

  it('nothing is asked of a first-order analysis of members that only bend, or of a tension-only member', () => {
    expect(lines(readSheets(withParts(['shear deformation', 'no'], typed))).filter((line) => line.startsWith('error'))).toEqual(
      [],
    );
    const rod = withCells(
      { 'Members!H1': 'tension only', 'Members+': ['F2', 'AC', 'A', 'C', 'S', 'brace', null, 'yes'], 'Members!E2': 'IPE 300' },
      withParts(shear, typed),
    );
    expect(lines(readSheets(rod)).filter((line) => line.startsWith('error'))).toEqual([]);
  });

  it('a span of tension-only pieces and others is no one member', () => {
    const sheets = withCells({
      'Nodes+': ['F2', 'E', 4, 4, null],
      'Members!D4': 'E',
      'Members+': ['F2', 'EC', 'E', 'C', 'IPE 300', 'beam', 'yes', 'long'],
      'Members!G1': 'tension only',
      'Members!H1': 'span',
      'Members!H4': 'long',
    });
    expect(lines(readSheets(sheets))).toContain('error conflicting-row Members!H6 F2');
  });
});
