/** solve.*: stiffness + load vectors + factor + all load cases of one frame after another, against peers with the same frames. */
import { assemble, diagonalOf, nodeAngles } from '@/lib/analysis/assemble';
import { factor } from '@/lib/analysis/factor';
import { addLoads } from '@/lib/analysis/load-vectors';
import { memberData } from '@/lib/analysis/member-data';
import { solve } from '@/lib/analysis/solve';
import { buildTopology, type Topology } from '@/lib/analysis/topology';
import type { Frame } from '@/lib/model/frame';
import { gridFrame } from './models/model-grid';
import { modelP } from './models/model-p';
import { denseSolve, denseUnknowns } from './peers/dense-peer';
import { EigenPeers, eigenMissing } from './peers/eigen-peer';
import { cpuSeconds, median, ratio, sweep } from './rounds';

/** Displacements of a peer may be this far from the engine's, against the largest of their case. */
const agreement = 1e-9;

/** The engine's own steps with room for one shape, as its analyser takes them; what it gives is x by case, 3 a position. */
export function engineSolver(t: Topology, cases: number): (frame: Frame) => Float64Array {
  const K = new Float64Array(9 * t.blocks);
  const diagonal = new Float64Array(3 * t.size);
  const inner = new Float64Array(6 * t.size);
  const pivots = new Float64Array(3 * t.size);
  const d = new Float64Array(3 * t.size * cases);
  return (frame) => {
    const angles = nodeAngles(frame);
    const data = memberData(frame);
    assemble(K, t, frame, data, angles);
    diagonalOf(K, t, diagonal);
    if (factor(K, t, diagonal, inner, pivots, 1e-12) >= 0) throw new Error(`Frame ${frame.id} can move`);
    addLoads(frame, t, angles, data, d);
    solve(K, t, inner, d, cases);
    return d;
  };
}

/** The largest difference of a frame's displacements from a peer's. @param theirs by case and node, 3 each */
function difference(t: Topology, cases: number, ours: Float64Array, theirs: (loadCase: number, at: number) => number): number {
  let worst = 0;
  for (let c = 0; c < cases; c += 1) {
    let largest = 0;
    let off = 0;
    for (let row = 0; row < 3 * t.size; row += 1) {
      const at = 3 * (t.nodeAt[Math.floor(row / 3)] ?? 0) + (row % 3);
      if (!t.free[at]) continue;
      const own = ours[3 * t.size * c + row] ?? NaN;
      largest = Math.max(largest, Math.abs(own));
      off = Math.max(off, Math.abs(own - theirs(c, at)));
    }
    worst = largest > 0 && off <= worst * largest ? worst : off / largest;
  }
  return worst;
}

function demandAgreement(name: string, peer: string, worst: number): void {
  if (!(worst <= agreement)) throw new Error(`${name}: displacements differ from those of ${peer} by ${worst.toExponential(1)}`);
  console.log(`  ${name}: displacements agree with ${peer} to ${worst.toExponential(1)}`);
}

/** Rounds in turn, after some to warm up: CPU seconds of ours, and of peers, which measure themselves. */
async function inTurn(rounds: number, ours: () => void, ...peers: (() => Promise<number>)[]): Promise<number[][]> {
  const times: number[][] = [[], ...peers.map(() => [])];
  sweep();
  for (let round = 1 - warmRounds; round <= rounds; round += 1) {
    const took = [0];
    for (const peer of peers) took.push(await peer());
    const before = cpuSeconds();
    ours();
    took[0] = cpuSeconds() - before;
    if (round > 0) took.forEach((seconds, index) => times[index]?.push(seconds));
  }
  return times;
}

/** Rounds that are not counted: until what runs is compiled for good. */
const warmRounds = 4;

interface Model {
  readonly name: string;
  readonly frames: readonly Frame[];
  /** How often all frames are solved in one round, by engine and Eigen, and by the dense peer (0 = never). */
  readonly times: number;
  readonly denseTimes: number;
}

async function models(): Promise<Model[]> {
  const { frames } = await modelP(1000);
  const [like] = frames;
  if (!like) throw new Error('Expected portals');
  const grid = (count: number, bays: number, storeys: number, cases: number): Frame[] =>
    Array.from({ length: count }, (_, variant) => gridFrame(like, bays, storeys, cases, variant));
  return [
    { name: 'P', frames, times: 40, denseTimes: 2 },
    { name: 'R', frames: grid(200, 3, 8, 5), times: 20, denseTimes: 1 },
    { name: 'B', frames: grid(3, 20, 50, 10), times: 8, denseTimes: 0 },
    { name: 'L', frames: grid(1, 60, 100, 10), times: 2, denseTimes: 0 },
  ];
}

async function solveModel(model: Model, peers: EigenPeers | null, rounds: number): Promise<Record<string, number>> {
  const { name, frames, times, denseTimes } = model;
  const [first] = frames;
  if (!first) throw new Error('Expected frames');
  const cases = first.cases.length;
  const t = buildTopology(first);
  const engine = engineSolver(t, cases);
  const all = (count: number) => (): void => {
    for (let n = 0; n < count; n += 1) for (const frame of frames) engine(frame);
  };
  const figures: Record<string, number> = {};
  const us = (seconds: readonly number[], count: number): string =>
    ((median(seconds) * 1e6) / (count * frames.length)).toPrecision(3);
  if (peers) {
    const peer = peers.holding(name, frames);
    const ordered = peers.holding(name, frames, 'ordered');
    const theirs = await peer.displacements();
    const width = 3 * first.nodes.length;
    const worst = frames.map((frame, k) =>
      difference(t, cases, engine(frame), (c, at) => theirs[(k * cases + c) * width + at] ?? NaN),
    );
    demandAgreement(name, 'Eigen', Math.max(...worst));
    const [own = [], other = [], best = []] = await inTurn(
      rounds,
      all(times),
      () => peer.solve(times),
      () => ordered.solve(times),
    );
    peer.close();
    ordered.close();
    figures[`solve.${name}.eigen`] = ratio(own, other);
    console.log(`  ${name}: engine ${us(own, times)} µs a frame, Eigen ${us(other, times)} µs`);
    console.log(`    (${us(best, times)} µs, ratio ${ratio(own, best).toPrecision(3)}, with unknowns ordered for it beforehand)`);
  }
  if (denseTimes > 0) {
    const unknownOf = denseUnknowns(t.free);
    const size = unknownOf.reduce((sum, u) => sum + (u >= 0 ? 1 : 0), 0);
    const worst = frames.map((frame) => {
      const theirs = denseSolve(frame, unknownOf, size);
      return difference(t, cases, engine(frame), (c, at) => theirs.get(unknownOf[at] ?? -1, c));
    });
    demandAgreement(name, 'ml-matrix', Math.max(...worst));
    const [own = [], other = []] = await inTurn(rounds, all(20 * denseTimes), async () => {
      const before = cpuSeconds();
      for (let n = 0; n < denseTimes; n += 1) for (const frame of frames) denseSolve(frame, unknownOf, size);
      return cpuSeconds() - before;
    });
    figures[`solve.${name}.dense`] = ratio(own, other) / 20;
    console.log(`  ${name}: engine ${us(own, 20 * denseTimes)} µs a frame, dense Cholesky ${us(other, denseTimes)} µs`);
  }
  return figures;
}

export async function solveAgainstPeers(rounds: number): Promise<Record<string, number>> {
  const missing = eigenMissing();
  if (missing) console.log(`  ${missing}`);
  const peers = EigenPeers.compiled();
  try {
    const figures: Record<string, number> = {};
    for (const model of await models()) Object.assign(figures, await solveModel(model, peers, rounds));
    return figures;
  } finally {
    peers?.close();
  }
}
