import type { Frame } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { Certificate, Failure, ResultState } from '@/lib/results/result';
import { certify, certifyStates, outsideTolerance, type SolvedState } from './certificate';
import { combinationStates } from './combination-states';
import { unheldPart } from './connected';
import { bucklingSpace } from './critical/buckling-trial';
import { criticalLoadFactor } from './critical/critical-load-factor';
import type { FlatLines } from './flat-lines';
import { solveCases, type SolvedCases } from './first-order-cases';
import { isPlain } from './plan-states';
import { refusal } from './refusals';
import { superpose } from './superpose';
import { buildTopology, topologyKey, unknowns, type Topology } from './topology';

export interface AnalyseOptions {
  /** False: no second, independent analysis of this frame ("sampled" in its certificate). Default true. */
  readonly second?: boolean;
  readonly settings?: Settings;
  /** Lines of members that the caller goes on to use, so that each is worked out once. */
  readonly lines?: FlatLines;
}
export type Analysis =
  | { readonly ok: true; readonly states: ResultState[]; readonly certificate: Certificate }
  | { readonly ok: false; readonly failure: Failure };

/** Keeps what frames of one shape share, so that a batch of variants is ordered once. */
export interface Analyser {
  analyse(frame: Frame, options?: AnalyseOptions): Analysis;
}

const rememberedTopologies = 64;

/**
 * An analyser with its own cache of topologies; one a thread. Results are the same bytes with and without the cache.
 *
 * `analyse` gives the elastic states of a frame as its settings ask for them: cases in its order (none where members are
 * tension only), then combinations (README §1, §6), with their certificate; or why there are none, in the frame's own names.
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
  const settings = options.settings ?? defaultSettings;
  const refused = refusal(frame, t.noRotation, settings) ?? unheldPart(frame);
  if (refused) return { ok: false, failure: refused };
  const solved = solveCases(frame, t, settings.shearDeformation);
  if ('code' in solved) return { ok: false, failure: solved };
  const second = options.second ?? true;
  const found = isPlain(frame, settings)
    ? plainStates(frame, t, solved, second)
    : statesAsAsked(frame, t, settings, solved, { ...options, second });
  if ('code' in found) return { ok: false, failure: found };
  const doubt = outsideTolerance(found.certificate);
  if (doubt) return { ok: false, failure: { code: 'not-solved', message: doubt, node: null } };
  return { ok: true, ...found };
}

interface Certified {
  readonly states: ResultState[];
  readonly certificate: Certificate;
}

/** First order, members that only bend: cases, and combinations as their sums. */
function plainStates(frame: Frame, t: Topology, solved: SolvedCases, second: boolean): Certified {
  const space = bucklingSpace(t);
  const combinations = frame.combinations.map((_, i) => {
    const state = superpose(frame, solved.cases, i);
    if (state.purpose !== 'strength') return state;
    return { ...state, criticalLoadFactor: criticalLoadFactor(frame, t, solved.angles, solved.diagonal, state, space) };
  });
  return { states: [...solved.cases, ...combinations], certificate: certify({ frame, t, ...solved, combinations }, second) };
}

/** Whatever the settings ask for (README §6). */
function statesAsAsked(
  frame: Frame,
  t: Topology,
  settings: Settings,
  solved: SolvedCases,
  { second = true, lines }: AnalyseOptions,
): Certified | Failure {
  const found = combinationStates(frame, t, settings, solved);
  if ('code' in found) return found;
  // what a tie does under one case alone says nothing about any combination
  const ties = frame.members.some((member) => member.tensionOnly);
  const cases = ties ? [] : solved.cases.map((state, c): SolvedState => ({ ...solved.recovered[c]!, state }));
  const all = [...cases, ...found.states];
  const { diagonal, norm } = solved;
  const { condition } = found;
  const certificate = certifyStates({ frame, settings, t, diagonal, norm, condition, solved: all, lines }, second);
  return { states: all.map(({ state }) => state), certificate };
}
