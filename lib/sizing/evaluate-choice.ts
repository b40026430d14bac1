import type { Analyser } from '@/lib/analysis/analyser';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameAnswer } from '@/lib/sizing/frame-answer';
import { groupsOf } from '@/lib/sizing/members-of';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import type { FrameAnswer, SizingGroup } from '@/lib/sizing/sizing';
import { withSections } from '@/lib/sizing/with-sections';

/** What a frame says of sections for its groups; null = the group's members keep what they have. Evaluated as a run does it. */
export function evaluateChoice(
  analyser: Analyser,
  frame: Frame,
  settings: Settings,
  groups: readonly Pick<SizingGroup, 'by' | 'name'>[],
  taken: readonly (SectionTaken | null)[],
): FrameAnswer {
  const members = groupsOf(frame, groups);
  if ('twice' in members) throw new RangeError(`Expected every member in one group at most, got ${members.twice}`);
  const tried = withSections(frame, (member) => taken[members.of[member] ?? -1] ?? null);
  if ('unfit' in tried) return { outcome: 'not solved', ratio: null, governs: tried.unfit };
  // the sample of second, independent analyses is of what is kept: a run of the next revision makes them
  return frameAnswer(evaluateFrame(analyser, tried, settings, { second: false, all: false }));
}
