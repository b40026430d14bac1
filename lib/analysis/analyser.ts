import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Certificate, Failure, ResultState } from '@/lib/results/result';
import { certify, digitsOf, leastDigits, outsideTolerance } from './certificate';
import { assemble, diagonalOf, nodeAngles } from './assemble';
import { conditionEstimate, scaledNorm, type Condition } from './condition';
import { unheldPart } from './connected';
import { bucklingSpace, criticalLoadFactor } from './critical/critical-load-factor';
import { factor } from './factor';
import { loadVectors } from './load-vectors';
import { describeMovement, freeToMove, nullVector, strains } from './mechanism';
import { memberData } from './member-data';
import { recover, type Recovered } from './recover';
import { refusal } from './refusals';
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
  if (unheld >= 0) return { ok: false, failure: freeOrHardlyHeld(frame, t, angles, nullVector(K, t, inner, unheld)) };
  const condition = conditionEstimate(K, t, inner, diagonal, norm);
  const digits = digitsOf(condition.condition);
  if (!(digits >= leastDigits)) return { ok: false, failure: lowDigits(frame, t, angles, condition, digits) };
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
  const certificate = certify(
    { frame, t, diagonal, norm, condition: condition.condition, loads, d, recovered, cases },
    options.second ?? true,
  );
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
  return beyond
    ? { code: 'not-solved', message: `The setting ${beyond} asks for what this version does not analyse.`, node: null }
    : null;
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
    method: null,
    displacements,
    reactions,
    endForces,
  };
}

function lowDigits(frame: Frame, t: Topology, angles: Float64Array, condition: Condition, digits: number): Failure {
  // singular to working precision although each pivot passed: a mechanism all the same
  if (!(condition.condition < 1e14)) return freeOrHardlyHeld(frame, t, angles, condition.weakest);
  return hardlyHeld(frame, t, angles, condition.weakest, digits);
}

/** A movement that strains no member is a mechanism; one that does is lost beside something far stiffer. */
function freeOrHardlyHeld(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array): Failure {
  return strains(frame, t, angles, z) ? hardlyHeld(frame, t, angles, z, 0) : freeToMove(frame, t, angles, z);
}

function hardlyHeld(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array, digits: number): Failure {
  const { node, how, remedy } = describeMovement(frame, t, angles, z);
  return {
    code: 'not-solved',
    node,
    message:
      `Node ${node} can almost freely ${how}: stiffnesses differ so much that only ${Math.max(0, Math.floor(digits))} digits ` +
      `of the results would be right (6 are asked for). ${stubRemedy(frame) ?? remedy}.`,
  };
}

/** A member far shorter than the rest is what makes stiffnesses differ so much: its nodes are better one. */
function stubRemedy(frame: Frame): string | null {
  const lengths = memberData(frame).map((m) => m.length);
  const shortest = Math.min(...lengths);
  if (!(shortest < 0.02 * Math.max(...lengths))) return null;
  const { id, start, end } = frame.members[lengths.indexOf(shortest)]!;
  const nodes = `${frame.nodes[start]!.id} and ${frame.nodes[end]!.id}`;
  return `Member ${id} is ${Number((1000 * shortest).toPrecision(3))} mm long, far stiffer than the rest: make its nodes ${nodes} one`;
}
