/** recover.P.solve: recovery, exact extremes and checks of twelve combinations, against solving the frame alone. */
import { assemble, diagonalOf, nodeAngles } from '@/lib/analysis/assemble';
import { factor } from '@/lib/analysis/factor';
import { loadVectors, type LoadVectors } from '@/lib/analysis/load-vectors';
import { extremeNumbers, writeExtremes } from '@/lib/analysis/member-extremes';
import { memberData } from '@/lib/analysis/member-data';
import { recover } from '@/lib/analysis/recover';
import { solve } from '@/lib/analysis/solve';
import { superpose } from '@/lib/analysis/superpose';
import { buildTopology, type Topology } from '@/lib/analysis/topology';
import { checkFrame } from '@/lib/checks/check-frame';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { lineMemo } from '@/lib/results/line-memo';
import type { ResultState } from '@/lib/results/result';
import { modelP } from './models/model-p';
import { interleaved, median, ratio } from './rounds';
import { engineSolver } from './solve';

interface SolvedFrame {
  readonly frame: Frame;
  readonly angles: Float64Array;
  readonly loads: LoadVectors;
  readonly d: Float64Array;
}

function solved(frame: Frame, t: Topology): SolvedFrame {
  const angles = nodeAngles(frame);
  const K = new Float64Array(9 * t.blocks);
  const inner = new Float64Array(6 * t.size);
  assemble(K, t, frame, memberData(frame), angles);
  const diagonal = diagonalOf(K, t, new Float64Array(3 * t.size));
  factor(K, t, diagonal, inner, new Float64Array(3 * t.size), 1e-12);
  const loads = loadVectors(frame, t, angles);
  const d = loads.f.slice();
  solve(K, t, inner, d, frame.cases.length);
  return { frame, angles, loads, d };
}

const extremes = new Float64Array(extremeNumbers);

/** What comes after the solution: states of cases and combinations, lines, their extremes, checks. */
function recovered({ frame, angles, loads, d }: SolvedFrame, t: Topology, settings: Settings): number {
  const cases = frame.cases.map(({ name }, index): ResultState => {
    const { displacements, reactions, endForces } = recover(frame, t, angles, loads, d, index);
    const factors = new Float64Array(frame.cases.length);
    factors[index] = 1;
    const rest = { purpose: null, order: 1 as const, criticalLoadFactor: null, method: null };
    return { name, kind: 'case', factors, ...rest, displacements, reactions, endForces };
  });
  const combinations = frame.combinations.map((_, index) => ({ ...superpose(frame, cases, index), criticalLoadFactor: 12 }));
  const lineOf = lineMemo(frame);
  for (const state of combinations) {
    const lines = lineOf.flat.of(state);
    for (let member = 0; member < frame.members.length; member += 1) {
      const at = lines.at(member);
      writeExtremes(lines.numbers, at, extremes, 0);
    }
  }
  const { checks } = checkFrame(frame, settings, combinations, lineOf, { all: false });
  lineOf.flat.forget();
  return checks.length;
}

export async function recoverAgainstSolve(rounds: number): Promise<Record<string, number>> {
  const { frames, settings } = await modelP(1000);
  const [first] = frames;
  if (!first) throw new Error('Expected portals');
  const t = buildTopology(first);
  const engine = engineSolver(t, first.cases.length);
  const ready = frames.map((frame) => solved(frame, t));
  const solveTimes = 30;
  const [after = [], alone = []] = await interleaved(
    [
      {
        name: 'recovery',
        work: () => {
          for (const one of ready) if (recovered(one, t, settings) === 0) throw new Error('Expected checks');
        },
      },
      {
        name: 'solving',
        work: () => {
          for (let n = 0; n < solveTimes; n += 1) for (const frame of frames) engine(frame);
        },
      },
    ],
    rounds,
    'cpu',
  );
  const per = 1e6 / frames.length;
  const solve_us = (median(alone) * per) / solveTimes;
  console.log(`  recovery, extremes, checks ${(median(after) * per).toFixed(1)} µs a frame, solving ${solve_us.toFixed(2)} µs`);
  return { 'recover.P.solve': ratio(after, alone) * solveTimes };
}
