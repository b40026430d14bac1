import { describe, expect, it, test } from 'vitest';
import { builtInDescriptions } from '@/lib/intake/families/built-in';
import { lines, readSheets, type TestCell, type TestSheets } from '@/lib/intake/sheets-of';
import type { Intake } from '@/lib/intake/intake';
import type { Frame } from '@/lib/model/frame';

const first = (intake: Intake, id?: string): Frame => {
  const found = intake.frames.find((f) => (id ? f.id === id : true))?.frame;
  if (!found) throw new Error(`stopped: ${intake.problems.map((p) => `${p.code} ${p.cell} ${p.message}`).join('; ')}`);
  return found;
};

/** A post with a push at its top, as a family of the file's own. */
function posts(variants: TestCell[][], more: TestSheets = {}): TestSheets {
  return {
    Setup: [
      ['setting', 'value'],
      ['material', 'S275'],
    ],
    Families: [
      ['family', 'parameter', 'quantity', 'unit', 'default', 'min', 'max', 'choices'],
      ['post', 'tall', 'length', 'mm', null, 1000, 9000, null],
      ['post', 'section', 'section', null, 'HE 200 A', null, null, null],
      ['post', 'top push', 'force', null, 0, null, null, null],
      ['post', 'foot', 'choice', null, 'fixed', null, null, 'fixed, sprung'],
      ['post', 'stays', 'number', null, 0, 0, 3, null],
    ],
    Nodes: [
      ['frame', 'node', 'x [mm]', 'y [mm]', 'when'],
      ['post', 'A', 0, 0, null],
      ['post', 'B', 0, '{tall}', null],
      ['post', 'C', '{tall/2}', 0, '{stays > 0}'],
    ],
    Members: [
      ['frame', 'member', 'start', 'end', 'section', 'axial only', 'when'],
      ['post', 'AB', 'A', 'B', '{section}', null, null],
      ['post', 'CB', 'C', 'B', 'IPE 100', 'yes', '{stays > 0}'],
    ],
    Supports: [
      ['frame', 'node', 'ux', 'uy', 'rz', 'when'],
      ['post', 'A', 'fixed', 'fixed', '{foot = "fixed" ? "fixed" : 5e6}', null],
      ['post', 'C', 'fixed', 'fixed', null, '{stays > 0}'],
    ],
    'Load cases': [
      ['case', 'kind', 'self weight'],
      ['dead', 'dead', 1],
      ['push', 'live', null],
    ],
    'Node loads': [
      ['frame', 'case', 'node', 'Fx', 'Fy', 'Mz'],
      ['post', 'push', 'B', '{top_push}', null, null],
    ],
    Combinations: [
      ['combination', 'purpose', 'dead', 'push'],
      ['C1', 'strength', 1, 1],
    ],
    Variants: variants,
    ...more,
  };
}

describe('a family of the file', () => {
  it('gives each variant its frame, in SI whatever the headings say', () => {
    const intake = readSheets(
      posts([
        ['frame', 'family', 'tall', 'top push [N]', 'foot', 'stays'],
        ['P1', 'Post', 4000, 2500, null, null],
        ['P2', 'post', 6000, null, 'Sprung', 1],
      ]),
    );
    expect(lines(intake)).toEqual([]);
    const [one, two] = intake.frames.map((f) => f.frame);
    expect(one?.nodes).toEqual([
      { id: 'A', x_m: 0, y_m: 0, place: null },
      { id: 'B', x_m: 0, y_m: 4, place: null },
    ]);
    expect(one?.nodeLoads).toEqual([{ case: 1, node: 1, Fx_N: 2500, Fy_N: 0, Mz_Nm: 0 }]);
    expect(one?.supports[0]?.rz).toBe('fixed');
    expect(two?.nodes.map((n) => n.id)).toEqual(['A', 'B', 'C']);
    expect(two?.members.map((m) => m.id)).toEqual(['AB', 'CB']);
    expect(two?.supports[0]?.rz).toBe(5e6);
    expect(two?.family).toEqual({
      name: 'post',
      parameters: {
        tall: { value: 6, quantity: 'length' },
        section: { value: 'HE 200 A', quantity: 'section' },
        'top push': { value: 0, quantity: 'force' },
        foot: { value: 'sprung', quantity: 'choice' },
        stays: { value: 1, quantity: 'number' },
      },
    });
  });

  test.each<[string, TestCell[][], string[]]>([
    [
      'an unknown parameter names the nearest',
      [
        ['frame', 'family', 'tall', 'top pish'],
        ['P1', 'post', 4000, 3],
      ],
      ['error unknown-word Variants!D1 P1'],
    ],
    [
      'a column without figures is passed over',
      [
        ['frame', 'family', 'tall', 'colour'],
        ['P1', 'post', 4000, null],
      ],
      ['note column-ignored Variants!D1 –'],
    ],
    [
      'a blank without a default',
      [
        ['frame', 'family', 'tall', 'stays'],
        ['P1', 'post', null, 1],
      ],
      ['error missing-id Variants!C2 P1'],
    ],
    [
      'a column without a default that is not there',
      [
        ['frame', 'family', 'stays'],
        ['P1', 'post', 1],
      ],
      ['error missing-column Variants!tall P1'],
    ],
    [
      'below the least',
      [
        ['frame', 'family', 'tall'],
        ['P1', 'post', 999],
      ],
      ['error out-of-range Variants!C2 P1'],
    ],
    [
      'above the most',
      [
        ['frame', 'family', 'tall'],
        ['P1', 'post', 9001],
      ],
      ['error out-of-range Variants!C2 P1'],
    ],
    [
      'a family that is nowhere',
      [
        ['frame', 'family', 'tall'],
        ['P1', 'pst', 4000],
      ],
      ['error unknown-word Variants!B2 P1'],
    ],
    [
      'a choice that is none',
      [
        ['frame', 'family', 'tall', 'foot'],
        ['P1', 'post', 4000, 'loose'],
      ],
      ['error unknown-word Variants!D2 P1'],
    ],
    [
      'a section that is nowhere',
      [
        ['frame', 'family', 'tall', 'section'],
        ['P1', 'post', 4000, 'HE 999 A'],
      ],
      ['error unknown-section Variants!D2 P1'],
    ],
    [
      'a unit of the wrong kind',
      [
        ['frame', 'family', 'tall [kN]'],
        ['P1', 'post', 4],
      ],
      ['error wrong-unit-kind Variants!C1 P1'],
    ],
    [
      'an unknown unit',
      [
        ['frame', 'family', 'tall [ell]'],
        ['P1', 'post', 4],
      ],
      ['error unknown-unit Variants!C1 P1'],
    ],
    [
      'a frame with the family’s name',
      [
        ['frame', 'family', 'tall'],
        ['post', 'post', 4000],
      ],
      ['error duplicate-id Variants!A2 post'],
    ],
    [
      'a variant twice with other values',
      [
        ['frame', 'family', 'tall'],
        ['P1', 'post', 4000],
        ['p1', 'post', 5000],
      ],
      ['error duplicate-id Variants!A3 P1'],
    ],
    [
      'a variant twice with the same',
      [
        ['frame', 'family', 'tall'],
        ['P1', 'post', 4000],
        ['P1', 'post', 4000],
      ],
      ['warning duplicate-id Variants!A3 P1'],
    ],
  ])('%s', (_, variants, problems) => {
    expect(lines(readSheets(posts(variants)))).toEqual(problems);
  });

  it('tells a division by zero at the template and at the variant’s own cell', () => {
    const sheets = posts([
      ['frame', 'family', 'tall', 'stays'],
      ['P1', 'post', 4000, 0],
      ['P2', 'post', 4000, 2],
    ]);
    sheets.Nodes?.push(['post', 'D', '{tall/stays + 1}', 0, '{stays != 1}']);
    sheets.Members?.push(['post', 'DB', 'D', 'B', 'IPE 100', 'yes', null]);
    expect(lines(readSheets(sheets))).toEqual(['error bad-expression Nodes!C5 P1', 'error bad-expression Variants!D2 P1']);
  });

  it('tells an expression that cannot be read once, for every variant', () => {
    const sheets = posts([
      ['frame', 'family', 'tall'],
      ['P1', 'post', 4000],
      ['P2', 'post', 4000],
    ]);
    sheets.Nodes?.push(['post', 'D', '{tall +}', 0, null]);
    expect(lines(readSheets(sheets))).toEqual(['error bad-expression Nodes!C5 P1,P2']);
  });

  it('an expression outside a family is told', () => {
    const sheets = posts([
      ['frame', 'family', 'tall'],
      ['P1', 'post', 4000],
    ]);
    sheets.Nodes?.push(['X', 'A', '{tall}', 0, null]);
    expect(lines(readSheets(sheets))).toContain('error bad-expression Nodes!C5 X');
  });

  it('rows that name a variant add loads and replace others', () => {
    const sheets = posts([
      ['frame', 'family', 'tall'],
      ['P1', 'post', 4000],
      ['P2', 'post', 4000],
    ]);
    sheets.Supports?.push(['P1', 'A', 'fixed', 'fixed', 'free', null], ['P1', 'B', 'fixed', null, null, null]);
    sheets['Node loads']?.push(['P1', 'push', 'B', 1, null, null]);
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual([]);
    const [one, two] = intake.frames.map((f) => f.frame);
    expect(one?.supports.map((s) => [s.node, s.rz])).toEqual([
      [0, 'free'],
      [1, 'free'],
    ]);
    expect(one?.nodeLoads).toHaveLength(2);
    expect(two?.supports.map((s) => [s.node, s.rz])).toEqual([[0, 'fixed']]);
  });
});

const portalHead = ['frame', 'family', 'span', 'eaves', 'rise', 'spacing', 'column', 'rafter'];
const shed = (
  more: Record<string, TestCell> = {},
  values: TestCell[] = ['P1', 'portal', 12, 4, 1.5, 5, 'HE 200 A', 'IPE 300'],
): TestSheets => ({
  Setup: [
    ['setting', 'value'],
    ['material', 'S275'],
  ],
  Variants: [
    [...portalHead, ...Object.keys(more)],
    [...values, ...Object.values(more)],
  ],
  Combinations: [
    ['combination', 'purpose', 'dead', 'wind'],
    ['C1', 'strength', 1, 1],
  ],
});

describe('the built-in portal', () => {
  it('stands A to E with its places, roles and supports', () => {
    const frame = first(readSheets(shed({ base: 'fixed' })));
    expect(frame.nodes).toEqual([
      { id: 'A', x_m: 0, y_m: 0, place: 'base' },
      { id: 'B', x_m: 0, y_m: 4, place: 'eaves' },
      { id: 'C', x_m: 6, y_m: 5.5, place: 'apex' },
      { id: 'D', x_m: 12, y_m: 4, place: 'eaves' },
      { id: 'E', x_m: 12, y_m: 0, place: 'base' },
    ]);
    expect(frame.members.map((m) => `${m.id} ${m.role} ${m.start}${m.end} ${m.span}`)).toEqual([
      'AB column 01 null',
      'BC rafter 12 null',
      'CD rafter 23 null',
      'DE column 34 null',
    ]);
    expect(frame.supports.map((s) => [s.node, s.ux, s.uy, s.rz])).toEqual([
      [0, 'fixed', 'fixed', 'fixed'],
      [4, 'fixed', 'fixed', 'fixed'],
    ]);
    expect(first(readSheets(shed())).supports.map((s) => s.rz)).toEqual(['free', 'free']);
  });

  it('without rise is one span of two rafters', () => {
    const frame = first(readSheets(shed({}, ['P1', 'portal', 12, 4, 0, 5, 'HE 200 A', 'IPE 300'])));
    expect(frame.members.map((m) => m.span)).toEqual([null, 'rafter', 'rafter', null]);
  });

  it('has its six cases, loaded or not', () => {
    const { cases } = first(readSheets(shed()));
    expect(cases.map((c) => [c.name, c.kind, c.selfWeight, c.alternative])).toEqual([
      ['dead', 'dead', 1, null],
      ['live', 'roof live', 0, null],
      ['snow', 'snow', 0, null],
      ['wind', 'wind', 0, 'wind'],
      ['wind 2', 'wind', 0, 'wind'],
      ['inside', 'wind', 0, null],
    ]);
  });

  it('turns pressures into line loads by its spacing', () => {
    const { memberLoads, members, cases } = first(
      readSheets(
        shed({
          'dead [kN/m2]': 0.4,
          'wall dead': 0.2,
          live: 0.6,
          snow: 0.8,
          'wind left wall': 0.7,
          'wind 2 right roof': -0.5,
          'pressure inside': 0.3,
        }),
      ),
    );
    const told = memberLoads.map((l) =>
      l.kind === 'distributed'
        ? `${cases[l.case]?.name} ${members[l.member]?.id} ${l.axes} ${l.direction} ${Math.round(l.q1_N_m)}`
        : l.kind,
    );
    expect(told.sort()).toEqual(
      [
        'dead AB global y -1000', 'dead DE global y -1000', 'dead BC global y -2000', 'dead CD global y -2000',
        'live BC projected y -3000', 'live CD projected y -3000', 'snow BC projected y -4000', 'snow CD projected y -4000',
        'wind AB local y -3500', 'wind 2 CD local y 2500',
        'inside AB local y 1500', 'inside BC local y 1500', 'inside CD local y 1500', 'inside DE local y 1500',
      ].sort(), // prettier-ignore
    );
  });

  it('takes restraints as lengths minor and LTB; blank = none', () => {
    const frame = first(
      readSheets(shed({ 'column restraint': 1.5, 'rafter restraint top': 1.2, 'rafter restraint bottom': 2.4 })),
    );
    expect(frame.members[0]).toMatchObject({
      lengthMinor_m: 1.5,
      lengthLtbTop_m: 1.5,
      lengthLtbBottom_m: 1.5,
      lengthMajor_m: null,
    });
    expect(frame.members[1]).toMatchObject({ lengthMinor_m: 2.4, lengthLtbTop_m: 1.2, lengthLtbBottom_m: 2.4 });
    const half = first(readSheets(shed({ 'rafter restraint top': 1.2 })));
    expect(half.members[1]).toMatchObject({ lengthMinor_m: null, lengthLtbTop_m: 1.2, lengthLtbBottom_m: null });
  });

  test.each<[string, TestCell[], Record<string, TestCell>, string]>([
    ['a span of zero', ['P1', 'portal', 0, 4, 1, 5, 'HE 200 A', 'IPE 300'], {}, 'error out-of-range Variants!C2 P1'],
    ['a rise below zero', ['P1', 'portal', 9, 4, -1, 5, 'HE 200 A', 'IPE 300'], {}, 'error out-of-range Variants!E2 P1'],
    [
      'a base that is neither',
      ['P1', 'portal', 9, 4, 1, 5, 'HE 200 A', 'IPE 300'],
      { base: 'rigid' },
      'error unknown-word Variants!I2 P1',
    ],
    ['no section for the columns', ['P1', 'portal', 9, 4, 1, 5, null, 'IPE 300'], {}, 'error missing-id Variants!G2 P1'],
    [
      'a load heading that is none of its',
      ['P1', 'portal', 9, 4, 1, 5, 'HE 200 A', 'IPE 300'],
      { 'wind lft wall': 1 },
      'error unknown-word Variants!I1 P1',
    ],
  ])('%s is told at the variant’s cell', (_, values, more, problem) => {
    expect(lines(readSheets(shed(more, values)))).toEqual([problem]);
  });

  it('keeps typed cells of Load cases and fills the others from the family', () => {
    const sheets = {
      ...shed(),
      'Load cases': [
        ['case', 'kind', 'self weight', 'note'],
        ['dead', null, 1.05, 'with paint'],
        ['wind', 'other', null, null],
      ],
    };
    const { cases } = first(readSheets(sheets));
    expect(cases.slice(0, 2)).toMatchObject([
      { name: 'dead', kind: 'dead', selfWeight: 1.05, note: 'with paint' },
      { name: 'wind', kind: 'other', alternative: 'wind' },
    ]);
    expect(cases).toHaveLength(6);
  });

  it('its cases are not those of other frames of the batch, and count 0 there with a note', () => {
    const sheets: TestSheets = {
      ...shed(),
      Nodes: [
        ['frame', 'node', 'x', 'y'],
        ['X', 'A', 0, 0],
        ['X', 'B', 3, 0],
      ],
      Members: [
        ['frame', 'member', 'start', 'end', 'section'],
        ['X', 'AB', 'A', 'B', 'IPE 200'],
      ],
      Supports: [
        ['frame', 'node', 'ux', 'uy', 'rz'],
        ['X', 'A', 'fixed', 'fixed', 'fixed'],
      ],
      'Load cases': [
        ['case', 'kind', 'self weight'],
        ['dead', 'dead', 1],
      ],
    };
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual(['note default-used Combinations!D2 X']);
    expect(first(intake, 'X').cases.map((c) => c.name)).toEqual(['dead']);
    expect(first(intake, 'X').combinations[0]?.terms).toEqual([{ case: 0, factor: 1 }]);
  });
});

const bracket = (values: Record<string, TestCell>): TestSheets => ({
  Setup: [
    ['setting', 'value'],
    ['material', 'S355'],
  ],
  Variants: [
    ['frame', 'family', ...Object.keys(values)],
    ['B1', 'bracket', ...Object.values(values)],
  ],
  Combinations: [
    ['combination', 'purpose', 'dead', 'tip'],
    ['C1', 'strength', 1, 1],
  ],
});

describe('the built-in bracket', () => {
  it('without a strut is one arm', () => {
    const frame = first(
      readSheets(bracket({ reach: 1.5, rise: 0.2, arm: 'IPE 160', 'tip Fy': -4, 'tip M': 1, 'line load': 0.6 })),
    );
    expect(frame.nodes.map((n) => [n.id, n.x_m, n.y_m, n.place])).toEqual([
      ['A', 0, 0, null],
      ['C', 1.5, 0.2, 'tip'],
    ]);
    expect(frame.members.map((m) => [m.id, m.role])).toEqual([['AC', 'arm']]);
    expect(frame.supports.map((s) => [s.node, s.rz])).toEqual([[0, 'fixed']]);
    expect(frame.nodeLoads).toEqual([{ case: 1, node: 1, Fx_N: 0, Fy_N: -4000, Mz_Nm: 1000 }]);
    expect(frame.memberLoads).toMatchObject([{ case: 0, member: 0, axes: 'global', direction: 'y', q1_N_m: -600, q2_N_m: -600 }]);
    expect(frame.cases.map((c) => [c.name, c.kind, c.selfWeight])).toEqual([
      ['dead', 'dead', 1],
      ['tip', 'live', 0],
    ]);
  });

  it('with a strut within the arm is an arm of two pieces', () => {
    const frame = first(
      readSheets(
        bracket({
          reach: 2,
          rise: 0.4,
          drop: 1,
          'strut at': 0.5,
          arm: 'IPE 160',
          strut: 'HE 100 A',
          'arm restraint': 0.5,
          root: 'pinned',
        }),
      ),
    );
    expect(frame.nodes.map((n) => [n.id, n.x_m, n.y_m])).toEqual([
      ['A', 0, 0],
      ['B', 1, 0.2],
      ['C', 2, 0.4],
      ['F', 0, -1],
    ]);
    expect(frame.members.map((m) => [m.id, m.role, m.span, m.axialOnly, m.lengthMinor_m])).toEqual([
      ['AB', 'arm', 'arm', false, 0.5],
      ['BC', 'arm', 'arm', false, 0.5],
      ['FB', 'strut', null, true, null],
    ]);
    expect(frame.supports.map((s) => [s.node, s.ux, s.uy, s.rz])).toEqual([
      [0, 'fixed', 'fixed', 'free'],
      [3, 'fixed', 'fixed', 'free'],
    ]);
  });

  it('with a strut at the tip, from above, is a tied arm', () => {
    const frame = first(readSheets(bracket({ reach: 2, drop: -1, 'strut at': 1, arm: 'IPE 160', strut: 'IPE 100' })));
    expect(frame.members.map((m) => m.id)).toEqual(['AC', 'FC']);
    expect(frame.nodes[2]).toMatchObject({ id: 'F', x_m: 0, y_m: 1 });
  });

  test.each<[string, Record<string, TestCell>, string]>([
    ['no reach', { reach: 0, arm: 'IPE 160' }, 'error out-of-range Variants!C2 B1'],
    ['a pinned root and no strut', { reach: 2, arm: 'IPE 160', root: 'pinned' }, 'error out-of-range Variants!E2 B1'],
    [
      'a strut and no drop',
      { reach: 2, arm: 'IPE 160', strut: 'IPE 100', 'strut at': 0.5, drop: 0 },
      'error out-of-range Variants!G2 B1',
    ],
    [
      'a strut beyond the tip',
      { reach: 2, arm: 'IPE 160', strut: 'IPE 100', 'strut at': 1.2, drop: 1 },
      'error out-of-range Variants!F2 B1',
    ],
    [
      'a strut without a section',
      { reach: 2, arm: 'IPE 160', 'strut at': 0.5, drop: 1, strut: null },
      'error out-of-range Variants!G2 B1',
    ],
  ])('%s is told at its cell', (_, values, problem) => {
    expect(lines(readSheets(bracket(values)))).toEqual([problem]);
  });
});

describe('the built-in families are families like any other', () => {
  /** The sheets of a description as a person would send them, under another name. */
  const asSheets = (name: string, own: string): TestSheets => {
    const description = builtInDescriptions.find((each) => each.name === name);
    const rename = (cell: string | number | null): TestCell => (cell === name ? own : cell);
    return Object.fromEntries(
      Object.entries(description?.sheets ?? {}).map(([sheet, rows]) => [sheet, rows.map((row) => row.map(rename))]),
    );
  };

  test.each<[string, Record<string, TestCell>]>([
    [
      'portal',
      {
        span: 12,
        eaves: 4,
        rise: 1.5,
        spacing: 5,
        column: 'HE 200 A',
        rafter: 'IPE 300',
        snow: 0.7,
        'wind left wall': 0.5,
        'rafter restraint top': 1.2,
      },
    ],
    [
      'bracket',
      { reach: 2, rise: 0.4, drop: 1, 'strut at': 0.5, arm: 'IPE 160', strut: 'HE 100 A', 'tip Fy': -4, 'line load': 1 },
    ],
  ])('%s written into a file gives the same frame', (name, values) => {
    const batch = (family: string, more: TestSheets): TestSheets => ({
      Setup: [['setting', 'value'], ['material', 'S275']],
      Variants: [['frame', 'family', ...Object.keys(values)], ['V', family, ...Object.values(values)]],
      ...more,
    }); // prettier-ignore
    const built = readSheets(batch(name, {}));
    const own = readSheets(batch('own', asSheets(name, 'own')));
    expect(lines(own)).toEqual([]);
    expect({ ...first(own), family: null }).toEqual({ ...first(built), family: null });
    expect(first(own).family?.parameters).toEqual(first(built).family?.parameters);
  });

  it('read a US batch in feet, psf and kip', () => {
    const sheets: TestSheets = {
      Setup: [['setting', 'value'], ['material', 'A992'], ['units', 'us']],
      Variants: [
        ['frame', 'family', 'span', 'eaves', 'rise', 'spacing', 'column', 'rafter', 'snow', 'rafter restraint top [in]'],
        ['V', 'portal', 40, 14, 3, 20, 'W12X26', 'W12X26', 25, 60],
      ],
    }; // prettier-ignore
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual([]);
    const frame = first(intake);
    expect(frame.nodes[2]?.x_m).toBeCloseTo(20 * 0.3048, 12);
    expect(frame.members[1]?.lengthLtbTop_m).toBeCloseTo(60 * 0.0254, 12);
    // 25 psf × 20 ft, 1 psf × 1 ft = 14.5939 N/m (sheets §2)
    const [snow] = frame.memberLoads;
    expect(snow?.kind === 'distributed' ? snow.q1_N_m : NaN).toBeCloseTo(-25 * 20 * 14.5939, 1);
  });

  it('a frame with the name of a family is listed and not run, and the family’s rows stay the family’s', () => {
    const sheets = shed();
    sheets.Frames = [['frame'], ['P1'], ['Portal']];
    sheets.Supports = [['frame', 'node', 'ux', 'uy', 'rz'], ['portal', 'A', 'fixed', 'fixed', 'fixed']];
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual(['error duplicate-id Frames!A3 Portal']);
    expect(intake.frames.map((f) => [f.id, f.frame !== null])).toEqual([['P1', true], ['Portal', false]]);
    expect(first(intake).supports[0]?.rz).toBe('fixed');
  }); // prettier-ignore

  it('a row that names the family changes all its variants', () => {
    const sheets = shed();
    sheets.Supports = [['frame', 'node', 'ux', 'uy', 'rz'], ['portal', 'A', 'fixed', 'fixed', 'fixed'], ['P1', 'E', 'fixed', 'fixed', 2000]]; // prettier-ignore
    expect(first(readSheets(sheets)).supports.map((s) => [s.node, s.rz])).toEqual([[0, 'fixed'], [4, 2e6]]); // prettier-ignore
  });

  it('an area load added to a variant takes the spacing of its parameter, or of Frames', () => {
    const sheets = shed();
    sheets['Member loads'] = [['frame', 'case', 'member', 'load', 'value [kN/m²]'], ['P1', 'snow', 'AB', 'distributed', -1]];
    const added = (): number => {
      const load = first(readSheets(sheets)).memberLoads.at(-1);
      return load?.kind === 'distributed' ? load.q1_N_m : NaN;
    };
    const frame = first(readSheets(sheets));
    expect(added()).toBeCloseTo(-1000 * Number(frame.family?.parameters['spacing']?.value), 6);
    sheets.Frames = [['frame', 'spacing'], ['P1', 7]];
    expect(added()).toBeCloseTo(-7000, 6);
  }); // prettier-ignore

  it('a limit on the family takes the place of one for all, and one on the variant of both', () => {
    const sheets = shed();
    sheets.Limits = [['applies to', 'measure', 'ratio', 'frame'], ['rafter', 'deflection', 200, null], ['rafter', 'deflection', 300, 'portal']];
    expect(lines(readSheets(sheets))).toEqual([]);
    expect(first(readSheets(sheets)).limits.map((l) => [l.ratio, l.namedFrame])).toEqual([[300, false]]);
    sheets.Limits.push(['rafter', 'deflection', 400, 'P1']);
    expect(first(readSheets(sheets)).limits.filter((l) => l.namedFrame).map((l) => l.ratio)).toEqual([400]);
  }); // prettier-ignore

  it('tells what is wrong with a template row at the template, for the variants it touches', () => {
    const sheets = {
      ...shed(),
      'Member loads': [
        ['frame', 'case', 'member', 'load', 'value'],
        ['portal', 'dead', 'XY', 'distributed', -1],
      ],
    };
    expect(lines(readSheets(sheets))).toEqual(['error unknown-member Member loads!C2 P1']);
  });
});
