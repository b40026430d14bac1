import { describe, expect, it, test } from 'vitest';
import { lines, readSheets, sound, type TestCell, type TestSheets, withCells } from '@/lib/intake/sheets-of';
import type { Frame, MemberLoad } from '@/lib/model/frame';

const head = [
  'frame',
  'case',
  'member',
  'load',
  'axes',
  'direction',
  'value',
  'end value',
  'from',
  'to',
  'width',
  'dT',
  'dT across',
];
type Load = Partial<Record<(typeof head)[number], TestCell>>;

/** The sound sheets with one load on F1's member AB of 6 m. */
function withLoad(load: Load, headings: Record<string, string> = {}): TestSheets {
  const all: Load = { frame: 'F1', case: 'dead', member: 'AB', load: 'distributed', ...load };
  return { ...sound(), 'Member loads': [head.map((h) => headings[h] ?? h), head.map((h) => all[h] ?? null)] };
}

const frame = (sheets: TestSheets, id = 'F1'): Frame => {
  const intake = readSheets(sheets);
  const found = intake.frames.find((f) => f.id === id)?.frame;
  if (!found) throw new Error(`stopped: ${intake.problems.map((p) => `${p.code} ${p.cell} ${p.message}`).join('; ')}`);
  return found;
};
const one = (load: Load, headings?: Record<string, string>): MemberLoad | undefined =>
  frame(withLoad(load, headings)).memberLoads[0];

describe('what a member load says', () => {
  it('is global, along y, over the whole member where nothing else is said', () => {
    expect(one({ value: -5 })).toEqual({
      kind: 'distributed',
      case: 0,
      member: 0,
      axes: 'global',
      direction: 'y',
      q1_N_m: -5000,
      q2_N_m: -5000,
      from_m: 0,
      to_m: 6,
    });
  });
  it('a blank end value is the value, a typed 0 is zero', () => {
    expect(one({ value: -5, 'end value': 0 })).toMatchObject({ q1_N_m: -5000, q2_N_m: 0 });
    expect(one({ value: -5, 'end value': -2 })).toMatchObject({ q1_N_m: -5000, q2_N_m: -2000 });
  });
  it('blank from is 0 and blank to is L, each alone', () => {
    expect(one({ value: 1, from: 2 })).toMatchObject({ from_m: 2, to_m: 6 });
    expect(one({ value: 1, to: 2 })).toMatchObject({ from_m: 0, to_m: 2 });
  });
  it('a point load stands at from', () => {
    expect(one({ load: 'point', value: -3, from: 2, axes: 'local', direction: 'x' })).toEqual({
      kind: 'point',
      case: 0,
      member: 0,
      axes: 'local',
      direction: 'x',
      P_N: -3000,
      at_m: 2,
    });
  });
  it('a moment has neither axes nor direction', () => {
    expect(one({ load: 'moment', value: 3, from: 6 })).toEqual({ kind: 'moment', case: 0, member: 0, M_Nm: 3000, at_m: 6 });
  });
  it('a temperature change is of the whole member', () => {
    expect(one({ load: 'temperature', dT: 25, 'dT across': -10 })).toEqual({
      kind: 'temperature',
      case: 0,
      member: 0,
      dT_K: 25,
      dTAcross_K: -10,
    });
    expect(one({ load: 'temperature', dT: 18 }, { dT: 'dT [°F]' })).toMatchObject({ dT_K: 10, dTAcross_K: 0 });
  });
});

describe('the unit of value gives force and length, the load their powers', () => {
  test.each<[string, Load, Record<string, number>]>([
    ['value [N/mm]', { value: 2 }, { q1_N_m: 2000 }],
    ['value [N/m]', { load: 'point', value: 7, from: 1 }, { P_N: 7 }],
    ['value [kN/m]', { load: 'moment', value: 7, from: 1 }, { M_Nm: 7000 }],
    ['value [kN]', { value: 7 }, { q1_N_m: 7000 }],
    ['value [kip/ft]', { load: 'point', value: 1, from: 1 }, { P_N: 4448.2216152605 }],
  ])('%s', (heading, load, expected) => {
    const read = one(load, { value: heading }) as unknown as Record<string, number>;
    for (const [key, value] of Object.entries(expected)) expect(read[key]).toBeCloseTo(value, 6);
  });
  it('an end value without a unit of its own is in the value’s', () => {
    expect(one({ value: 1000, 'end value': 500 }, { value: 'value [N/m]' })).toMatchObject({ q1_N_m: 1000, q2_N_m: 500 });
  });
  it('a width makes it an area load', () => {
    expect(one({ value: -2, 'end value': -1, width: 3 })).toMatchObject({ q1_N_m: -6000, q2_N_m: -3000 });
    expect(one({ value: -2, width: 3 }, { value: 'value [kN/m]' })).toMatchObject({ q1_N_m: -6000 });
  });
  it('an area unit asks for a width, else the frame’s spacing, else it is an error', () => {
    const headings = { value: 'value [kN/m2]' };
    expect(one({ value: -2, width: 2.5 }, headings)).toMatchObject({ q1_N_m: -5000 });
    const spaced = {
      ...withLoad({ value: -2 }, headings),
      Frames: [
        ['frame', 'spacing'],
        ['F1', 4],
        ['F2', 4],
      ],
    };
    expect(frame(spaced).memberLoads[0]).toMatchObject({ q1_N_m: -8000 });
    expect(lines(readSheets(withLoad({ value: -2 }, headings)))).toEqual(['error not-a-number Member loads!K2 F1']);
  });
  it('an area unit leaves a point load a force', () => {
    expect(one({ load: 'point', value: -2, from: 1 }, { value: 'value [kN/m2]' })).toMatchObject({ P_N: -2000 });
  });
});

describe('what a load may not say', () => {
  test.each<[string, Load, string]>([
    ['a load that is none', { load: 'uniform', value: 1 }, 'error unknown-word Member loads!D2 F1'],
    ['no load at all', { load: null, value: 1 }, 'error unknown-word Member loads!D2 F1'],
    ['axes that are none', { axes: 'plan', value: 1 }, 'error unknown-word Member loads!E2 F1'],
    ['a direction that is none', { direction: 'z', value: 1 }, 'error unknown-word Member loads!F2 F1'],
    ['no value', {}, 'error not-a-number Member loads!G2 F1'],
    ['a projected point load', { load: 'point', axes: 'projected', value: 1, from: 1 }, 'error unknown-word Member loads!E2 F1'],
    ['a projected moment', { load: 'moment', axes: 'projected', value: 1, from: 1 }, 'error unknown-word Member loads!E2 F1'],
    ['a moment with a direction', { load: 'moment', direction: 'y', value: 1, from: 1 }, 'error unknown-word Member loads!F2 F1'],
    ['a point load without from', { load: 'point', value: 1 }, 'error not-a-number Member loads!I2 F1'],
    ['a point load with to', { load: 'point', value: 1, from: 1, to: 2 }, 'error out-of-range Member loads!J2 F1'],
    ['a point load beyond the end', { load: 'point', value: 1, from: 6.1 }, 'error load-beyond-end Member loads!I2 F1'],
    ['a load before the start', { value: 1, from: -0.5 }, 'error load-beyond-end Member loads!I2 F1'],
    ['a load of no length', { value: 1, from: 2, to: 2 }, 'error out-of-range Member loads!I2 F1'],
    ['a temperature with a value', { load: 'temperature', dT: 5, value: 1 }, 'error out-of-range Member loads!G2 F1'],
    ['a temperature with from', { load: 'temperature', dT: 5, from: 1 }, 'error out-of-range Member loads!I2 F1'],
    ['a temperature of nothing', { load: 'temperature' }, 'error not-a-number Member loads!L2 F1'],
    ['a width of zero', { value: 1, width: 0 }, 'error not-positive Member loads!K2 F1'],
    ['dT beside a line load', { value: 1, dT: 4 }, 'error out-of-range Member loads!L2 F1'],
  ])('%s', (_, load, problem) => {
    expect(lines(readSheets(withLoad(load)))).toEqual([problem]);
  });

  it('dT across without the depth of its section', () => {
    const sheets = withLoad({ load: 'temperature', 'dT across': 5 });
    sheets.Sections = [
      ['section', 'A', 'I'],
      ['P', 30, 4000],
    ];
    expect(lines(readSheets(withCells({ 'Members!E2': 'P' }, sheets)))).toEqual(['error not-a-number Member loads!M2 F1']);
  });
  it('a temperature where the material has no expansion', () => {
    const sheets = withLoad({ load: 'temperature', dT: 5 });
    sheets.Materials = [
      ['material', 'E', 'fy', 'density'],
      ['oak', 60000, 40, 2100],
    ];
    expect(lines(readSheets(withCells({ 'Members!G1': 'material', 'Members!G2': 'oak' }, sheets)))).toEqual([
      'error not-a-number Member loads!L2 F1',
    ]);
  });
});

describe('loads for all frames', () => {
  it('act where the member and the case exist, and nowhere else', () => {
    const sheets = { ...sound(), 'Member loads': [head, ['*', 'dead', 'BC', 'distributed', null, null, -1]] };
    expect(lines(readSheets(sheets))).toEqual([]);
    expect([frame(sheets, 'F1'), frame(sheets, 'F2')].map((f) => f.memberLoads.length)).toEqual([0, 1]);
  });
  it('add to the rows that name a frame', () => {
    const sheets = {
      ...sound(),
      'Member loads': [
        head,
        ['*', 'dead', 'AB', 'distributed', null, null, -1],
        ['F1', 'dead', 'AB', 'distributed', null, null, -1],
      ],
    };
    expect([frame(sheets, 'F1'), frame(sheets, 'F2')].map((f) => f.memberLoads.length)).toEqual([2, 1]);
  });
});

describe('settlements', () => {
  const settle = (...rows: TestCell[][]): TestSheets => ({
    ...sound(),
    Settlements: [['frame', 'case', 'node', 'dx', 'dy', 'rz'], ...rows],
  });
  it('are read in mm and rad, blanks as not prescribed', () => {
    expect(frame(settle(['F1', 'dead', 'A', null, -10, 0.002])).settlements).toEqual([
      { case: 0, node: 0, dx_m: null, dy_m: -0.01, rz_rad: 0.002 },
    ]);
  });
  it('of 0 ask nothing, of a free direction either', () => {
    expect(frame(settle(['F1', 'dead', 'B', 0, -5, 0])).settlements).toEqual([
      { case: 0, node: 1, dx_m: null, dy_m: -0.005, rz_rad: null },
    ]);
  });
  test.each<[string, TestCell[][], string]>([
    ['on a direction that is free', [['F1', 'dead', 'B', 3, null, null]], 'error out-of-range Settlements!D2 F1'],
    [
      'twice for a node and case',
      [
        ['F1', 'dead', 'A', 3, null, null],
        ['F1', 'dead', 'A', null, 3, null],
      ],
      'error conflicting-row Settlements!C3 F1',
    ],
    [
      'the same row twice',
      [
        ['F1', 'dead', 'A', 3, null, null],
        ['F1', 'dead', 'A', 3, null, null],
      ],
      'error conflicting-row Settlements!C3 F1',
    ],
    ['of a node that is none', [['F1', 'dead', 'Q', 3, null, null]], 'error unknown-node Settlements!C2 F1'],
  ])('%s', (_, rows, problem) => {
    expect(lines(readSheets(settle(...rows)))).toEqual([problem]);
  });
  it('a row that names the frame replaces one for all', () => {
    expect(frame(settle(['*', 'dead', 'A', null, -10, null], ['F1', 'dead', 'A', null, -20, null])).settlements).toMatchObject([
      { dy_m: -0.02 },
    ]);
  });
});

describe('a node whose members are all pinned', () => {
  it('takes no moment', () => {
    const sheets = withCells({
      'Members!G1': 'start joint',
      'Members!H1': 'end joint',
      'Members!H3': 'pin',
      'Members!G4': 'pin',
      'Node loads+': ['F2', 'wind', 'B', null, null, 5],
    });
    expect(lines(readSheets(sheets))).toEqual(['error mechanism Node loads!F3 F2']);
  });
  it('takes one where a member is rigid', () => {
    const sheets = withCells({
      'Members!G1': 'start joint',
      'Members!G4': 'pin',
      'Node loads+': ['F2', 'wind', 'B', null, null, 5],
    });
    expect(lines(readSheets(sheets))).toEqual([]);
  });
});

describe('load cases', () => {
  it('are those that loads name where the sheet is absent, with a warning', () => {
    const { 'Load cases': _, ...sheets } = sound();
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual(['warning default-used Load cases!– –', 'warning no-self-weight Load cases!– –']);
    expect(intake.frames[0]?.frame?.cases.map((c) => [c.name, c.kind])).toEqual([
      ['wind', 'other'],
      ['dead', 'other'],
    ]);
  });
  it('a case for one frame applies to no other', () => {
    const sheets = withCells({ 'Load cases!D1': 'frame', 'Load cases!D3': 'F2' });
    const intake = readSheets(sheets);
    expect(intake.frames.map((f) => f.frame?.cases.map((c) => c.name))).toEqual([['dead'], ['dead', 'wind']]);
    expect(lines(intake)).toEqual(['note default-used Combinations!D2 F1']);
  });
  it('kind, alternative and reversible are kept', () => {
    const sheets = withCells({
      'Load cases!D1': 'alternative',
      'Load cases!E1': 'reversible',
      'Load cases!D3': 'w',
      'Load cases!E3': 'yes',
    });
    expect(frame(sheets).cases[1]).toEqual({
      name: 'wind',
      kind: 'wind',
      selfWeight: 0,
      alternative: 'w',
      reversible: true,
      note: null,
    });
  });
  it('a kind that is none stops the frames it applies to', () => {
    expect(lines(readSheets(withCells({ 'Load cases!B3': 'wnd' })))).toEqual(['error unknown-word Load cases!B3 F1,F2']);
  });
});
