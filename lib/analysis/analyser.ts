import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Certificate, Failure, ResultState } from '@/lib/results/result';
import { assemble, diagonalOf, nodeAngles } from './assemble';
import { conditionEstimate, scaledNorm, type Condition } from './condition';
import { unheldPart } from './connected';
import { bucklingSpace, criticalLoadFactor } from './critical/critical-load-factor';
import { globalEquilibrium } from './equilibrium';
import { factor } from './factor';
import { loadVectors, type LoadVectors } from './load-vectors';
import { describeMovement, freeToMove, nullVector } from './mechanism';
import { memberData } from './member-data';
import { recover, type Recovered } from './recover';
import { refusal } from './refusals';
import { largestDifference } from './second/compare-states';
import { secondAnalysis } from './second/second-analysis';
import { solve } from './solve';
import { superpose } from './superpose';
import { buildTopology, topologyKey, unknowns, type Topology } from './topology';

export interface AnalyseOptions {
  /** False: no second, independent analysis of this frame ("sampled" in its certificate). Default true. */
  readonly second?: boolean;
  readonly settings?: Settings;
}
export type Analysis =
  | { readonly ok: true; readonly states: ResultState[]; readonly certificate: Certificate }
  | { readonly ok: false; readonly failure: Failure };

/** Keeps what frames of one shape share, so that a batch of variants is ordered once. */
export interface Analyser {
  analyse(frame: Frame, options?: AnalyseOptions): Analysis;
}

/** A pivot below this share of its own original diagonal is a mechanism. */
const pivotTolerance = 1e-12;
const residualTolerance = 1e-10;
const equilibriumTolerance = 1e-8;
const leastDigits = 6;
const secondTolerance = 1e-6;
/** The second analysis is dense: above this number of unknowns it would cost more than all the rest. */
const secondUnknowns = 300;
/** Share of the forces met on the way below which a result is taken for their rounding. */
const rounding = 1e-4;
const rememberedTopologies = 64;

/**
 * An analyser with its own cache of topologies; one a thread. Results are the same bytes with and without the cache.
 *
 * `analyse` gives the first-order elastic states of a frame, cases in its order, then combinations by superposition
 * (README §1), with their certificate; or why there are none, in the frame's own names.
 */
export function createAnalyser(): Analyser {
  const topologies = new Map<string, Topology>();
  const topologyOf = (frame: Frame): Topology => {
    const { free, noRotation } = unknowns(frame);
    const key = topologyKey(frame, free, noRotation);
    const before = topologies.get(key);
    if (before) return before;
    if (topologies.size >= rememberedTopologies) topologies.clear();
    const built = buildTopology(frame);
    topologies.set(key, built);
    return built;
  };
  return { analyse: (frame, options = {}) => analyse(frame, topologyOf(frame), options) };
}

function analyse(frame: Frame, t: Topology, options: AnalyseOptions): Analysis {
  const refused = refuseSettings(options.settings) ?? refusal(frame, t.noRotation) ?? unheldPart(frame);
  if (refused) return { ok: false, failure: refused };
  const angles = nodeAngles(frame);
  const K = new Float64Array(9 * t.blocks);
  assemble(K, t, frame, memberData(frame), angles); // K = Σ Tᵀ k T
  const diagonal = diagonalOf(K, t, new Float64Array(3 * t.size));
  const norm = scaledNorm(K, t, diagonal);
  const inner = new Float64Array(6 * t.size);
  const unheld = factor(K, t, diagonal, inner, new Float64Array(3 * t.size), pivotTolerance); // K = Uᵀ D U
  if (unheld >= 0) return { ok: false, failure: freeToMove(frame, t, angles, nullVector(K, t, inner, unheld)) };
  const condition = conditionEstimate(K, t, inner, diagonal, norm);
  const digits = -Math.log10(Number.EPSILON * condition.condition);
  if (!(digits >= leastDigits)) return { ok: false, failure: hardlyHeld(frame, t, angles, condition, digits) };
  const loads = loadVectors(frame, t, angles); // a column a case
  const d = loads.f.slice();
  solve(K, t, inner, d, frame.cases.length); // K d = f
  const recovered = frame.cases.map((_, c) => recover(frame, t, angles, loads, d, c)); // q = k T d + q_F, R = K d − f
  const cases = recovered.map((r, c) => caseState(frame, r, c));
  const space = bucklingSpace(t);
  const combinations = frame.combinations.map((_, i) => {
    const state = superpose(frame, cases, i);
    if (state.purpose !== 'strength') return state;
    return { ...state, criticalLoadFactor: criticalLoadFactor(frame, t, angles, diagonal, state, space) };
  });
  const floors = recovered.map((r) => rounding * r.handled);
  const residual = largestResidual(t, diagonal, norm, loads, d, recovered, frame.cases.length);
  const equilibrium = frame.cases.reduce(
    (most, _, c) => worse(most, globalEquilibrium(frame, c, recovered[c]!.reactions, floors[c]!)),
    0,
  );
  const certificate: Certificate = {
    residual,
    equilibrium,
    condition: condition.condition,
    digits,
    ...compareWithSecond(frame, t, cases, floors, options.second ?? true),
  };
  const doubt = outsideTolerance(certificate);
  if (doubt) return { ok: false, failure: { code: 'not-solved', message: doubt, node: null } };
  return { ok: true, states: [...cases, ...combinations], certificate };
}

function refuseSettings(settings: Settings | undefined): Failure | null {
  const beyond =
    settings &&
    ((settings.analysis !== 'first order' && 'analysis') ||
      (settings.shearDeformation && 'shear deformation') ||
      (settings.imperfections !== 'none' && 'imperfections') ||
      (settings.stiffnessReduction !== 'none' && 'stiffness reduction'));
  return beyond ? { code: 'not-solved', message: `The setting ${beyond} asks for what this version does not analyse.`, node: null } : null; // prettier-ignore
}

function caseState(frame: Frame, recovered: Recovered, index: number): ResultState {
  const factors = new Float64Array(frame.cases.length);
  factors[index] = 1;
  const { displacements, reactions, endForces } = recovered;
  return {
    name: frame.cases[index]!.name,
    kind: 'case',
    purpose: null,
    factors,
    order: 1,
    criticalLoadFactor: null,
    displacements,
    reactions,
    endForces,
  };
}

/** Certificate item 3. */
function compareWithSecond(
  frame: Frame,
  t: Topology,
  cases: readonly ResultState[],
  floors: readonly number[],
  wanted: boolean,
): Pick<Certificate, 'second' | 'secondReason'> {
  // prettier-ignore
  if (!wanted) return { second: null, secondReason: 'sampled' };
  if (t.free.reduce((sum, free) => sum + free, 0) > secondUnknowns) return { second: null, secondReason: 'too large' };
  const states = secondAnalysis(frame);
  if (!states) return { second: Infinity, secondReason: null };
  const second = states.reduce((most, state, c) => worse(most, largestDifference(frame, cases[c]!, state, floors[c]!)), 0);
  return { second, secondReason: null };
}

/** NaN is worst of all. */
function worse(a: number, b: number): number {
  return a >= b ? a : b > a ? b : NaN;
}

/** ‖K̂ d̂ − f̂‖∞ / (‖K̂‖₁‖d̂‖∞ + ‖f̂‖∞), scaled to a unit diagonal so that metres and radians may stand side by side. */
function largestResidual(
  t: Topology,
  diagonal: Float64Array,
  norm: number,
  loads: LoadVectors,
  d: Float64Array,
  recovered: readonly Recovered[],
  cases: number,
): number {
  // prettier-ignore
  let largest = 0;
  for (let c = 0; c < cases; c++) {
    let off = 0;
    let moved = 0;
    let loaded = 0;
    for (let i = 0; i < 3 * t.size; i++) {
      const scale = Math.sqrt(diagonal[i]!);
      const node = 3 * t.nodeAt[Math.floor(i / 3)]! + (i % 3);
      off = worse(off, Math.abs(recovered[c]!.outOfBalance[node]!) / scale);
      moved = worse(moved, Math.abs(d[c * 3 * t.size + i]!) * scale);
      loaded = worse(loaded, Math.abs(loads.f[c * 3 * t.size + i]!) / scale);
    }
    const size = norm * moved + loaded;
    if (size !== 0) largest = worse(largest, off / size);
  }
  return largest;
}

function hardlyHeld(frame: Frame, t: Topology, angles: Float64Array, condition: Condition, digits: number): Failure {
  // singular to working precision although each pivot passed: a mechanism all the same
  if (!(condition.condition < 1e14)) return freeToMove(frame, t, angles, condition.weakest);
  const { node, how, remedy } = describeMovement(frame, t, angles, condition.weakest);
  return {
    code: 'not-solved',
    node,
    message:
      `Node ${node} can ${how} almost freely: stiffnesses differ so much that only ${Math.max(0, Math.floor(digits))} digits ` +
      `of the results would be right (6 are asked for). ${remedy}.`,
  };
}

function outsideTolerance(c: Certificate): string | null {
  if (!(c.residual <= residualTolerance))
    return `The equations are not met closely enough: residual ${c.residual.toExponential(1)}, at most 1e-10 is asked for.`;
  if (!(c.equilibrium <= equilibriumTolerance))
    return `Loads and reactions are not in balance: ${c.equilibrium.toExponential(1)} of their size, at most 1e-8 is asked for.`;
  if (c.secondReason === null && !((c.second ?? NaN) <= secondTolerance))
    return `Two independent analyses differ by ${(c.second ?? NaN).toExponential(1)} of the largest value, at most 1e-6 is allowed.`;
  return null;
}
