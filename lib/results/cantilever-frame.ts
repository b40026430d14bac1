import type { Frame } from '@/lib/model/frame';

/**
 * For tests: a cantilever of 3 m, 200 mm × 100 mm solid steel bar, 2 kN downwards at its tip in case "tip", with self-weight in
 * case "dead"; one strength and one service combination.
 */
export function cantileverFrame(id: string, change: Partial<Frame> = {}): Frame {
  const [b, h] = [0.1, 0.2];
  const A = b * h;
  return {
    id,
    title: null,
    group: null,
    count: 1,
    note: null,
    family: null,
    nodes: [
      { id: 'A', x_m: 0, y_m: 0, place: 'base' },
      { id: 'B', x_m: 3, y_m: 0, place: 'tip' },
    ],
    members: [
      {
        id: 'AB',
        start: 0,
        end: 1,
        section: 0,
        material: 0,
        role: 'arm',
        startJoint: 'rigid',
        endJoint: 'rigid',
        axialOnly: false,
        tensionOnly: false,
        turned: false,
        span: null,
        lengthMajor_m: null,
        lengthMinor_m: null,
        lengthLtbTop_m: null,
        lengthLtbBottom_m: null,
        group: null,
      },
    ],
    sections: [
      {
        name: 'BAR',
        designation: null,
        shape: 'bar',
        made: null,
        dimensions: { h, b, tw: null, tf: null, r: null, t: null, d: null },
        properties: {
          A_m2: A,
          I_m4: (b * h ** 3) / 12,
          Wtop_m3: (b * h * h) / 6,
          Wbottom_m3: (b * h * h) / 6,
          depth_m: h,
          width_m: b,
          AvTyped_m2: null,
          AvPeak_m2: (2 * A) / 3,
          AvPeakTurned_m2: (2 * A) / 3,
          AvShear_m2: (5 * A) / 6,
          AvShearTurned_m2: (5 * A) / 6,
          Wpl_m3: (b * h * h) / 4,
          Iminor_m4: (h * b ** 3) / 12,
          Wminor_m3: (h * b * b) / 6,
          WplMinor_m3: (h * b * b) / 4,
          It_m4: 0.229 * h * b ** 3,
          Iw_m6: 0,
          t_m: b,
        },
        sources: {},
      },
    ],
    materials: [
      {
        name: 'S235',
        grade: 'S235',
        standard: 'EN',
        E_Pa: 210e9,
        G_Pa: 81e9,
        fy_Pa: 215e6,
        fu_Pa: 360e6,
        density_kg_m3: 7850,
        expansion_perK: 12e-6,
        sources: {},
      },
    ],
    supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }],
    cases: [
      { name: 'dead', kind: 'dead', selfWeight: 1, alternative: null, reversible: false, note: null },
      { name: 'tip', kind: 'live', selfWeight: 0, alternative: null, reversible: false, note: null },
    ],
    nodeLoads: [{ case: 1, node: 1, Fx_N: 0, Fy_N: -2000, Mz_Nm: 0 }],
    memberLoads: [],
    settlements: [],
    combinations: [
      {
        name: 'C1',
        purpose: 'strength',
        terms: [
          { case: 0, factor: 1 },
          { case: 1, factor: 1 },
        ],
      },
      { name: 'S1', purpose: 'service', terms: [{ case: 1, factor: 1 }] },
    ],
    limits: [],
    notChecked: [],
    ...change,
  };
}
