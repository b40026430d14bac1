import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { createAnalyser } from '../analyser';
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
