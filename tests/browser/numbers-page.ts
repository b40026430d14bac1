/** What tests/browser/numbers.test.ts bundles for a page: the engine and the checks as they ship, and nothing of a server. */
import { createAnalyser } from '@/lib/analysis/analyser';
import { memberExtremes } from '@/lib/analysis/member-extremes';
import { memberLine } from '@/lib/analysis/member-line';
import { checkFrame } from '@/lib/checks/check-frame';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';

/** Figures of one sort, with how they are told apart when they differ. */
export interface Figures {
  readonly what: string;
  readonly values: readonly number[];
}

/** Everything that is computed of a frame, as lists of figures; or why it has no solution. */
export function figuresOf(frame: Frame, settings: Settings): Figures[] | string {
  const analysis = createAnalyser().analyse(frame, { settings, second: true });
  if (!analysis.ok) return analysis.failure.message;
  const figures: Figures[] = [];
  const add = (what: string, values: ArrayLike<number>, third: 0 | 1 | 2): void => {
    // every third one is of another sort: a rotation, a moment
    const pick = (of: (i: number) => boolean): number[] => Array.from(values).filter((_, i) => of(i));
    figures.push({ what, values: pick((i) => i % 3 !== third) });
    figures.push({ what: `${what}, turning`, values: pick((i) => i % 3 === third) });
  };
  for (const state of analysis.states) {
    add(`${state.name}: displacements`, state.displacements, 2);
    add(`${state.name}: reactions`, state.reactions, 2);
    add(`${state.name}: end forces`, state.endForces, 2);
    figures.push({ what: `${state.name}: critical load factor`, values: [state.criticalLoadFactor ?? 0] });
    const extremes = frame.members.map((_, i) => memberExtremes(memberLine(frame, state, i)));
    for (const sort of ['N', 'V', 'M'] as const)
      figures.push({ what: `${state.name}: extremes of ${sort}`, values: extremes.flatMap((e) => [e[sort].max, e[sort].min]) });
    figures.push({ what: `${state.name}: deflections`, values: extremes.map((e) => e.deflection.value) });
  }
  const { checks } = checkFrame(frame, settings, analysis.states, (state, i) => memberLine(frame, state, i), { all: false });
  figures.push({ what: 'ratios', values: checks.map((check) => check.ratio ?? -1) });
  return figures;
}

declare global {
  interface Window {
    figuresOf: typeof figuresOf;
  }
}
if (typeof window !== 'undefined') window.figuresOf = figuresOf;
