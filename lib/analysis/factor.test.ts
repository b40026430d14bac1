import { EigenvalueDecomposition, inverse, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { conditionEstimate, scaledNorm } from './condition';
import { factor } from './factor';
import { minimumDegree } from './ordering';
import { solve } from './solve';
import { patternOf, type Topology } from './topology';

/** A seeded generator (Park and Miller), so that a failure can be met again. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 16807) % 2147483647) / 2147483647;
}

const none = new Int32Array(0);
const noMembers = { rows: none, blocks: none, turned: new Uint8Array(0), heldRows: none, zeros: none, ones: none };

function join(joined: readonly Set<number>[], a: number, b: number): void {
  joined[a]!.add(b);
  joined[b]!.add(a);
}

/** A random symmetric matrix on a pattern of blocks, positive definite where `shift` is large, and its dense twin. */
function randomSystem(size: number, seed: number, shift: number): { t: Topology; K: Float64Array; dense: Matrix } {
  const random = seeded(seed);
  const joined = Array.from({ length: size }, () => new Set<number>());
  for (let i = 1; i < size; i++) for (let j = 0; j < i; j++) if (random() < 0.4) join(joined, i, j);
  const { rows } = minimumDegree(joined);
  const order = Int32Array.from({ length: size }, (_, i) => i);
  const t: Topology = {
    key: '', size, nodeAt: order, positionOf: order, ...patternOf(rows),
    free: new Uint8Array(3 * size).fill(1), noRotation: new Uint8Array(size), places: noMembers,
  }; // prettier-ignore
  const K = new Float64Array(9 * t.blocks);
  const dense = Matrix.zeros(3 * size, 3 * size);
  for (let i = 0; i < size; i++)
    for (let b = t.rowStart[i]!; b < t.rowStart[i + 1]!; b++)
      for (let r = 0; r < 3; r++)
        for (let c = t.columns[b] === i ? r : 0; c < 3; c++) {
          const j = t.columns[b]!;
          const value = random() - 0.5 + (i === j && r === c ? shift : 0);
          K[9 * b + 3 * r + c] = value;
          if (i === j) K[9 * b + 3 * c + r] = value;
          dense.set(3 * i + r, 3 * j + c, value);
          dense.set(3 * j + c, 3 * i + r, value);
        }
  return { t, K, dense };
}
const room = (t: Topology): { inner: Float64Array; pivots: Float64Array } => ({ inner: new Float64Array(6 * t.size), pivots: new Float64Array(3 * t.size) }); // prettier-ignore

describe('the factorisation', () => {
  it('solves several columns at once as a dense matrix does', () => {
    for (let seed = 1; seed <= 20; seed++) {
      const { t, K, dense } = randomSystem(1 + (seed % 7), seed, 6);
      const { inner, pivots } = room(t);
      const n = 3 * t.size;
      expect(factor(K, t, Float64Array.from(dense.diag()), inner, pivots, 1e-12)).toBe(-1);
      const b = Float64Array.from({ length: 2 * n }, (_, i) => Math.sin(i + seed));
      const x = b.slice();
      solve(K, t, inner, x, 2);
      for (const column of [0, 1]) {
        const wanted = inverse(dense).mmul(Matrix.columnVector([...b.slice(column * n, (column + 1) * n)]));
        for (let i = 0; i < n; i++) expect(x[column * n + i]).toBeCloseTo(wanted.get(i, 0), 11);
      }
    }
  });

  it('counts the negative eigenvalues of an indefinite matrix by its pivots', () => {
    for (let seed = 1; seed <= 20; seed++) {
      const { t, K, dense } = randomSystem(1 + (seed % 7), seed, 0.4);
      const { inner, pivots } = room(t);
      factor(K, t, Float64Array.from(dense.diag()), inner, pivots, 0);
      const negative = new EigenvalueDecomposition(dense).realEigenvalues.filter((value) => value < 0).length;
      expect(pivots.filter((pivot) => pivot < 0)).toHaveLength(negative);
    }
  });

  it('returns the row whose pivot is nothing against its own diagonal, whatever the scale', () => {
    for (const scale of [1e-9, 1, 1e9]) {
      const { t, K, dense } = randomSystem(1, 3, 6);
      // third row = first row: singular
      K.set(
        [dense.get(0, 0), 0.5, dense.get(0, 0), 0.5, 6, 0.5, dense.get(0, 0), 0.5, dense.get(0, 0)].map((value) => value * scale),
      );
      const diagonal = Float64Array.from([K[0]!, K[4]!, K[8]!]);
      const { inner, pivots } = room(t);
      expect(factor(K, t, diagonal, inner, pivots, 1e-12)).toBe(2);
    }
  });
});

describe('the condition estimate', () => {
  it('is at most the condition of the scaled matrix and seldom below a third of it', () => {
    for (let seed = 1; seed <= 20; seed++) {
      const { t, K, dense } = randomSystem(1 + (seed % 7), seed, 3);
      const diagonal = Float64Array.from(dense.diag());
      const norm = scaledNorm(K, t, diagonal);
      const { inner, pivots } = room(t);
      if (factor(K, t, diagonal, inner, pivots, 1e-12) >= 0) continue;
      const S = Matrix.diag(dense.diag().map((d) => 1 / Math.sqrt(d)));
      const scaled = S.mmul(dense).mmul(S);
      const norm1 = (A: Matrix): number => Math.max(...A.to2DArray()[0]!.map((_, j) => A.getColumn(j).reduce((s, v) => s + Math.abs(v), 0))); // prettier-ignore
      expect(norm).toBeCloseTo(norm1(scaled), 10);
      const exact = norm1(scaled) * norm1(inverse(scaled));
      const { condition } = conditionEstimate(K, t, inner, diagonal, norm);
      expect(condition).toBeLessThanOrEqual(exact * (1 + 1e-9));
      expect(condition).toBeGreaterThan(exact / 3);
    }
  });
});

describe('the ordering', () => {
  const around = (pairs: readonly (readonly [number, number])[], count: number): Set<number>[] => {
    const joined = Array.from({ length: count }, () => new Set<number>());
    for (const [a, b] of pairs) join(joined, a, b);
    return joined;
  };

  it('eliminates a shuffled chain from both ends in turn, so that nothing fills in', () => {
    const chain = [3, 0, 4, 1, 5, 2];
    const { order, rows } = minimumDegree(around(chain.slice(1).map((v, i) => [chain[i]!, v] as const), 6)); // prettier-ignore
    expect([...order].slice(0, 4)).toEqual([2, 3, 0, 5]);
    expect(rows.map((row) => row.length)).toEqual([1, 1, 1, 1, 1, 0]);
  });

  it('joins what an eliminated vertex stood between: a ring leaves one fill-in a vertex', () => {
    const { rows } = minimumDegree(around([[0, 1], [1, 2], [2, 3], [3, 4], [4, 0]], 5)); // prettier-ignore
    expect(rows.map((row) => row.length)).toEqual([2, 2, 2, 1, 0]);
  });

  it('takes every vertex once, parts that do not hang together included', () => {
    const { order } = minimumDegree(around([[0, 1], [3, 4]], 5)); // prettier-ignore
    expect([...order].sort()).toEqual([0, 1, 2, 3, 4]);
  });
});
