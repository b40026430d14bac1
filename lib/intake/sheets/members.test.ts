import { describe, expect, it, test } from 'vitest';
import { lines, readSheets, sound, type TestCell, type TestSheets, withCells } from '@/lib/intake/sheets-of';
import type { Frame } from '@/lib/model/frame';

const frame = (sheets: TestSheets, id = 'F1'): Frame => {
  const intake = readSheets(sheets);
  const found = intake.frames.find((f) => f.id === id)?.frame;
  if (!found) throw new Error(`stopped: ${intake.problems.map((p) => `${p.code} ${p.cell} ${p.message}`).join('; ')}`);
  return found;
};
const withColumn = (heading: string, value: TestCell): TestSheets => withCells({ 'Members!G1': heading, 'Members!G2': value });

describe('members', () => {
  test.each<[string, TestCell, Partial<Frame['members'][number]>]>([
    ['start joint', 'pin', { startJoint: 'pin', endJoint: 'rigid', axialOnly: false }],
    ['start joint', 'Rigid', { startJoint: 'rigid' }],
    ['end joint', 0, { endJoint: 'pin' }],
    ['end joint', 2500, { endJoint: 2.5e6 }],
    ['axial only', 'x', { startJoint: 'pin', endJoint: 'pin', axialOnly: true }],
    ['axial only', 0, { startJoint: 'rigid', axialOnly: false }],
    ['tension only', 'none', { tensionOnly: false, startJoint: 'rigid', axialOnly: false }],
    ['turned', true, { turned: true }],
    ['length LTB', 2, { lengthLtbTop_m: 2, lengthLtbBottom_m: 2 }],
    ['group', 'north', { group: 'north' }],
    ['span', 'long', { span: 'long' }],
  ])('%s %s', (heading, value, expected) => {
    expect(frame(withColumn(heading, value)).members[0]).toMatchObject(expected);
  });

  it('tension only is pinned at both ends, in a family by an expression too', () => {
    const rod = ['F2', 'AC', 'A', 'C', 'IPE 300', 'brace', 'yes'];
    const expected = { tensionOnly: true, startJoint: 'pin', endJoint: 'pin', axialOnly: true };
    const sheets = withCells({ 'Members!G1': 'tension only', 'Members+': rod });
    expect(frame(sheets, 'F2').members[3]).toMatchObject(expected);
    const family: TestSheets = {
      Families: [['family', 'parameter', 'quantity', 'choices', 'default'], ['bay', 'rods', 'choice', 'yes, no', 'yes']],
      Variants: [['frame', 'family', 'rods'], ['V1', 'bay', 'yes'], ['V2', 'bay', 'no']],
      Nodes: [['frame', 'node', 'x', 'y'], ['bay', 'A', 0, 0], ['bay', 'B', 3, 0], ['bay', 'C', 3, 3]],
      Members: [['frame', 'member', 'start', 'end', 'section', 'tension only'], ['bay', 'AB', 'A', 'B', 'IPE 300', null], ['bay', 'BC', 'B', 'C', 'IPE 300', null], ['bay', 'AC', 'A', 'C', 'IPE 300', '{rods}']],
      Supports: [['frame', 'node', 'ux', 'uy', 'rz'], ['bay', 'A', 'fixed', 'fixed', 'fixed']],
      Setup: [['setting', 'value'], ['material', 'S275']],
    }; // prettier-ignore
    expect(frame(family, 'V1').members[2]).toMatchObject(expected);
    expect(frame(family, 'V2').members[2]).toMatchObject({ tensionOnly: false, startJoint: 'rigid' });
  });

  it('the face’s own LTB length wins over the common one', () => {
    const sheets = withCells({ 'Members!G1': 'length LTB', 'Members!G2': 2, 'Members!H1': 'length LTB top', 'Members!H2': 1 });
    expect(frame(sheets).members[0]).toMatchObject({ lengthLtbTop_m: 1, lengthLtbBottom_m: 2 });
  });

  test.each<[string, TestCell, string]>([
    ['start joint', 'hinge', 'error unknown-word Members!G2 F1'],
    ['start joint', -5, 'error not-positive Members!G2 F1'],
    ['axial only', 'maybe', 'error unknown-word Members!G2 F1'],
    ['tension only', 'cable', 'error unknown-word Members!G2 F1'],
    ['length minor', 0, 'error not-positive Members!G2 F1'],
    ['length minor', 'long', 'error not-a-number Members!G2 F1'],
  ])('%s %s is told', (heading, value, problem) => {
    expect(lines(readSheets(withColumn(heading, value)))).toEqual([problem]);
  });

  it('rows for all frames fit where both ends exist', () => {
    const sheets = withCells({ 'Members+': ['*', 'X', 'A', 'C', 'IPE 200', 'brace'] });
    expect(frame(sheets, 'F1').members).toHaveLength(1);
    expect(frame(sheets, 'F2').members.map((m) => m.id)).toEqual(['X', 'AB', 'BC', 'CD']);
  });

  it('frames that use the same things share them', () => {
    const sheets = withCells({ 'Members!E3': 'IPE 300', 'Members!E5': 'IPE 300' });
    const [a, b] = readSheets(sheets).frames;
    expect(a?.frame?.sections).toBe(b?.frame?.sections);
    expect(a?.frame?.materials).toBe(b?.frame?.materials);
  });
});

describe('the material of a member', () => {
  const base = (): TestSheets => ({
    ...sound(),
    Sections: [
      ['section', 'designation', 'material'],
      ['R', 'IPE 300', 'S355'],
      ['Q', 'IPE 300', null],
    ],
    Materials: [
      ['material', 'grade', 'E', 'fy', 'density'],
      ['own', null, 205000, 300, 7700],
      ['strong', 'S355', null, 400, null],
    ],
  });
  it.each<[string, string | null, string]>([
    ['R', 'own', 'own'],
    ['R', null, 'S355'],
    ['Q', null, 'S275'],
    ['IPE 300', null, 'S275'],
  ])('section %s with material %s is of %s', (section, material, expected) => {
    const read = frame(withCells({ 'Members!E2': section, 'Members!G1': 'material', 'Members!G2': material }, base()));
    expect(read.materials[read.members[0]?.material ?? -1]?.name).toBe(expected);
  });
  it('nowhere given is an error', () => {
    const sheets = { ...sound(), Setup: [['setting', 'value']] };
    expect(lines(readSheets(sheets))).toEqual(
      ['Members!2', 'Members!3', 'Members!4', 'Members!5'].map(
        (_, i) => `error unknown-material Members!material ${i === 0 ? 'F1' : 'F2'}`,
      ),
    );
  });
  it('a grade gives yield by the thickest part, typed values override one by one', () => {
    const read = frame(withCells({ 'Members!E2': 'HE 300 B', 'Members!G1': 'material', 'Members!G2': 'strong' }, base()));
    expect(read.materials[0]).toMatchObject({
      grade: 'S355',
      E_Pa: 210e9,
      fy_Pa: 400e6,
      density_kg_m3: 7850,
      sources: { fy_Pa: 'typed', E_Pa: 'library' },
    });
    // HE 300 B: tf 19 mm, so S275 yields at 265 (EN 10025-2 table 7: over 16 up to 40 mm)
    expect(frame(withCells({ 'Members!E2': 'HE 300 B' })).materials[0]?.fy_Pa).toBe(265e6);
  });
});

describe('sections', () => {
  const withSection = (headings: string[], ...values: TestCell[]): TestSheets =>
    withCells({ 'Members!E2': 'S', 'Sections+': ['section', ...headings], 'Sections+2': ['S', ...values] });
  const properties = (sheets: TestSheets): Frame['sections'][number]['properties'] | undefined =>
    frame(sheets).sections[0]?.properties;

  it('by shape: what is derived is said so', () => {
    const section = frame(withSection(['shape', 'h', 'b', 't'], 'RHS', 120, 80, 6.3)).sections[0];
    expect(section).toMatchObject({
      name: 'S',
      shape: 'rhs',
      dimensions: { h: 0.12, b: 0.08, t: 0.0063 },
      sources: { A_m2: 'derived' },
    });
  });
  it('by properties: W from I and depth where neither W is given', () => {
    const sheets = withSection(['A', 'I', 'depth'], 28.5, 1943, 200);
    expect(properties(sheets)?.Wtop_m3).toBeCloseTo(194.3e-6, 15);
    expect(properties(sheets)?.Wbottom_m3).toBe(properties(sheets)?.Wtop_m3);
    expect(lines(readSheets(sheets))).toEqual(['note derived Sections!C2 F1']);
  });
  it('one W given: the other is not invented', () => {
    expect(properties(withSection(['A', 'I', 'W top', 'depth'], 28.5, 1943, 180, 200))).toMatchObject({
      Wtop_m3: 180e-6,
      Wbottom_m3: null,
    });
  });
  it('a name that is a designation needs no more', () => {
    const sheets = withCells({
      'Members!E2': 'IPE 240',
      'Sections+': ['section', 'material'],
      'Sections+2': ['ipe 240', 'S355'],
    });
    const read = frame(sheets);
    expect([read.sections[0]?.designation, read.materials[0]?.name]).toEqual(['IPE 240', 'S355']);
  });

  test.each<[string, string[], TestCell[], string[]]>([
    ['a designation that is none', ['designation'], ['IPE 24O'], ['error unknown-section Sections!B2 F1']],
    ['a shape that is none', ['shape', 'h'], ['tee', 100], ['error unknown-word Sections!B2 F1']],
    ['dimensions without a shape', ['shape', 'h', 'b'], [null, 100, 50], ['error unknown-word Sections!B2 F1']],
    ['a dimension that its shape needs', ['shape', 'h', 'b', 't'], ['rhs', 100, 50, null], ['error not-a-number Sections!E2 F1']],
    ['walls thicker than the section', ['shape', 'h', 'b', 't'], ['rhs', 100, 50, 30], ['error out-of-range Sections!E2 F1']],
    ['an area below zero', ['A', 'I'], [-28.5, 1943], ['error not-positive Sections!B2 F1']],
    ['no I', ['A', 'I'], [28.5, null], ['error not-a-number Sections!C2 F1']],
    [
      'a dimension that its shape has no use for',
      ['shape', 'd', 't', 'b'],
      ['chs', 60.3, 4, 50],
      ['note column-ignored Sections!E2 F1'],
    ],
    ['dimensions beside a designation', ['designation', 'h'], ['IPE 300', 300], ['note column-ignored Sections!C2 F1']],
    ['a designation and properties', ['designation', 'A'], ['IPE 300', 50], ['error conflicting-row Sections!C2 F1']],
    ['a hollow section that may be made either way', ['designation'], ['RHS 200x100x8'], ['note derived Sections!B2 F1']],
    ['a hollow section typed in full', ['designation'], ['HFRHS 200x100x8'], []],
    ['nothing that gives it', ['A'], [null], ['error unknown-section Sections!A2 F1']],
    [
      'I that no such depth can have',
      ['A', 'I', 'depth'],
      [10, 1100, 200],
      ['warning suspect-unit Sections!C2 F1', 'note derived Sections!C2 F1'],
    ],
    [
      'I that is odd for its depth',
      ['A', 'I', 'W top', 'W bottom', 'depth'],
      [100, 100, 10, 10, 200],
      ['warning suspect-unit Sections!C2 F1'],
    ],
    [
      'an I seven times as deep as wide',
      ['shape', 'h', 'b', 'tw', 'tf'],
      ['I', 700, 100, 8, 12],
      ['warning suspect-unit Sections!C2 F1'],
    ],
    ['a section twice with other content', ['A', 'I', 'W'], [28.5, 1943, 190], []],
  ])('%s', (_, headings, values, problems) => {
    expect(lines(readSheets(withSection(headings, ...values))).sort()).toEqual([...problems].sort());
  });

  it('a hollow section straight from the library says once how it was taken', () => {
    const sheets = withCells({ 'Members!E2': 'SHS 100x5', 'Members!E3': 'SHS 100x5' });
    expect(lines(readSheets(sheets))).toEqual(['note derived Members!E2 F1']);
    expect(frame(sheets).sections[0]).toMatchObject({ designation: 'CFSHS 100x100x5', made: 'cold formed' });
  });
  it('A500 yields higher in a box than in a tube, other grades do not', () => {
    const fy = (designation: string, material: string): number => {
      const read = frame(withCells({ 'Members!E2': 'S', 'Sections+': ['section', 'designation', 'material'], 'Sections+2': ['S', designation, material] })); // prettier-ignore
      return (read.materials[0]?.fy_Pa ?? NaN) / 6.894757293168361e6;
    };
    expect(fy('HSS6X6X3/8', 'A500 B')).toBeCloseTo(46, 9);
    expect(fy('HSS6.625X0.280', 'A500 B')).toBeCloseTo(42, 9);
    expect(fy('HSS6X6X3/8', 'A992')).toBeCloseTo(50, 9);
  });
  it('a section twice with other content stops the frames that use it', () => {
    const sheets = withCells({
      'Sections+': ['section', 'designation'],
      'Sections+2': ['S', 'IPE 300'],
      'Sections+3': ['s', 'IPE 330'],
      'Members!E2': 'S',
    });
    expect(lines(readSheets(sheets))).toEqual(['error conflicting-row Sections!A3 F1']);
  });
  it('a wrong section that nobody uses stops nobody', () => {
    const sheets = withCells({ 'Sections+': ['section', 'designation'], 'Sections+2': ['S', 'IPE 999'] });
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual(['error unknown-section Sections!B2 –']);
    expect(intake.frames.every((f) => f.frame)).toBe(true);
  });
  it('a material that is nowhere is told, whether a member uses the section or not', () => {
    const sheets = withCells({
      'Sections+': ['section', 'designation', 'material'],
      'Sections+2': ['S', 'IPE 300', 'S27S'],
      'Sections+3': ['T', 'IPE 300', 'S27S'],
      'Members!E2': 'S',
    });
    expect(lines(readSheets(sheets))).toEqual(['error unknown-material Sections!C2 F1', 'error unknown-material Sections!C3 –']);
  });
  it('a turned member needs I minor', () => {
    const sheets = withCells({ 'Members!G1': 'turned', 'Members!G2': 'yes' }, withSection(['A', 'I'], 28.5, 1943));
    expect(lines(readSheets(sheets))).toEqual(['error not-a-number Members!G2 F1']);
  });
});

describe('materials', () => {
  const withMaterial = (headings: string[], ...values: TestCell[]): TestSheets =>
    withCells({
      'Members!G1': 'material',
      'Members!G2': 'M',
      'Materials+': ['material', ...headings],
      'Materials+2': ['M', ...values],
    });
  test.each<[string, string[], TestCell[], string[]]>([
    ['an unknown grade', ['grade'], ['S27S'], ['error unknown-grade Materials!B2 F1']],
    ['neither grade nor E', ['grade', 'E'], [null, null], ['error not-a-number Materials!C2 F1']],
    ['E below zero', ['E', 'density'], [-1, 7850], ['error not-positive Materials!B2 F1']],
    ['E in GPa under MPa', ['E', 'density'], [210, 7850], ['warning suspect-unit Materials!B2 F1']],
    ['G in GPa under MPa', ['E', 'G', 'density'], [210000, 81, 7850], ['warning suspect-unit Materials!C2 F1']],
    ['a density in t/m³', ['E', 'density'], [210000, 7.85], ['warning suspect-unit Materials!C2 F1']],
    ['a yield above any steel', ['E', 'fy', 'density'], [210000, 2750, 7850], ['warning suspect-unit Materials!C2 F1']],
    ['E without density where a case has self-weight', ['E', 'density'], [210000, null], ['error not-a-number Materials!C2 F1']],
    ['E without a density column', ['E'], [210000], ['error not-a-number Materials!A2 F1']],
  ])('%s', (_, headings, values, problems) => {
    expect(lines(readSheets(withMaterial(headings, ...values)))).toEqual(problems);
  });
});

describe('supports', () => {
  it('hold, free and spring, turned by an angle', () => {
    const sheets = withCells({ 'Supports!F1': 'angle', 'Supports!F3': 30, 'Supports!C3': 250, 'Supports!E3': 0 });
    expect(frame(sheets).supports[1]).toEqual({ node: 1, ux: 250e3, uy: 'fixed', rz: 'free', angle_rad: Math.PI / 6 });
  });
  it('numbers that are all 0 or 1 ask for fixed and free', () => {
    const sheets = {
      ...sound(),
      Supports: [
        ['frame', 'node', 'ux', 'uy', 'rz'],
        ['F1', 'A', 1, 1, 1],
        ['F2', 'A', 1, 1, 0],
        ['F2', 'D', 1, 1, 0],
      ],
    };
    expect(lines(readSheets(sheets))).toEqual(['error unknown-word Supports!C2 F1,F2']);
  });
  it('a spring of 1 beside other springs is a spring', () => {
    const sheets = withCells({ 'Supports!C3': 1, 'Supports!E3': 2500 });
    expect(frame(sheets).supports[1]?.ux).toBe(1000);
  });
  it('a support of a node that is none', () => {
    expect(lines(readSheets(withCells({ 'Supports!B3': 'Q' })))).toEqual(['error unknown-node Supports!B3 F1']);
  });
});

describe('spans', () => {
  const beam = (y: number, spans: TestCell[], more: Record<string, TestCell> = {}): TestSheets => ({
    ...sound(),
    Nodes: [
      ['frame', 'node', 'x', 'y'],
      ['F1', 'A', 0, 0],
      ['F1', 'B', 3, y],
      ['F1', 'C', 6, 0],
    ],
    Members: [
      ['frame', 'member', 'start', 'end', 'section', 'span', ...Object.keys(more)],
      ['F1', 'AB', 'A', 'B', 'IPE 300', spans[0] ?? null, ...Object.values(more)],
      ['F1', 'BC', 'B', 'C', 'IPE 300', spans[1] ?? null],
    ],
    Supports: [
      ['frame', 'node', 'ux', 'uy', 'rz'],
      ['F1', 'A', 'fixed', 'fixed', 'fixed'],
    ],
    'Node loads': [],
    'Member loads': [],
  });
  it('pieces in line make one', () => {
    expect(lines(readSheets(beam(0, ['s', 'S'])))).toEqual([]);
  });
  it('up to 0.5° out of line', () => {
    expect(lines(readSheets(beam(0.013, ['s', 's'])))).toEqual([]);
    expect(lines(readSheets(beam(0.0135, ['s', 's'])))).toEqual(['error conflicting-row Members!F3 F1']);
  });
  it('pieces with different lengths are told', () => {
    expect(lines(readSheets(beam(0, ['s', 's'], { 'length minor': 2 })))).toEqual(['error conflicting-row Members!G3 F1']);
  });
  it('pieces that do not follow on are told', () => {
    const sheets = withCells({ 'Members!G1': 'span', 'Members!G3': 's', 'Members!G5': 's' });
    expect(lines(readSheets(sheets))).toEqual(['error conflicting-row Members!G5 F2']);
  });
});

describe('frames', () => {
  it('come in order of first definition: Frames, Variants, Nodes; those with run no are left out', () => {
    const sheets = {
      ...sound(),
      Frames: [
        ['frame', 'run', 'count', 'title', 'group', 'note'],
        ['f2', null, 3, 'Portal', 'north', 'check twice'],
        ['F1', 'no'],
      ],
    };
    const { frames } = readSheets(sheets);
    expect(frames.map((f) => f.id)).toEqual(['f2']);
    expect(frames[0]?.frame).toMatchObject({
      id: 'f2',
      count: 3,
      title: 'Portal',
      group: 'north',
      note: 'check twice',
      family: null,
    });
  });
  it('a frame left out may be wrong', () => {
    const sheets = withCells({
      'Members!E2': 'IPE 999',
      'Frames+': ['frame', 'run'],
      'Frames+2': ['F1', 'no'],
      'Frames+3': ['F2'],
    });
    expect(lines(readSheets(sheets))).toEqual([]);
  });
  it('rows as typed are kept for every sheet', () => {
    const { rows } = readSheets(withCells({ 'Nodes!C3': '6000 mm' }));
    expect(rows.find((r) => r.sheet === 'Nodes' && r.row === 3)?.cells).toEqual(['F1', 'B', '6000 mm', '0', 'tip']);
  });
});
