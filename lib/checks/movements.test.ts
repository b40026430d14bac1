import { describe, expect, it } from 'vitest';
import type { Frame, Limit } from '@/lib/model/frame';
import type { MemberLine, ResultState } from '@/lib/results/result';
import { beamFrame, check, combination, limit, line, member, rowOf, segment, state } from './hand-made';
import { spansOf } from './spans';

const close = (actual: number | null, expected: number, tolerance = 1e-9): void =>
  expect(Math.abs((actual ?? NaN) / expected - 1), `${actual} against ${expected}`).toBeLessThanOrEqual(tolerance);
const S1 = (...displacements: number[]): ResultState[] => [state('S1', 'service', displacements)];
const only = (limits: Limit[], change: Partial<Frame> = {}): Frame =>
  beamFrame({ combinations: [combination('S1', 'service')], limits, ...change });

/** v of a simple beam under uniform load, largest v₀ at midspan: 16 v₀/5 (ξ − 2ξ³ + ξ⁴). */
const bowed = (L: number, v0: number, from = 0, to = 0): MemberLine =>
  line(L, { v: [from, (3.2 * v0 + (to - from)) / L, 0, (-6.4 * v0) / L ** 3, (3.2 * v0) / L ** 4] });

describe('deflection of a span', () => {
  it('is measured from the line between its moved ends, against L/n', () => {
    const frame = only([limit({ measure: 'deflection', ratio: 250 })]);
    const row = rowOf(check(frame, { S1: { AB: bowed(10, -0.02, -0.05, -0.01) } }), 'deflection');
    close(row.value, 0.02);
    close(row.limit, 0.04);
    close(row.ratio, 0.5);
    expect(row).toMatchObject({
      subjectKind: 'member',
      combination: 'S1',
      verdict: 'within',
      reference: 'Limits row 2',
      quantity: 'displacement',
    });
    expect(row.at).toBeCloseTo(5, 9);
  });

  it('is found at an irrational place: the propped beam at 0.4215 L (x where 8ξ² − ξ − 1 = 0, ξ from the pinned end)', () => {
    const propped = line(10, { v: [0, 1e-3, 0, -3e-3 / 100, 2e-3 / 1000] });
    const row = rowOf(check(only([limit({ measure: 'deflection', ratio: 250 })]), { S1: { AB: propped } }), 'deflection');
    expect(row.at).toBeCloseTo((10 * (1 + Math.sqrt(33))) / 16, 8);
  });

  it('has no limit: not checked; declared none: dropped, and said so', () => {
    const silent = check(only([]), {});
    expect(rowOf(silent, 'deflection')).toMatchObject({ verdict: 'not checked', reason: 'no deflection limit', ratio: null });
    const none = check(only([]), {}, { deflectionRatio: 'none' });
    expect(none.checks.some((row) => row.check === 'deflection')).toBe(false);
    expect(none.assumptions).toContain('Deflection: declared to have no limit');
  });

  it("takes Setup's ratio as a `*` row", () => {
    close(rowOf(check(only([]), { S1: { AB: bowed(10, 0.02) } }, { deflectionRatio: 200 }), 'deflection').limit, 0.05);
    const named = only([limit({ measure: 'deflection', target: 'role', name: 'beam', ratio: 500 })]);
    close(rowOf(check(named, { S1: { AB: bowed(10, 0.02) } }, { deflectionRatio: 200 }), 'deflection').limit, 0.02);
  });

  it('has no service combination: not checked', () => {
    const frame = only([limit({ measure: 'deflection', ratio: 250 })], { combinations: [combination('C1', 'strength')] });
    expect(rowOf(check(frame, {}), 'deflection').reason).toBe('no service combinations');
    expect(rowOf(check({ ...frame, combinations: [] }, {}), 'deflection').reason).toBe('no combinations');
  });

  it.each(['column', 'strut', 'tie', 'brace'] as const)('of a %s only where a limit names it', (role) => {
    const members = [member('AB', 0, 1, { role, group: 'G' })];
    const deflections = (limits: Limit[]) =>
      check(only(limits, { members }), {}).checks.filter((row) => row.check === 'deflection').length;
    expect(deflections([])).toBe(0);
    expect(deflections([limit({ measure: 'deflection', ratio: 250 })])).toBe(0);
    expect(deflections([limit({ measure: 'deflection', ratio: 250, target: 'role', name: role })])).toBe(1);
    expect(deflections([limit({ measure: 'deflection', ratio: 250, target: 'group', name: 'g' })])).toBe(1);
  });
});

describe('deflection of a cantilever', () => {
  // tip at B: an arm whose end B has no support and no other member
  const arm = (change: Partial<Frame> = {}): Frame =>
    only([limit({ measure: 'deflection', ratio: 100 })], {
      members: [member('AB', 0, 1, { role: 'arm' })],
      supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }],
      ...change,
    });

  it('is the largest displacement relative to the root, root rotation not deducted', () => {
    // the root sinks 5 mm and turns 0.002: the tip goes down 5 + 20 + bending 30 = 55 mm
    const bent = line(10, { v: [-0.005, -0.002, -0.0003] });
    const row = rowOf(check(arm(), { S1: { AB: bent } }), 'deflection');
    close(row.value, 0.05);
    close(row.limit, 0.1);
    expect(row.at).toBe(10);
    expect(row.inputs).toMatchObject({ rule: 'cantilever', root: 'start' });
  });

  it('drawn from the tip has its root at its end', () => {
    const members = [member('AB', 1, 0, { role: 'cantilever' })];
    const row = rowOf(check(arm({ members }), { S1: { AB: line(10, { v: [0.05, 0, 0, -0.05 / 1000] }) } }), 'deflection');
    expect(row).toMatchObject({ at: 0, inputs: { root: 'end' } });
    close(row.value, 0.05);
  });

  it('an arm held at both ends is a span; a rafter with a free end too', () => {
    const both = arm({ supports: beamFrame().supports });
    expect(rowOf(check(both, { S1: { AB: bowed(10, 0.02) } }), 'deflection').inputs).toMatchObject({ rule: 'span' });
    const rafter = arm({ members: [member('AB', 0, 1, { role: 'rafter' })] });
    expect(rowOf(check(rafter, {}), 'deflection').inputs).toMatchObject({ rule: 'span' });
  });

  it('an arm in two pieces with a strut between them is measured from root to tip', () => {
    const frame = arm({
      nodes: [['A', 0, 0], ['B', 6, 0], ['C', 10, 0], ['F', 0, -6]].map(([id, x, y]) => ({ id: String(id), x_m: Number(x), y_m: Number(y), place: null })),
      members: [
        member('AB', 0, 1, { role: 'arm', span: 'arm' }), member('BC', 1, 2, { role: 'arm', span: 'arm' }), member('FB', 3, 1, { role: 'strut', axialOnly: true }),
      ],
      supports: [0, 3].map((node) => ({ node, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 })),
    }); // prettier-ignore
    const found = check(frame, { S1: { AB: line(6, { v: [0, 0, -1e-3] }), BC: line(4, { v: [-0.036, -0.012] }) } });
    const row = rowOf(found, 'deflection', 'arm');
    close(row.value, 0.084);
    close(row.limit, 0.1);
    expect(row).toMatchObject({ subjectKind: 'span', at: 10, inputs: { rule: 'cantilever', root: 'start' } });
  });
});

describe('a span split at a node', () => {
  const pieces = (reversed: boolean): Frame =>
    only([limit({ measure: 'deflection', ratio: 250 })], {
      nodes: [['A', 0], ['X', 4], ['B', 10]].map(([id, x]) => ({ id: String(id), x_m: Number(x), y_m: 0, place: null })),
      members: [member('AX', 0, 1, { span: 'roof' }), reversed ? member('XB', 2, 1, { span: 'roof' }) : member('XB', 1, 2, { span: 'roof' })],
      supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 }, { node: 2, ux: 'free', uy: 'fixed', rz: 'free', angle_rad: 0 }],
    }); // prettier-ignore
  /** Coefficients of p(s + by), and of −p(L − s) for a piece drawn the other way. */
  const shifted = (p: readonly number[], by: number): number[] => {
    const out = p.map(() => 0);
    p.forEach((c, k) => {
      for (let j = 0, binomial = 1; j <= k; j++, binomial = (binomial * (k - j + 1)) / j)
        out[j] = (out[j] ?? 0) + c * binomial * by ** (k - j);
    });
    return out;
  };
  const whole = bowed(10, -0.03, 0.01, -0.02).segments[0]?.v ?? [];

  it.each([false, true])('deflects as it does whole (second piece drawn the other way: %s)', (reversed) => {
    const second = reversed ? shifted(whole, 10).map((c, k) => (k % 2 === 0 ? -c : c)) : shifted(whole, 4);
    const lines = { S1: { AX: line(4, { v: [...whole] }), XB: line(6, { v: second }) } };
    const row = rowOf(check(pieces(reversed), lines), 'deflection', 'roof');
    close(row.value, 0.03);
    expect(row.at).toBeCloseTo(5, 7);
    close(row.limit, 0.04);
  });

  it('keeps its order however the pieces are listed', () => {
    const frame = pieces(false);
    const span = spansOf({ ...frame, members: [...frame.members].reverse() })[0];
    expect(span).toMatchObject({ startNode: 0, endNode: 2, length_m: 10, whole: true });
    expect(span?.pieces.map((p) => p.member)).toEqual([1, 0]);
  });
});

describe('sway', () => {
  const column = (change: Partial<Frame> = {}): Frame =>
    only([limit({ measure: 'sway', ratio: 300 })], {
      nodes: [{ id: 'A', x_m: 0, y_m: 0, place: null }, { id: 'B', x_m: 0, y_m: 6, place: 'eaves' }],
      members: [member('AB', 0, 1, { role: 'column' })],
      ...change,
    }); // prettier-ignore

  it('is |ux(top) − ux(bottom)| against the height', () => {
    const row = rowOf(check(column(), {}, {}, S1(0.002, 0, 0, -0.013, 0, 0)), 'sway');
    close(row.value, 0.015);
    close(row.limit, 0.02);
    expect(row).toMatchObject({ verdict: 'within', at: null });
  });

  it('is for columns, and for members without a role within 20° of vertical', () => {
    const sways = (dx: number, role: 'column' | 'rafter' | null) =>
      check(column({ nodes: [{ id: 'A', x_m: 0, y_m: 0, place: null }, { id: 'B', x_m: dx, y_m: 6, place: null }], members: [member('AB', 0, 1, { role })] }), {})
        .checks.filter((row) => row.check === 'sway').length; // prettier-ignore
    expect(sways(6, 'column')).toBe(1);
    expect(sways(0, 'rafter')).toBe(0);
    expect(sways(2.1, null)).toBe(1);
    expect(sways(2.2, null)).toBe(0);
  });

  it('a limit that names a member which is no column is not passed over', () => {
    const named = column({
      members: [member('AB', 0, 1, { role: 'brace' })],
      limits: [limit({ measure: 'sway', ratio: 300, target: 'member', name: 'AB' })],
    });
    expect(rowOf(check(named, {}), 'sway').reason).toBe('sway is measured on columns only (role column)');
  });

  it('has no limit: not checked; declared none: dropped; a column without height: not checked', () => {
    expect(rowOf(check(column({ limits: [] }), {}), 'sway').reason).toBe('no sway limit');
    expect(check(column({ limits: [] }), {}, { swayRatio: 'none' }).checks.some((row) => row.check === 'sway')).toBe(false);
    expect(
      rowOf(
        check(only([limit({ measure: 'sway', ratio: 300 })], { members: [member('AB', 0, 1, { role: 'column' })] }), {}),
        'sway',
      ).reason,
    ).toBe('a column without height has no sway');
  });
});

describe('displacement and spread', () => {
  it('displacement by direction; without one the resultant', () => {
    const row = (direction: Limit['direction']) =>
      rowOf(
        check(
          only([limit({ measure: 'displacement', target: 'node', name: 'b', direction, absolute_m: 0.02 })]),
          {},
          {},
          S1(0, 0, 0, 0.003, -0.004, 0),
        ),
        'displacement',
        'B',
      );
    close(row('x').value, 0.003);
    close(row('y').value, 0.004);
    close(row(null).value, 0.005);
    expect(row(null)).toMatchObject({ subjectKind: 'node', limit: 0.02 });
  });

  it('limits in x and in y on one node both apply, the worse governs', () => {
    const limits = [
      limit({ measure: 'displacement', target: 'node', name: 'B', direction: 'x', absolute_m: 0.01 }),
      limit({ measure: 'displacement', target: 'place', name: 'eaves', direction: 'y', absolute_m: 0.002 }),
    ];
    const row = rowOf(check(only(limits), {}, {}, S1(0, 0, 0, 0.003, -0.004, 0)), 'displacement', 'B');
    expect(row).toMatchObject({ verdict: 'over', limit: 0.002 });
  });

  it('`*` means every node; a ratio alone is no limit on a displacement', () => {
    const every = check(only([limit({ measure: 'displacement', absolute_m: 0.02 })]), {}, {}, S1(0, 0, 0, 0, 0, 0));
    expect(every.checks.filter((row) => row.check === 'displacement').map((row) => row.subject)).toEqual(['A', 'B']);
    const ratio = check(
      only([limit({ measure: 'displacement', target: 'node', name: 'B', ratio: 300 })]),
      {},
      {},
      S1(0, 0, 0, 0, 0, 0),
    );
    expect(rowOf(ratio, 'displacement', 'B').reason).toBe('needs absolute in Limits row 2');
  });

  it('spread is the change of distance, its ratio divides the distance', () => {
    const frame = only([limit({ measure: 'spread', target: 'place', name: 'base', toNode: 'B', ratio: 400 })]);
    const row = rowOf(check(frame, {}, {}, S1(-0.004, 0.1, 0, 0.006, -0.1, 0)), 'spread', 'A–B');
    close(row.value, 0.01);
    close(row.limit, 0.025);
    expect(row.subjectKind).toBe('spread');
  });

  it('a spread to a node that is not there is not checked', () =>
    expect(
      rowOf(check(only([limit({ measure: 'spread', target: 'node', name: 'A', toNode: 'Z', ratio: 400 })]), {}), 'spread', 'A–Z')
        .reason,
    ).toBe('needs to node in Limits row 2'));
});

describe('the most specific limit applies', () => {
  const rows = {
    all: limit({ measure: 'deflection', ratio: 100, source: 'all' }),
    role: limit({ measure: 'deflection', ratio: 200, target: 'role', name: 'Beam', source: 'role' }),
    group: limit({ measure: 'deflection', ratio: 300, target: 'group', name: 'g', source: 'group' }),
    member: limit({ measure: 'deflection', ratio: 400, target: 'member', name: 'ab', source: 'member' }),
  };
  const applied = (limits: Limit[], frame: Partial<Frame> = {}) =>
    rowOf(
      check(only(limits, { members: [member('AB', 0, 1, { group: 'G' })], ...frame }), {
        S1: { AB: bowed(10, 0.01) },
        S2: { AB: bowed(10, 0.01) },
      }),
      'deflection',
    ).reference;

  it('member before group before role before everything', () => {
    expect(applied([rows.all, rows.role, rows.group, rows.member])).toBe('member');
    expect(applied([rows.all, rows.role, rows.group])).toBe('group');
    expect(applied([rows.all, rows.role])).toBe('role');
    expect(applied([rows.all])).toBe('all');
  });

  it('then a named combination before blank, then a named frame before blank', () => {
    const named = { ...rows.all, combination: 's1', ratio: 50, source: 'S1' };
    expect(applied([rows.all, named])).toBe('S1');
    expect(applied([rows.role, named])).toBe('role');
    expect(applied([rows.all, { ...rows.all, namedFrame: true, source: 'this frame' }])).toBe('this frame');
    expect(applied([{ ...rows.all, namedFrame: true, source: 'this frame' }, named])).toBe('S1');
  });

  it('rows that name different combinations all apply, each in its own', () => {
    const limits = [
      { ...rows.all, combination: 'S1' },
      { ...rows.all, combination: 'S2', ratio: 1000, source: 'S2' },
    ];
    expect(applied(limits, { combinations: ['S1', 'S2', 'S3'].map((name) => combination(name, 'service')) })).toBe('S2');
  });

  it('a limit for combinations that the frame has not is no pass', () =>
    expect(rowOf(check(only([{ ...rows.all, combination: 'S9' }]), { S1: { AB: bowed(10, 0.01) } }), 'deflection')).toMatchObject(
      { verdict: 'not checked', reason: 'no deflection limit for any service combination of the frame (all)' },
    ));

  it('ratio and absolute together: the smaller allowance', () => {
    const both = (absolute_m: number) =>
      rowOf(
        check(only([limit({ measure: 'deflection', ratio: 250, absolute_m })]), { S1: { AB: bowed(10, 0.01) } }),
        'deflection',
      ).limit;
    close(both(0.03), 0.03);
    close(both(0.05), 0.04);
  });
});

describe('deflection with load points', () => {
  it('looks into every stretch', () => {
    const kinked: MemberLine = {
      length: 10,
      segments: [segment(0, 3, { v: [0, 0.01] }), segment(3, 10, { v: [0.03, -0.03 / 7] })],
    };
    const row = rowOf(check(only([limit({ measure: 'deflection', ratio: 250 })]), { S1: { AB: kinked } }), 'deflection');
    close(row.value, 0.03);
    expect(row.at).toBe(3);
  });
});
