import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { lineFrom } from '@/lib/analysis/flat-line';
import { FlatLines, type StateLines } from '@/lib/analysis/flat-lines';
import type { Check, MemberLine, ResultState } from '@/lib/results/result';
import { keepGoverning, notCheckedRow, type Findings } from './check-row';
import { checkCriticalLoadFactor } from './critical-load-factor';
import { checkDeflection } from './deflection';
import { checkByCode, refuseMember } from './design-code/code-checks';
import { designCodeOf } from './design-code/design-codes';
import { checkDisplacement } from './displacement';
import { limitsWithSetup } from './movement';
import { spansOf, type Span } from './spans';
import { checkSpread } from './spread';
import { checkStability, stabilitySubject } from './stability';
import { checkStress, stressKinds, stressNotChecked, type SlenderIn } from './strength-stress';
import { checkSway } from './sway';

export interface FrameChecks {
  /** One row for each subject × check: the combination that governs, the first on a tie. */
  readonly checks: readonly Check[];
  /** Every subject × check × combination, where asked for. */
  readonly allChecks: readonly Check[] | null;
  /** What stands assumed, once each. */
  readonly assumptions: readonly string[];
  /** What was not checked and why, "check: reason", once each: the frame's own reasons first. */
  readonly notChecked: readonly string[];
}

/**
 * Every check of one frame (engine.md, "Checks"): elastic stress of members, stability of spans (or a design code's clauses) and the critical load factor in
 * strength combinations; deflection, sway, displacement and spread in service combinations. Order of rows: stress by member,
 * stability by span, critical load factor, then movements.
 *
 * @param states the frame's results, cases and combinations; cases are not checked
 * @param lineOf the exact line of a member in a state, with the same lines as rows of numbers where it has them
 * @param options.all keep every subject × check × combination too
 */
export function checkFrame(
  frame: Frame,
  settings: Settings,
  states: readonly ResultState[],
  lineOf: LineOf,
  options: { readonly all: boolean },
): FrameChecks {
  const strength = states.filter((state) => state.kind === 'combination' && state.purpose === 'strength');
  const service = states.filter((state) => state.kind === 'combination' && state.purpose === 'service');
  const findings: Findings = {
    checks: [],
    all: options.all ? [] : null,
    assumptions: new Set(),
    notChecked: new Set(frame.notChecked),
    noService: strength.length > 0 ? 'no service combinations' : 'no combinations',
  };
  const spans = spansOf(frame);
  const flat = lineOf.flat ?? new FlatLines(frame, lineOf);
  checkStrength(frame, settings, spans, strength, service.length > 0, lineOf, flat, findings);
  const moved = service.map((state) => flat.of(state));
  const deflections = limitsWithSetup(frame, settings, 'deflection');
  for (const span of spans) checkDeflection(frame, settings, deflections, span, service, moved, findings);
  const sways = limitsWithSetup(frame, settings, 'sway');
  for (const span of spans) checkSway(frame, settings, sways, span, service, findings);
  checkDisplacement(frame, settings, service, findings);
  checkSpread(frame, settings, service, findings);
  return {
    checks: findings.checks,
    allChecks: findings.all,
    assumptions: [...findings.assumptions],
    notChecked: [...findings.notChecked],
  };
}

interface LineOf {
  (state: ResultState, member: number): MemberLine;
  readonly flat?: FlatLines;
}

function checkStrength(
  frame: Frame,
  settings: Settings,
  spans: readonly Span[],
  states: readonly ResultState[],
  others: boolean,
  lineOf: LineOf,
  flat: FlatLines,
  findings: Findings,
): void {
  const screened = settings.stability === 'screened' ? spans : [];
  const code = designCodeOf(settings.strengthCheck);
  const none =
    states.length === 0
      ? others
        ? 'no strength combinations'
        : 'no combinations'
      : settings.strengthCheck !== 'elastic stress' && code === null
        ? `strength check ${settings.strengthCheck} is not available`
        : null;
  if (settings.strengthCheck !== 'elastic stress') {
    if (code === null || none !== null)
      for (const span of spans) refuseMember(span, settings.strengthCheck, states, none ?? 'not available', findings);
    else {
      checkByCode(frame, settings, code, spans, states, (c, member) => lineOf(states[c]!, member), findings);
      // a code works on factored loads: the stress factor has no part in it
      checkCriticalLoadFactor({ ...settings, stressFactor: 1 }, states, findings);
    }
    return;
  }
  if (none) {
    frame.members.forEach((_, i) => stressNotChecked(frame, i, none, findings));
    for (const span of screened) keepGoverning(findings, [notCheckedRow(stabilitySubject(span), null, none)]);
    return;
  }
  const lines = states.map((state) => flat.of(state));
  const kindOf = stressKinds(frame, findings);
  const slender = new Map<number, ReturnType<SlenderIn>[]>();
  for (let i = 0; i < frame.members.length; i++) {
    let pieces: readonly number[] | null = null;
    const slenderIn: SlenderIn = (c, find) => {
      pieces ??= likePieces(frame, spans, i);
      // pieces of one physical member share what is found along it
      let found = slender.get(pieces[0]!);
      if (!found) slender.set(pieces[0]!, (found = []));
      if (found[c] === undefined) found[c] = find(oneLine(pieces.map((p) => objectOf(lines[c]!, p))));
      return found[c];
    };
    checkStress(frame, settings, i, kindOf(i), states, lines, slenderIn, findings);
  }
  findings.assumptions.add(
    'Equivalent stress: the larger face stress with the peak shear stress of the same place, on the safe side',
  );
  for (const span of screened) checkStability(frame, settings, span, states, lines, findings);
  checkCriticalLoadFactor(settings, states, findings);
}

/** The pieces of a member's span that have its section, turned as it is, of its material; itself among them. */
function likePieces(frame: Frame, spans: readonly Span[], member: number): readonly number[] {
  const m = frame.members[member]!;
  if (m.span === null) return [member];
  const span = spans.find((s) => s.pieces.some((piece) => piece.member === member));
  if (!span?.whole) return [member];
  return span.pieces
    .map((piece) => piece.member)
    .filter((i) => {
      const other = frame.members[i]!;
      return other.section === m.section && other.material === m.material && other.turned === m.turned;
    });
}

function objectOf(lines: StateLines, member: number): MemberLine {
  const at = lines.at(member);
  return lineFrom(lines.numbers, at);
}

/** Lines one after another: for what is looked for along a physical member, wherever it stands. */
const oneLine = (lines: readonly MemberLine[]): MemberLine => ({
  length: lines.reduce((sum, line) => sum + line.length, 0),
  segments: lines.flatMap((line) => line.segments),
});
