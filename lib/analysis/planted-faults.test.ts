import { describe, expect, it, vi } from 'vitest';
import type { Frame, MemberLoad } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { Certificate } from '@/lib/results/result';
import { createAnalyser } from './analyser';
import type * as CertificateModule from './certificate';
import type * as FixedEndForcesModule from './fixed-end-forces';
import type * as MemberDataModule from './member-data';
import type * as MemberLoadsModule from './member-loads';
import type * as LoadVectorsModule from './load-vectors';
import type * as AssembleModule from './assemble';
import type * as SolveModule from './solve';
import type * as RecoverModule from './recover';
import type * as SuperposeModule from './superpose';
import type * as MemberChainModule from './second-order/member-chain';
import type * as SolveSecondOrderModule from './second-order/solve-second-order';
import type * as ImperfectionForcesModule from './imperfections/imperfection-forces';
import type * as TauBModule from './stiffness-reduction/tau-b';
import type * as PlanStatesModule from './plan-states';
import type * as TieForcesModule from './tension-only/tie-forces';
import { equilibriumTolerance, leastDigits, residualTolerance, secondTolerance } from './certificate-tolerances';
import { plainCase, plainFrame, plainMember, plainSection } from './plain-frame';

/**
 * Faults planted in the first analysis, one at a time, and which items of the certificate catch each (README §5). The
 * modules of the first analysis are wrapped; the second analysis and the loads as typed import none of them.
 */
const planted = vi.hoisted(() => ({ fault: '', certificates: [] as unknown[] }));
const when = <T>(fault: string, wrong: () => T, right: () => T): T => (planted.fault === fault ? wrong() : right());

vi.mock('./certificate', async (original) => {
  const real = await original<typeof CertificateModule>();
  const seen = (certificate: Certificate): Certificate => {
    planted.certificates.push(certificate);
    return certificate;
  };
  const certify: typeof real.certify = (solved, second) => seen(real.certify(solved, second));
  const certifyStates: typeof real.certifyStates = (solved, second) => seen(real.certifyStates(solved, second));
  return { ...real, certify, certifyStates };
});
vi.mock('./fixed-end-forces', async (original) => {
  const real = await original<typeof FixedEndForcesModule>();
  const fixedEndForces: typeof real.fixedEndForces = (m, loads, joints, out, at) => {
    real.fixedEndForces(m, loads, joints, out, at);
    if (planted.fault === 'sign of a fixed-end moment') out[at + 2] = -out[at + 2]!;
  };
  return { ...real, fixedEndForces };
});
vi.mock('./member-data', async (original) => {
  const real = await original<typeof MemberDataModule>();
  type Data = ReturnType<typeof real.memberData>;
  const altered = new WeakMap<Data, Data>();
  const alter = (data: Data): Data => {
    const change = changes[planted.fault];
    if (!change) return data;
    if (!altered.has(data)) altered.set(data, data.map((m, i) => (i === 1 ? { ...m, ...change(m) } : m))); // prettier-ignore
    return altered.get(data)!;
  };
  const changes: Record<string, (m: Data[number]) => object> = {
    'a wrong cosine': (m) => ({ cos: 0.999 * m.cos }),
    'a second moment read in other units': (m) => ({ EI: 10 * m.EI }),
    'a weight in kilonewtons': (m) => ({ weight: m.weight / 1000 }),
    'a wrong shear area': (m) => ({ GAv: 2 * m.GAv }),
    'a pin taken for rigid': () => ({ startSpring: Infinity }),
  };
  return {
    ...real,
    memberData: (frame: Frame) => alter(real.memberData(frame)),
    memberDataFor: (frame: Frame, as: Parameters<typeof real.memberDataFor>[1]) => alter(real.memberDataFor(frame, as)),
  };
});
vi.mock('./member-loads', async (original) => {
  const real = await original<typeof MemberLoadsModule>();
  const rows: Record<string, (loads: readonly MemberLoad[]) => readonly MemberLoad[]> = {
    'a dropped load': (loads) => loads.slice(1),
    'a projection left out': (loads) =>
      loads.map((l) => (l.kind === 'distributed' && l.axes === 'projected' ? { ...l, axes: 'global' } : l)),
    'a swapped direction': (loads) =>
      loads.map((l) => (l.kind === 'point' ? { ...l, direction: l.direction === 'x' ? 'y' : 'x' } : l)),
  };
  const memberLoads: typeof real.memberLoads = (frame) => {
    const change = rows[planted.fault];
    return real.memberLoads(change ? { ...frame, memberLoads: change(frame.memberLoads) } : frame);
  };
  return { ...real, memberLoads };
});
vi.mock('./load-vectors', async (original) => {
  const real = await original<typeof LoadVectorsModule>();
  const loadVectors: typeof real.loadVectors = (frame, ...rest) =>
    when(
      'a dropped settlement',
      () => real.loadVectors({ ...frame, settlements: [] }, ...rest),
      () => real.loadVectors(frame, ...rest),
    );
  return { ...real, loadVectors };
});
vi.mock('./assemble', async (original) => {
  const real = await original<typeof AssembleModule>();
  const loose = (frame: Frame): Frame => ({ ...frame, supports: frame.supports.map((s) => ({ ...s, rz: typeof s.rz === 'number' ? 'free' : s.rz })) }); // prettier-ignore
  const assemble: typeof real.assemble = (K, t, frame, ...rest) =>
    real.assemble(K, t, planted.fault === 'a dropped spring' ? loose(frame) : frame, ...rest);
  return { ...real, assemble };
});
vi.mock('./solve', async (original) => {
  const real = await original<typeof SolveModule>();
  const solve: typeof real.solve = (K, t, inner, b, columns) => {
    real.solve(K, t, inner, b, columns);
    if (planted.fault === 'an inexact solution' && columns > 1) for (let i = 0; i < b.length; i++) b[i] = b[i]! * (1 + 1e-9 * (i % 3));
  }; // prettier-ignore
  return { ...real, solve };
});
vi.mock('./recover', async (original) => {
  const real = await original<typeof RecoverModule>();
  const recover: typeof real.recover = (frame, ...rest) => {
    const found = real.recover(frame, ...rest);
    if (planted.fault === 'reactions left in turned axes') {
      const [x, y] = found.reactions.slice(3, 5);
      found.reactions.set([0.995 * x! - 0.0998 * y!, 0.0998 * x! + 0.995 * y!], 3);
    }
    return found;
  };
  return { ...real, recover };
});
vi.mock('./superpose', async (original) => {
  const real = await original<typeof SuperposeModule>();
  const superpose: typeof real.superpose = (frame, cases, index) => {
    const state = real.superpose(frame, cases, index);
    if (planted.fault === 'a dropped term of a combination') {
      const last = cases[cases.length - 1]!;
      last.endForces.forEach((force, i) => (state.endForces[i] = state.endForces[i]! - state.factors[cases.length - 1]! * force));
    }
    return state;
  };
  return { ...real, superpose };
});
vi.mock('./second-order/member-chain', async (original) => {
  const real = await original<typeof MemberChainModule>();
  const memberChain: typeof real.memberChain = (m, loading, N, released, out, buckled) => {
    if (planted.fault === 'sign of a clamped end moment') {
      real.memberChain(m, loading, N, released, out, buckled);
      out.m1 = -out.m1;
      return;
    }
    if (planted.fault !== 'a missing P-δ term' || N === null) return real.memberChain(m, loading, N, released, out, buckled);
    // P-Δ of the chord alone
    real.memberChain(m, loading, null, released, out, buckled);
    out.kvv += N / m.length;
  };
  return { ...real, memberChain };
});
vi.mock('./second-order/solve-second-order', async (original) => {
  const real = await original<typeof SolveSecondOrderModule>();
  const solveSecondOrder: typeof real.solveSecondOrder = (input) => {
    if (planted.fault === 'an order too low') return real.firstOrderCombination(input);
    if (planted.fault === 'notional forces not put on') return real.solveSecondOrder({ ...input, notional: null });
    return real.solveSecondOrder(input);
  };
  return { ...real, solveSecondOrder };
});
vi.mock('./imperfections/imperfection-forces', async (original) => {
  const real = await original<typeof ImperfectionForcesModule>();
  const imperfectionForces: typeof real.imperfectionForces = (...args) => {
    const forces = real.imperfectionForces(...args);
    return forces && ((...rest) => forces(...rest).map((F) => (planted.fault === 'a notional force the wrong way' ? -F : F)));
  };
  return { ...real, imperfectionForces };
});
vi.mock('./stiffness-reduction/tau-b', async (original) => {
  const real = await original<typeof TauBModule>();
  return { ...real, tauB: (share: number) => when('a wrong reduction', () => 1, () => real.tauB(share)) }; // prettier-ignore
});
vi.mock('./plan-states', async (original) => {
  const real = await original<typeof PlanStatesModule>();
  const planStates: typeof real.planStates = (...args) =>
    real.planStates(...args).map((s) => (planted.fault === 'the 1.6 of ASD forgotten' ? { ...s, loadScale: 1 } : s));
  return { ...real, planStates };
});
vi.mock('./tension-only/tie-forces', async (original) => {
  const real = await original<typeof TieForcesModule>();
  const tieForces: typeof real.tieForces = (...args) => {
    const found = real.tieForces(...args);
    return planted.fault === 'a tie that pushes' ? { ...found, forces: found.forces.map(() => 1e6) } : found;
  };
  return { ...real, tieForces };
});

const section = (name: string, A: number, I: number) => {
  const plain = plainSection(name, A, I, 0.3);
  return { ...plain, properties: { ...plain.properties, AvShear_m2: A / 3 } };
};

/** A portal with a bit of everything: a spring, a turned support, settlement, warmth, all sorts of loads. */
function portal(): Frame {
  const on = (member: number) => ({ case: 1, member }) as const;
  const frame = plainFrame({
    nodes: [['A', 0, 0], ['B', 0, 5], ['C', 6, 6.5], ['D', 12, 5], ['E', 12, 0]],
    members: [
      plainMember('AB', 0, 1, { section: 1, role: 'column' }),
      plainMember('BC', 1, 2, { startJoint: 'pin' }),
      plainMember('CD', 2, 3),
      plainMember('DE', 3, 4, { section: 1, role: 'column' }),
    ],
    sections: [section('rafter', 53.81e-4, 8356e-8), section('column', 91e-4, 8091e-8)],
    supports: [
      { node: 0, ux: 'fixed', uy: 'fixed', rz: 4e6, angle_rad: 0 },
      { node: 4, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0.1 },
    ],
    cases: [plainCase('dead', 1), plainCase('live')],
    nodeLoads: [
      { case: 1, node: 1, Fx_N: 6e3, Fy_N: -300e3, Mz_Nm: 0 },
      { case: 1, node: 3, Fx_N: 0, Fy_N: -320e3, Mz_Nm: 2e3 },
    ],
    memberLoads: [
      { ...on(0), kind: 'distributed', axes: 'local', direction: 'y', q1_N_m: -2e3, q2_N_m: -3e3, from_m: 0, to_m: 5 },
      { ...on(1), kind: 'distributed', axes: 'projected', direction: 'y', q1_N_m: -3e3, q2_N_m: -3e3, from_m: 1, to_m: 6 },
      { ...on(2), kind: 'point', axes: 'global', direction: 'y', P_N: -9e3, at_m: 2.5 },
      { ...on(3), kind: 'moment', M_Nm: 4e3, at_m: 1.5 },
      { ...on(2), kind: 'temperature', dT_K: 15, dTAcross_K: 10 },
    ],
    settlements: [{ case: 1, node: 4, dx_m: null, dy_m: -0.01, rz_rad: 0.002 }],
    combinations: [
      { name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1.35 }, { case: 1, factor: 1.2 }] },
      { name: 'S1', purpose: 'service', terms: [{ case: 0, factor: 1 }, { case: 1, factor: 1 }] },
    ],
  }); // prettier-ignore
  return { ...frame, materials: [{ ...frame.materials[0]!, G_Pa: 81e9, fy_Pa: 60e6 }] };
}

/** The same under loads that ASD's 1.6 leaves stable. */
function lighter(): Frame {
  const frame = portal();
  return { ...frame, nodeLoads: frame.nodeLoads.map((load) => ({ ...load, Fy_N: load.Fy_N / 2 })) };
}

/** A braced bay: under wind one diagonal is slack. */
function braced(): Frame {
  const tie = { section: 2, axialOnly: true, startJoint: 'pin', endJoint: 'pin', tensionOnly: true } as const;
  const frame = portal();
  return {
    ...frame,
    nodeLoads: [{ case: 1, node: 1, Fx_N: 80e3, Fy_N: -50e3, Mz_Nm: 0 }],
    members: [...frame.members, plainMember('AD', 0, 3, tie), plainMember('BE', 1, 4, tie)],
    sections: [...frame.sections, section('rod', 4e-4, 1.3e-8)],
  };
}

const all: Settings = {
  ...defaultSettings, analysis: 'second order', imperfections: 'EN 1993-1-1', stiffnessReduction: 'AISC 360', shearDeformation: true,
}; // prettier-ignore

function itemsThatCatch(fault: string, frame: Frame, settings: Settings): string {
  planted.fault = fault;
  planted.certificates = [];
  const analysis = createAnalyser().analyse(frame, { settings });
  planted.fault = '';
  const c = planted.certificates[0] as Certificate | undefined;
  if (!c) return analysis.ok ? 'no certificate' : `refused: ${analysis.failure.message}`;
  const items = [
    !(c.residual <= residualTolerance) && 'residual',
    !(c.equilibrium <= equilibriumTolerance) && 'equilibrium',
    !(c.digits >= leastDigits) && 'digits',
    !((c.second ?? NaN) <= secondTolerance) && 'second',
  ].filter((item) => item !== false);
  expect(analysis.ok).toBe(items.length === 0);
  return items.join(' + ') || 'none';
}

describe('a certificate', () => {
  it.each([
    ['a portal, first order', portal(), defaultSettings],
    ['a portal with all settings', portal(), all],
    ['a portal under ASD', lighter(), { ...all, strengthCheck: 'AISC 360-22 ASD', imperfections: 'AISC 360' } as Settings],
    ['a braced bay', braced(), { ...all, stiffnessReduction: 'none' } as Settings],
  ])('of %s without a fault finds none', (_, frame, settings) => {
    expect(itemsThatCatch('', frame, settings)).toBe('none');
  });

  it.each([
    ['sign of a fixed-end moment', 'equilibrium + second'],
    ['a wrong cosine', 'equilibrium + second'],
    ['a dropped load', 'equilibrium + second'],
    ['a projection left out', 'equilibrium + second'],
    ['a swapped direction', 'equilibrium + second'],
    ['a second moment read in other units', 'second'],
    ['a weight in kilonewtons', 'equilibrium + second'],
    ['a pin taken for rigid', 'second'],
    ['a dropped settlement', 'second'],
    ['a dropped spring', 'residual + equilibrium + second'],
    ['an inexact solution', 'residual'],
    ['reactions left in turned axes', 'equilibrium + second'],
    ['a dropped term of a combination', 'second'],
  ])('first order, %s: caught by %s', (fault, items) => {
    expect(itemsThatCatch(fault, portal(), defaultSettings)).toBe(items);
  });

  it.each([
    ['sign of a clamped end moment', 'equilibrium + second'],
    ['a missing P-δ term', 'equilibrium + second'],
    ['an order too low', 'equilibrium + second'],
    ['a wrong shear area', 'second'],
    ['a wrong reduction', 'second'],
    ['a notional force the wrong way', 'second'],
    ['notional forces not put on', 'equilibrium + second'],
  ])('second order, %s: caught by %s', (fault, items) => {
    expect(itemsThatCatch(fault, portal(), all)).toBe(items);
  });

  it('the 1.6 of ASD forgotten: caught by the second analysis', () => {
    const asd = { ...all, strengthCheck: 'AISC 360-22 ASD', imperfections: 'AISC 360' } as const;
    expect(itemsThatCatch('the 1.6 of ASD forgotten', lighter(), asd)).toBe('second');
  });

  it('a tie that pushes: caught by the second analysis', () => {
    expect(itemsThatCatch('a tie that pushes', braced(), { ...all, analysis: 'first order', stiffnessReduction: 'none' })).toBe(
      'second',
    );
  });

  it('a wrong unit in the sheet itself: caught by none, for both analyses take the model as typed', () => {
    const frame = portal();
    const soft = { ...frame, materials: [{ ...frame.materials[0]!, E_Pa: 210e6 }] };
    expect(itemsThatCatch('', soft, defaultSettings)).toBe('none');
  });
});
