import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { createAnalyser } from '../analyser';
import { analyseCombination, stateOf } from '../second-order/analyse-combination';
import { nodeAngles } from '../assemble';
import { loadVectors } from '../load-vectors';
import { buildTopology } from '../topology';
import { plainCase, plainFrame, plainMember, plainSection } from '../plain-frame';
import { randomFrame } from '../random-frame';
import { behindFrame } from './behind-frame';
import { behindMember, type BehindMember } from './behind-member';

const seeded = { seed: 20261201, numRuns: 60, endOnFailure: true };
const analyser = createAnalyser();

function statesOf(frame: Frame): readonly ResultState[] {
  const analysis = analyser.analyse(frame, { second: false });
  if (!analysis.ok) fc.pre(analysis.failure.code !== 'mechanism');
  if (!analysis.ok) throw new Error(analysis.failure.message);
  return analysis.states;
}

/** 6 × 6 times 6. */
const times = (matrix: readonly number[], vector: readonly number[]): number[] =>
  [0, 1, 2, 3, 4, 5].map((row) => vector.reduce((sum, value, column) => sum + matrix[6 * row + column]! * value, 0));

/** Size of the terms that a row is the sum of. */
const sizes = (matrix: readonly number[], vector: readonly number[]): number[] =>
  [0, 1, 2, 3, 4, 5].map((row) => vector.reduce((sum, value, column) => sum + Math.abs(matrix[6 * row + column]! * value), 0));

function sizesOf(frame: Frame, state: ResultState, member: number): number[] {
  const { local, localDisplacements } = behindMember(frame, state, member);
  return sizes(local, localDisplacements);
}

describe('the numbers behind a member', () => {
  it('give the end forces that are stored: k T d + q_F = q, in every state of any frame', () => {
    fc.assert(
      fc.property(randomFrame, (frame) => {
        for (const state of statesOf(frame))
          frame.members.forEach(({ id }, index) => {
            const behind = behindMember(frame, state, index);
            const q = times(behind.local, times(behind.turn, behind.displacements));
            const size = Math.max(1, ...sizes(behind.local, behind.localDisplacements), ...behind.fixedEnd.map(Math.abs));
            for (let r = 0; r < 6; r++) {
              const off = Math.abs(q[r]! + behind.fixedEnd[r]! - behind.stored[r]!) / size;
              expect(off, `${state.name} ${id} row ${r}`).toBeLessThan(1e-9);
              expect(Math.abs(behind.endForces[r]! - behind.stored[r]!) / size).toBeLessThan(1e-9);
            }
          });
      }),
      seeded,
    );
  });

  it('give them in second order, with shear, joints, reduced stiffness, notional forces and a load scale', () => {
    let asked = 0;
    fc.assert(
      fc.property(randomFrame, fc.boolean(), fc.constantFrom(1, 1.6), (frame, shearDeformation, loadScale) => {
        const state = analyseCombination(frame, 0, {
          shearDeformation,
          loadScale,
          stiffness: Float64Array.from({ length: 2 * frame.members.length }, (_, i) => (i % 2 ? 0.72 : 0.8)),
          notional: Float64Array.from({ length: 2 * frame.nodes.length }, (_, i) => (i % 2 ? 0 : 900)),
        });
        fc.pre('name' in state);
        if (!('name' in state)) return;
        asked += 1;
        const { directions } = behindFrame(frame, state);
        const handled = Math.max(1, ...directions.map(({ load }) => Math.abs(load ?? 0)));
        frame.members.forEach(({ id }, index) => {
          const behind = behindMember(frame, state, index);
          const size = Math.max(handled, ...sizes(behind.local, behind.localDisplacements), ...behind.fixedEnd.map(Math.abs));
          for (let r = 0; r < 6; r++)
            expect(Math.abs(behind.endForces[r]! - behind.stored[r]!) / size, `${id} row ${r}`).toBeLessThan(1e-9);
        });
        const forces = [handled, ...frame.members.flatMap((_, i) => sizesOf(frame, state, i))];
        for (const { left } of directions) expect(Math.abs(left ?? 0) / Math.max(...forces)).toBeLessThan(1e-9);
      }),
      seeded,
    );
    expect(asked).toBeGreaterThan(20);
  });

  it('are those of stability functions under a constant axial force (s, sc: Livesley and Chandler 1956)', () => {
    const frame = {
      ...cantilever(),
      combinations: [{ name: 'C1', purpose: 'strength' as const, terms: [{ case: 0, factor: 1 }] }],
    };
    const pressed = { ...frame, nodeLoads: [{ case: 0, node: 1, Fx_N: -4e6, Fy_N: -5000, Mz_Nm: 0 }] };
    const { bent, k, data } = behindMember(pressed, stateOf(pressed), 0);
    const phi = data.length * Math.sqrt(4e6 / data.EI);
    const [sin, cos] = [Math.sin(phi), Math.cos(phi)];
    expect(bent!.N[0]).toBeCloseTo(-4e6, 3);
    expect(bent!.phi).toBeCloseTo(phi, 9);
    expect(bent!.s).toBeCloseTo((phi * (sin - phi * cos)) / (2 - 2 * cos - phi * sin), 9);
    expect(bent!.sc).toBeCloseTo((phi * (phi - sin)) / (2 - 2 * cos - phi * sin), 9);
    const L = data.length;
    expect(k.kvv / ((k.S11 + 2 * k.S12 + k.S22) / L ** 2 - 4e6 / L)).toBeCloseTo(1, 9);
  });

  it('leave a slack tie without stiffness, its weight on its nodes', () => {
    const frame: Frame = {
      ...cantilever(),
      nodes: [...cantilever().nodes, { id: 'C', x_m: 0, y_m: -2, place: null }],
      members: [
        plainMember('AB', 0, 1),
        plainMember('CB', 2, 1, { startJoint: 'pin', endJoint: 'pin', axialOnly: true, tensionOnly: true }),
      ],
      supports: [0, 2].map((node) => ({ node, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'fixed' as const, angle_rad: 0 })),
      cases: [plainCase('live', 1)],
      combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1 }] }],
    };
    for (const order of [1, 2] as const) {
      const state = stateOf(frame, 0, { slack: [1] }, order);
      const tie = behindMember(frame, state, 1);
      expect(tie.slack).toBe(true);
      expect([...tie.local, ...tie.endForces].every((value) => value === 0)).toBe(true);
      for (const { left } of behindFrame(frame, state).directions) expect(Math.abs(left ?? 0)).toBeLessThan(1e-5);
    }
  });

  it('write the stiffness between the nodes as Tᵀ k T, symmetric, and the movement as T d', () => {
    fc.assert(
      fc.property(randomFrame, (frame) => {
        const state = statesOf(frame)[0]!;
        frame.members.forEach((_, index) => {
          const { local, turn, global, displacements, localDisplacements } = behindMember(frame, state, index);
          const most = Math.max(...local.map(Math.abs));
          for (let i = 0; i < 6; i++) {
            expect(times(turn, displacements)[i]!).toBeCloseTo(localDisplacements[i]!, 12);
            for (let j = 0; j < 6; j++) {
              let sum = 0;
              for (let a = 0; a < 6; a++)
                for (let b = 0; b < 6; b++) sum += turn[6 * a + i]! * local[6 * a + b]! * turn[6 * b + j]!;
              expect(Math.abs(sum - global[6 * i + j]!) / most).toBeLessThan(1e-12);
              expect(Math.abs(global[6 * i + j]! - global[6 * j + i]!) / most).toBeLessThan(1e-12);
            }
          }
        });
      }),
      { ...seeded, numRuns: 20 },
    );
  });

  it('number every unknown once, and leave nothing over of K d = f', () => {
    fc.assert(
      fc.property(randomFrame, (frame) => {
        for (const state of statesOf(frame)) {
          const { directions, unknowns } = behindFrame(frame, state);
          const rows = directions.flatMap(({ row }) => row ?? []);
          expect(new Set(rows).size).toBe(unknowns);
          const forces = [...state.endForces, ...directions.flatMap(({ load }) => load ?? [])].map(Math.abs);
          for (const { left } of directions) expect(Math.abs(left ?? 0)).toBeLessThan(1e-8 * Math.max(1, ...forces));
        }
      }),
      { ...seeded, numRuns: 30 },
    );
  });

  it('show the load vector that was solved', () => {
    fc.assert(
      fc.property(randomFrame, (frame) => {
        const states = statesOf(frame);
        const t = buildTopology(frame);
        const { f } = loadVectors(frame, t, nodeAngles(frame));
        frame.cases.forEach((_, c) => {
          const column = f.subarray(3 * t.size * c, 3 * t.size * (c + 1));
          const size = Math.max(1, ...column.map(Math.abs));
          for (const { row, load } of behindFrame(frame, states[c]!).directions)
            if (row !== null) expect(Math.abs(load! - column[row - 1]!) / size, `row ${row}`).toBeLessThan(1e-9);
        });
      }),
      { ...seeded, numRuns: 30 },
    );
  });

  it('sum the members’ shares and the loads on nodes to the load vector', () => {
    const frame = cantilever();
    const state = statesOf(frame)[0]!;
    const { directions } = behindFrame(frame, state);
    const share = behindMember(frame, state, 0).toLoadVector;
    // 5 kN down at the tip; 2 kN/m over 3 m: wL/2 = 3 kN, wL²/12 = 1.5 kN·m (statics; fixed-end moment of any handbook)
    expect(share[4]).toBeCloseTo(-3000, 6);
    expect(share[5]).toBeCloseTo(1500, 6);
    expect(directions.map(({ load }) => load && Math.round(load))).toEqual([null, null, null, 0, -8000, 1500]);
    expect(directions.map(({ kind }) => kind)).toEqual(['held', 'held', 'held', 'unknown', 'unknown', 'unknown']);
  });

  it('are the book’s: EA/L, 12EI/L³, 6EI/L², 4EI/L, 2EI/L of a member with rigid ends', () => {
    const frame = cantilever();
    const { local, data }: BehindMember = behindMember(frame, statesOf(frame)[0]!, 0);
    const [L, EA, EI] = [data.length, data.EA, data.EI];
    const a = EA / L, b = (12 * EI) / L ** 3, c = (6 * EI) / L ** 2, d = (4 * EI) / L, e = (2 * EI) / L; // prettier-ignore
    const book = [
      a, 0, 0, -a, 0, 0,
      0, b, c, 0, -b, c,
      0, c, d, 0, -c, e,
      -a, 0, 0, a, 0, 0,
      0, -b, -c, 0, b, -c,
      0, c, e, 0, -c, d,
    ]; // prettier-ignore
    local.forEach((value, i) => expect(value / (book[i] || 1), String(i)).toBeCloseTo(book[i] ? 1 : 0, 12));
  });

  it('asks for a member of the frame', () => {
    const frame = cantilever();
    expect(() => behindMember(frame, statesOf(frame)[0]!, 7)).toThrow(new RangeError('Expected a member below 1, got 7'));
  });
});

function cantilever(): Frame {
  return plainFrame({
    nodes: [
      ['A', 0, 0],
      ['B', 3, 0],
    ],
    members: [plainMember('AB', 0, 1)],
    sections: [plainSection('beam', 53.81e-4, 8356e-8, 0.3)],
    supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }],
    cases: [plainCase('live')],
    nodeLoads: [{ case: 0, node: 1, Fx_N: 0, Fy_N: -5000, Mz_Nm: 0 }],
    memberLoads: [
      {
        case: 0,
        member: 0,
        kind: 'distributed',
        axes: 'global',
        direction: 'y',
        q1_N_m: -2000,
        q2_N_m: -2000,
        from_m: 0,
        to_m: 3,
      },
    ],
    combinations: [],
  });
}
