import type { MemberExtremes } from '@/lib/results/result';
import type { DrawingData, DrawingLine, DrawingResult } from './drawing-data';
import { plainMethod } from './plain-method';

/** Frames small enough to check a drawing by hand, for tests. */

/** A simple beam A–B of 6 m under 12 kN/m: M = 54 kN·m at midspan, V = ±36 kN at the ends (wL²/8, wL/2). */
export function simpleBeam(): DrawingData {
  const L = 6;
  const q = -12_000;
  const xs = Array.from({ length: 13 }, (_, i) => (i * L) / 12);
  const M = xs.map((x) => (-q * x * (L - x)) / 2);
  const V = xs.map((x) => -q * (L / 2 - x));
  const v = xs.map((x) => -0.01 * Math.sin((Math.PI * x) / L));
  const extremes: MemberExtremes = {
    N: { max: 0, maxAt: 0, min: 0, minAt: 0 },
    V: { max: 36_000, maxAt: 0, min: -36_000, minAt: L },
    M: { max: 54_000, maxAt: L / 2, min: 0, minAt: 0 },
    deflection: { value: -0.01, at: L / 2 },
  };
  const line: DrawingLine = { x: xs, N: xs.map(() => 0), V, M, u: xs.map(() => 0), v, extremes, ratio: null };
  const chosen: DrawingResult = {
    name: 'C1',
    kind: 'combination',
    purpose: 'strength',
    description: 'dead + live',
    loads: [
      { case: 'dead', kind: 'distributed', member: 0, axes: 'global', direction: 'y', q1: -4000, q2: -4000, from: 0, to: L },
      { case: 'live', kind: 'distributed', member: 0, axes: 'projected', direction: 'y', q1: -8000, q2: -8000, from: 0, to: L },
    ],
    reactions: [
      { Fx: 0, Fy: 36_000, Mz: 0 },
      { Fx: 0, Fy: 36_000, Mz: 0 },
    ],
    displacements: [
      { ux: 0, uy: 0, rz: -0.005 },
      { ux: 0, uy: 0, rz: 0.005 },
    ],
    lines: [line],
    slack: [],
    method: plainMethod,
  };
  return {
    frame: 'B1',
    title: null,
    units: 'metric',
    nearLimit: 0.9,
    nodes: [
      { id: 'A', x: 0, y: 0, place: null },
      { id: 'B', x: L, y: 0, place: null },
    ],
    members: [
      {
        id: 'AB',
        start: 0,
        end: 1,
        section: 'IPE 300',
        role: 'beam',
        startJoint: 'rigid',
        endJoint: 'rigid',
        ratio: 1.003,
        verdict: 'over',
        governs: 'normal stress C1',
      },
    ],
    supports: [
      { node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle: 0 },
      { node: 1, ux: 'free', uy: 'fixed', rz: 'free', angle: 0 },
    ],
    results: [
      { name: 'dead', kind: 'case', purpose: null, criticalLoadFactor: null },
      { name: 'C1', kind: 'combination', purpose: 'strength', criticalLoadFactor: null },
    ],
    notApplicable: [],
    noCasesAlone: null,
    chosen,
    movement: null,
  };
}
