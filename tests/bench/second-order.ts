/**
 * second.P.first: second order without α_cr, against first order, each through the checks of twelve combinations.
 * chain.W.eigen: the everyday load against as many bare factorisations and solutions of the same frames by Eigen.
 */
import { createAnalyser } from '@/lib/analysis/analyser';
import { checkFrame } from '@/lib/checks/check-frame';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { evaluateFrame } from '@/lib/results/evaluate';
import { lineMemo } from '@/lib/results/line-memo';
import type { ResultState } from '@/lib/results/result';
import { modelP } from './models/model-p';
import { modelW } from './models/model-w';
import { EigenPeers, eigenMissing } from './peers/eigen-peer';
import { cpuSeconds, interleaved, median, ratio } from './rounds';

const analyser = createAnalyser();

/** α_cr is for strength only: combinations are analysed as service ones and checked as what they are. */
function withoutCritical(frame: Frame, settings: Settings): number {
  const service = { ...frame, combinations: frame.combinations.map((each) => ({ ...each, purpose: 'service' as const })) };
  const analysis = analyser.analyse(service, { second: false, settings });
  if (!analysis.ok) throw new Error(`${frame.id}: ${analysis.failure.message}`);
  const strength = new Set(frame.combinations.flatMap(({ name, purpose }) => (purpose === 'strength' ? [name] : [])));
  const states = analysis.states.map((state): ResultState =>
    state.kind === 'combination' && strength.has(state.name) ? { ...state, purpose: 'strength' } : state,
  );
  return checkFrame(service, settings, states, lineMemo(service), { all: false }).checks.length;
}

export async function secondAgainstFirst(rounds: number): Promise<Record<string, number>> {
  const { frames, settings } = await modelP(200);
  const all = (analysis: Settings['analysis']) => (): void => {
    for (const frame of frames) if (withoutCritical(frame, { ...settings, analysis }) === 0) throw new Error('Expected checks');
  };
  const [second = [], first = []] = await interleaved(
    [{ name: 'second order', work: all('second order') }, { name: 'first order', work: all('first order') }],
    rounds,
    'cpu',
  ); // prettier-ignore
  const ms = (seconds: readonly number[]): string => ((1e3 * median(seconds)) / frames.length).toFixed(2);
  console.log(`  second order ${ms(second)} ms a frame, first order ${ms(first)} ms`);
  return { 'second.P.first': ratio(second, first) };
}

/** Variants of W, and how many of them a round takes: each round others, so that none is met twice. */
const variants = 1000;
const perRound = 40;
const combinationsOfW = 80;

export async function everydayAgainstBare(rounds: number): Promise<Record<string, number>> {
  const missing = eigenMissing();
  if (missing) console.log(`  ${missing}`);
  const peers = EigenPeers.compiled();
  try {
    const { frames, settings } = await modelW(variants);
    const own: number[] = [];
    const other: number[] = [];
    for (let round = 0; round <= rounds; round += 1) {
      const some = frames.slice(round * perRound, (round + 1) * perRound);
      const before = cpuSeconds();
      for (const frame of some) {
        const { failure } = evaluateFrame(analyser, frame, settings, { second: false, all: false });
        if (failure) throw new Error(`${frame.id}: ${failure.message}`);
      }
      const took = cpuSeconds() - before;
      const peer = peers?.holding(`W${round}`, some);
      const theirs = (await peer?.bare(combinationsOfW)) ?? NaN;
      peer?.close();
      if (round === 0) continue;
      own.push(took);
      other.push(theirs);
    }
    const us = (seconds: readonly number[]): string => ((1e6 * median(seconds)) / perRound).toFixed(0);
    console.log(`  W: ${us(own)} µs a frame; Eigen, ${combinationsOfW} bare factorisations and solutions: ${us(other)} µs`);
    return peers ? { 'chain.W.eigen': ratio(own, other) } : {};
  } finally {
    peers?.close();
  }
}
