import { describe, expect, it, test } from 'vitest';
import { splitHeading } from '@/lib/intake/headings';
import { lines, readSheets, sound, type TestCell, type TestSheets, withCells } from '@/lib/intake/sheets-of';
import type { Frame } from '@/lib/model/frame';

const frame = (sheets: TestSheets, id = 'F1'): Frame => {
  const found = readSheets(sheets).frames.find((f) => f.id === id)?.frame;
  if (!found) throw new Error(`frame ${id} was stopped: ${lines(readSheets(sheets)).join('; ')}`);
  return found;
};

describe('the heading row', () => {
  it('is found below title rows, and nothing above it is read', () => {
    const sheets = sound();
    sheets.Nodes = [['Halls of the north yard'], ['drawn by hand', 'node'], [], ...sheets.Nodes];
    expect(lines(readSheets(sheets))).toEqual([]);
    expect(readSheets(sheets).sheets.find((s) => s.known === 'Nodes')).toMatchObject({ headingRow: 4, rows: 6 });
  });

  it('must stand within the top 20 rows', () => {
    const sheets = sound();
    sheets.Nodes = [...Array.from({ length: 20 }, (): TestCell[] => ['notes']), ...sheets.Nodes];
    expect(lines(readSheets(sheets))).toContain('error missing-column Nodes!– –');
  });

  it('is the row with most known headings where none holds all', () => {
    const sheets = withCells({ 'Members!E1': 'profile' });
    expect(lines(readSheets(sheets))).toEqual(['error missing-column Members!section F1,F2', 'note column-ignored Members!E1 –']);
  });

  it('may come again in the sheet, as on printed pages', () => {
    const sheets = sound();
    sheets.Nodes.splice(3, 0, ['Frame', 'Node', 'X [m]', 'Y [m]', 'Place']);
    expect(lines(readSheets(sheets))).toEqual([]);
  });

  it('is matched without regard to case, blanks, underlines and dashes', () => {
    const sheets = withCells({ 'Load cases!C1': 'Self-Weight', 'Nodes!A1': ' FRAME ', 'Combinations!A1': 'Combi_nation' });
    expect(lines(readSheets(sheets))).toEqual([]);
  });

  it('a column without one is told once, if a row of data has something in it', () => {
    const sheets = withCells({
      'Members!H3': 'see drawing',
      'Members!H4': 3,
      'Nodes+': [null, null, null, null, null, 'beside'],
    });
    expect(lines(readSheets(sheets))).toEqual(['note column-ignored Members!H1 –']);
  });

  it('two columns with one heading are refused', () => {
    const sheets = withCells({ 'Members!G1': 'Section', 'Members!G2': 'IPE 200' });
    expect(lines(readSheets(sheets))).toEqual(['error conflicting-row Members!G1 –']);
  });
});

describe('sheet names', () => {
  test.each([
    ['member loads', 'Member loads'],
    ['Member_Load', 'Member loads'],
    ['LOADCASE', 'Load cases'],
    ['node', 'Nodes'],
  ])('%s is %s', (typed, known) => {
    const { [known]: rows = [], ...rest } = sound();
    expect(lines(readSheets({ ...rest, [typed]: rows }))).toEqual([]);
  });

  it('a sheet that is not read is said so, nearly named ones with the name', () => {
    const sheets = { ...sound(), Sketches: [['by', 'hand']], Suports: [['frame', 'node']] };
    expect(lines(readSheets(sheets))).toEqual(['note column-ignored Sketches!– –', 'warning near-miss-column Suports!– –']);
  });
});

describe('rows that are no data', () => {
  it('a comment is passed over, whatever its other cells hold', () => {
    expect(lines(readSheets(withCells({ 'Nodes+': ['# old', 'B', 'xx', 'yy'] })))).toEqual([]);
  });

  it('what stands beside the table, under no heading, is passed over', () => {
    expect(lines(readSheets(withCells({ 'Nodes+': [null, null, null, null, null, null, 'checked'] })))).toEqual([]);
  });

  test.each(['total', 'Total:', 'SUBTOTAL', 'Grand total'])('a row %s is told', (word) => {
    expect(lines(readSheets(withCells({ 'Supports+': [null, word, 4] })))).toEqual(['error unknown-word Supports!B6 –']);
  });
});

describe('units', () => {
  it('a heading says its unit in brackets of either kind', () => {
    expect(splitHeading('x [mm]')).toEqual({ text: 'x [mm]', name: 'x', unit: 'mm' });
    expect(splitHeading('value (kN/m)')).toEqual({ text: 'value (kN/m)', name: 'value', unit: 'kN/m' });
    expect(splitHeading('axial only')).toEqual({ text: 'axial only', name: 'axial only', unit: null });
  });

  it('the heading wins over the unit row, the unit row over the batch', () => {
    const sheets = sound();
    sheets.Nodes = [
      ['frame', 'node', 'x [m]', 'y', 'place'],
      [null, null, 'mm', 'mm', null],
      ['F1', 'A', 0, 500, null],
      ['F1', 'B', 6, 500, null],
    ];
    const { nodes } = frame({
      ...sheets,
      Members: sheets.Members.slice(0, 2),
      Supports: sheets.Supports.slice(0, 3),
      'Node loads': [],
      'Member loads': [],
    });
    expect(nodes.map((n) => [n.x_m, n.y_m])).toEqual([
      [0, 0.5],
      [6, 0.5],
    ]);
  });

  it('a unit row may wear brackets; a row of ids that look like units is data', () => {
    const sheets = sound();
    sheets['Load cases'] = [
      ['case', 'kind'],
      ['k', 'dead'],
      ['m', 'wind'],
    ];
    const cases = readSheets({ ...sheets, 'Node loads': [], 'Member loads': [], Combinations: [] }).frames[0]?.frame?.cases;
    expect(cases?.map((c) => c.name)).toEqual(['k', 'm']);
    const bracketed = sound();
    bracketed.Nodes.splice(1, 0, [null, null, '[m]', '(m)', null]);
    expect(lines(readSheets(bracketed))).toEqual([]);
  });

  it('an unknown unit in a unit row is told there, and stops the frames that fill the column', () => {
    const sheets = withCells({ 'Nodes!C1': 'x' });
    sheets.Nodes?.splice(1, 0, [null, null, 'furlong', 'm', null]);
    expect(lines(readSheets(sheets))).toEqual(['error unknown-unit Nodes!C2 F1,F2']);
  });

  it('a row with an id, or without a unit at all, is data', () => {
    for (const row of [['F1', 'C', 'm', 'furlong', null], [null, null, 'furlong', 'league', null]]) {
      const sheets = sound();
      sheets.Nodes.splice(1, 0, row);
      expect(lines(readSheets(sheets)).some((line) => /(not-a-number Nodes!C2|missing-id Nodes!A2)/.test(line))).toBe(true);
    }
  }); // prettier-ignore

  it('a US batch reads feet, kip, inches and psf where nothing else is said', () => {
    const sheets = withCells({
      'Setup+': ['units', 'us'],
      'Setup!B2': 'A992',
      'Nodes!C1': 'x',
      'Nodes!D1': 'y',
      'Node loads!D1': 'Fx',
      'Member loads!G1': 'value',
      'Member loads!K1': 'width',
      'Member loads!K2': 10,
      'Members!E2': 'W12X26',
    });
    const read = frame(sheets);
    expect(read.nodes[1]?.x_m).toBeCloseTo(6 * 0.3048, 12);
    // 5 psf × 10 ft, 1 psf × 1 ft = 14.5939 N/m (sheets §2)
    expect(read.memberLoads[0]).toMatchObject({ kind: 'distributed' });
    expect((read.memberLoads[0] as { q1_N_m: number }).q1_N_m).toBeCloseTo(-5 * 10 * 14.5939, 2);
    expect(frame(sheets, 'F2').nodeLoads[0]?.Fx_N).toBeCloseTo(44482.216152605, 6);
  });

  it('words behind a plain number are no unit, a unit of another kind is', () => {
    expect(lines(readSheets(withCells({ 'Load cases!C1': 'self weight (factor)' })))).toEqual([]);
    expect(lines(readSheets(withCells({ 'Load cases!C1': 'self weight [kN]' })))).toEqual([
      'error wrong-unit-kind Load cases!C1 F1,F2',
    ]);
  });
});

describe('axis letters', () => {
  const members = (heading: string): TestSheets => withCells({ 'Members!G1': heading, 'Members!G2': 3 });
  it('length y and z are major and minor in metric files', () => {
    expect(frame(members('length y [m]')).members[0]).toMatchObject({ lengthMajor_m: 3, lengthMinor_m: null });
    expect(frame(members('length z [m]')).members[0]).toMatchObject({ lengthMajor_m: null, lengthMinor_m: 3 });
  });
  it('a length by letter in a US file must say major or minor', () => {
    const sheets = members('length y [m]');
    expect(lines(readSheets(withCells({ 'Setup+': ['units', 'us'] }, sheets)))).toEqual(['error unknown-word Members!G1 F1']);
  });
  it('length x means nothing in a metric file either', () => {
    expect(lines(readSheets(members('length x')))).toEqual(['error unknown-word Members!G1 F1']);
  });

  const section = (headings: string[], values: number[], units = 'metric'): TestSheets =>
    withCells({
      'Sections+': ['section', 'A [cm2]', ...headings],
      'Sections+2': ['S', 30, ...values],
      'Members!E2': 'S',
      'Setup+': ['units', units],
    });
  it('Iy is major in a metric file and minor in a US one', () => {
    const metric = frame(section(['Iy [cm4]', 'Iz [cm4]', 'Wy [cm3]', 'Wply [cm3]'], [4000, 300, 350, 400])).sections[0]
      ?.properties;
    expect(metric).toMatchObject({ I_m4: 4000e-8, Iminor_m4: 300e-8, Wtop_m3: 350e-6, Wbottom_m3: 350e-6, Wpl_m3: 400e-6 });
    const us = frame(
      section(['Ix [in4]', 'Iy [in4]', 'Sx [in3]', 'Zx [in3]', 'J [in4]', 'Cw [in6]'], [100, 10, 20, 25, 1, 200], 'us'),
    ).sections[0]?.properties;
    expect(us?.I_m4).toBeCloseTo(100 * 0.0254 ** 4, 15);
    expect(us?.Iminor_m4).toBeCloseTo(10 * 0.0254 ** 4, 15);
    expect(us?.Wtop_m3).toBeCloseTo(20 * 0.0254 ** 3, 15);
    expect(us?.Iw_m6).toBeCloseTo(200 * 0.0254 ** 6, 18);
  });
  it('Ix in a metric file is a problem, for the frames that use it', () => {
    const found = lines(readSheets(section(['I [cm4]', 'Ix [cm4]'], [4000, 4000])));
    expect(found).toContain('error unknown-word Sections!D1 F1');
  });
  it('radii are told from inertias by their case, and passed over with a note', () => {
    const found = lines(readSheets(section(['Iy [cm4]', 'iy [cm]', 'iz [cm]', 'Wy [cm3]'], [4000, 10, 2, 300])));
    expect(found).toEqual(['note column-ignored Sections!D1 –', 'note column-ignored Sections!E1 –']);
  });
});

describe('ids', () => {
  it('match without regard to case and outer blanks; numbers are their shortest text; 01 is another', () => {
    const sheets = sound();
    sheets.Nodes = [
      ['frame', 'node', 'x', 'y'],
      [' f1', 1, 0, 0],
      ['F1', '01', 2, 0],
      ['F1', 2, 6, 0],
    ];
    sheets.Members = [
      ['frame', 'member', 'start', 'end', 'section'],
      ['F1', 'a', '1.0', '01', 'IPE 300'],
      ['f1 ', 'b', '01', '2', 'IPE 300'],
    ];
    sheets.Supports = [
      ['frame', 'node', 'ux', 'uy', 'rz'],
      ['F1', '1', 'fixed', 'fixed', 'fixed'],
    ];
    const rest = {
      'Node loads': [],
      'Member loads': [
        ['frame', 'case', 'member', 'load', 'value'],
        ['F1', 'DEAD', 'A', 'distributed', -1],
      ],
    };
    const read = frame({ ...sheets, ...rest }, 'f1');
    expect(read.nodes.map((n) => n.id)).toEqual(['1', '01', '2']);
    expect(read.members.map((m) => [m.start, m.end])).toEqual([
      [0, 1],
      [1, 2],
    ]);
  });
  it('blanks within count: A B is not AB', () => {
    expect(lines(readSheets(withCells({ 'Member loads!C2': 'A B' })))).toEqual(['error unknown-member Member loads!C2 F1']);
  });
});

describe('several files', () => {
  it('a sheet in two files is one, each part with its own headings', () => {
    const sheets = sound();
    const [head = [], ...rows] = sheets.Nodes;
    const intake = readSheets({
      ...sheets,
      Nodes: [head, ...rows.slice(0, 2)],
      nodes: [
        ['y', 'x', 'node', 'frame'],
        [0, 0, 'A', 'F2'],
        [4, 0, 'B', 'F2'],
        [4, 8, 'C', 'F2'],
        [0, 8, 'D', 'F2'],
      ],
    });
    expect(lines(intake)).toEqual([]);
    expect(intake.frames.map((f) => f.frame?.nodes.length)).toEqual([2, 4]);
  });
});
