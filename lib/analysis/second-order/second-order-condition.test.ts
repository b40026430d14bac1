import { inverse, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { nodeAngles } from '../assemble';
import { memberData } from '../member-data';
import { plainFrame, plainMember } from '../plain-frame';
import { buildTopology } from '../topology';
import { secondOrderCondition } from './second-order-condition';
import { secondOrderSpace } from './second-order-space';

const [L, EI, EA] = [4, 210e9 * 8356e-8, 210e9 * 53.81e-4];
const euler = (Math.PI ** 2 * EI) / (2 * L) ** 2;

function conditionUnder(P: number): number {
  const frame = plainFrame({
    nodes: [['A', 0, 0], ['B', 0, L]],
    members: [plainMember('AB', 0, 1)],
    supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }],
  }); // prettier-ignore
  const t = buildTopology(frame);
  return secondOrderCondition({
    frame, t, angles: nodeAngles(frame), data: memberData(frame), slack: null, factors: Float64Array.of(0), loadScale: 1,
    notional: null, guess: Float64Array.of(-P), space: secondOrderSpace(frame, t),
  }); // prettier-ignore
}

/** ‖K̂‖₁‖K̂⁻¹‖₁ of the column's three unknowns at its top by its stability functions. */
function exactly(P: number): number {
  const phi = Math.sqrt(P / EI) * L;
  const D = 2 - 2 * Math.cos(phi) - phi * Math.sin(phi);
  const s = ((phi * (Math.sin(phi) - phi * Math.cos(phi))) / D) * (EI / L);
  const sc = ((phi * (phi - Math.sin(phi))) / D) * (EI / L);
  const [kvv, kv] = [(2 * (s + sc)) / L ** 2 - P / L, (s + sc) / L];
  const K = new Matrix([[kvv, 0, kv], [0, EA / L, 0], [kv, 0, s]]); // prettier-ignore
  const S = Matrix.diag(K.diagonal().map((value) => 1 / Math.sqrt(value)));
  const unit = S.mmul(K).mmul(S);
  const norm = (A: Matrix): number => Math.max(...[0, 1, 2].map((c) => A.getColumn(c).reduce((sum, value) => sum + Math.abs(value), 0))); // prettier-ignore
  return norm(unit) * norm(inverse(unit));
}

describe('the condition of a second-order state', () => {
  it('is that of K under its axial forces, growing without bound towards the critical load', () => {
    // the estimate is a lower bound, within a few times of it (Higham 2002, 15.1)
    for (const share of [0.01, 0.5, 0.9, 0.99, 0.9999]) {
      const ratio = conditionUnder(share * euler) / exactly(share * euler);
      expect(ratio).toBeGreaterThan(0.2);
      expect(ratio).toBeLessThan(1 + 1e-9);
    }
    expect(conditionUnder(0.999 * euler)).toBeGreaterThan(200 * conditionUnder(0.5 * euler));
    expect(conditionUnder(1.001 * euler)).toBe(Infinity);
  });
});
