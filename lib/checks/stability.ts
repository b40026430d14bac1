import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { StateLines } from '@/lib/analysis/flat-lines';
import type { Check, ResultState } from '@/lib/results/result';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import { figure } from './figure';
import { SAME } from './peak';
import { actionBounds, actions, actionsOf } from './span-actions';
import { spanBuckling, type SpanBuckling } from './span-buckling';
import type { Span } from './spans';

/** Below these parts of the critical load and moment buckling is negligible (EN 1993-1-1 6.3.1.2(4), 6.3.2.2(4)). */
const NEGLIGIBLE_N = 0.04;
const NEGLIGIBLE_M = 0.16;

export const stabilitySubject = (span: Span): Subject => ({
  subjectKind: span.kind,
  subject: span.name,
  check: 'stability',
  quantity: 'number',
  reference: 'EN 1993-1-1 6.3.1.2(4), 6.3.2.2(4): buckling negligible',
  member: span.pieces[0]!.member,
});

/** A combination's compression and moments along a span, divided by the stress factor, against its critical ones. */
interface Screening {
  readonly N: number;
  readonly positive: number;
  readonly negative: number;
  readonly major: number;
  readonly minor: number;
  readonly bending: number;
  readonly ratio: number;
  readonly needs: readonly string[];
}

/**
 * Stability screening of a span in every strength combination: where N ≤ 0.04 N_cr about both axes and M ≤ 0.16 M_cr,
 * both with the actions divided by the stress factor, buckling is negligible; else it is not checked here.
 * @param lines of each of `states`
 */
export function checkStability(
  frame: Frame,
  settings: Settings,
  span: Span,
  states: readonly ResultState[],
  lines: readonly StateLines[],
  findings: Findings,
): void {
  const subject = stabilitySubject(span);
  const broken = whyNotOneMember(frame, span);
  if (broken) {
    keepGoverning(
      findings,
      states.slice(0, findings.all ? undefined : 1).map((state) => notCheckedRow(subject, state.name, broken)),
    );
    return;
  }
  const buckling = spanBuckling(frame, span);
  note(span, buckling, findings);
  const rows: Check[] = [];
  let best: { readonly screening: Screening; readonly state: ResultState } | null = null;
  for (let c = 0; c < states.length; c++) {
    const state = states[c]!;
    if (best && !findings.all && staysBelow(best.screening.ratio, settings, buckling, state, span, lines[c]!)) continue;
    const found = screen(settings, buckling, state, span, lines[c]!);
    if (found.needs.length > 0 || found.ratio > 1) {
      rows.push(refused(settings, span, subject, state, buckling, found));
      // a combination that is not checked governs all that follow
      if (!findings.all) break;
    } else if (findings.all) rows.push(negligible(settings, span, subject, state, buckling, found));
    else if (best === null || found.ratio > best.screening.ratio * (1 + SAME)) best = { screening: found, state };
  }
  if (best && rows.length === 0) rows.push(negligible(settings, span, subject, best.state, buckling, best.screening));
  keepGoverning(findings, rows);
}

function whyNotOneMember(frame: Frame, span: Span): string | null {
  if (!span.whole) return 'pieces of the span do not form one line';
  const first = frame.members[span.pieces[0]!.member]!;
  const unlike = span.pieces.some((p) => {
    const m = frame.members[p.member]!;
    return m.section !== first.section || m.material !== first.material || m.turned !== first.turned;
  });
  return unlike ? 'pieces of the span have different sections' : null;
}

function note(span: Span, buckling: SpanBuckling, findings: Findings): void {
  if (buckling.tensionOnly) findings.assumptions.add('Tension-only members: not pressed, so no buckling of theirs is screened');
  else if (buckling.blank.length > 0)
    findings.assumptions.add(`${span.name}: length ${buckling.blank.join(', ')} taken as the length of the span`);
  if (buckling.twiceForFreeEnd && !buckling.tensionOnly) findings.assumptions.add(`${span.name}: out of the plane twice the length of the span, since an end of it is free`); // prettier-ignore
  if (buckling.ltb.kind !== 'formula') return;
  if (buckling.longerForBoth)
    findings.assumptions.add(
      `${span.name}: pieces drawn both ways, so the longer of length LTB top and bottom is taken for both faces`,
    );
  findings.assumptions.add('M_cr: uniform moment (C1 = 1), load at the shear centre');
  if (buckling.ltb.note) findings.assumptions.add(buckling.ltb.note);
}

const NONE: readonly string[] = [];

function screen(settings: Settings, of: SpanBuckling, state: ResultState, span: Span, lines: StateLines): Screening {
  const f = settings.stressFactor;
  actionsOf(span, lines);
  const compression = actions[0]!;
  const sagging = actions[1]!;
  const hogging = actions[2]!;
  // what rounding leaves of zero: a stress of E/10⁹
  const noForce = 1e-9 * of.E * of.A;
  const noMoment = noForce * Math.sqrt(of.Imajor / of.A);
  // a tension-only member goes slack before it is pressed; what is left is its own weight along it
  const N = !of.tensionOnly && compression > noForce ? compression / f : 0;
  const positive = sagging > noMoment ? sagging / f : 0;
  const negative = hogging > noMoment ? hogging / f : 0;
  const major = N / of.NcrMajor;
  const minor = of.NcrMinor === null ? 0 : N / of.NcrMinor;
  const bending = Math.max(positive / of.McrTop, negative / of.McrBottom);
  const ratio = Math.max(major / NEGLIGIBLE_N, minor / NEGLIGIBLE_N, bending / NEGLIGIBLE_M);

  let needs = NONE;
  if (N > 0 && of.NcrMinor === null) needs = ['I minor'];
  if (N > 0 && of.twists) needs = [...needs, 'N_cr of torsional-flexural buckling of a channel, which is not computed'];
  if (N > 0 && mayNeedLength(of, state, f)) {
    const amplified = (state.criticalLoadFactor ?? Infinity) * f;
    needs = [...needs, `length ${of.blankInPlane} (blank in plane, with α_cr × f = ${figure(amplified, 'down')} below 10)`];
  }
  if ((positive > 0 || negative > 0) && of.ltb.kind === 'needs') {
    const known = needs;
    needs = [...known, ...of.ltb.needs.filter((need) => !known.includes(need))];
  }
  return { N, positive, negative, major, minor, bending, ratio, needs };
}

/** Whether nothing of a state can be refused or come above a ratio, by bounds of its forces: then it need not be screened. */
function staysBelow(
  ratio: number,
  settings: Settings,
  of: SpanBuckling,
  state: ResultState,
  span: Span,
  lines: StateLines,
): boolean {
  if (of.NcrMinor === null || of.twists || of.ltb.kind === 'needs' || mayNeedLength(of, state, settings.stressFactor))
    return false;
  actionBounds(span, lines);
  const compressed = actions[0]! / Math.min(of.NcrMajor, of.NcrMinor) / NEGLIGIBLE_N;
  const bent = actions[1]! / Math.min(of.McrTop, of.McrBottom) / NEGLIGIBLE_M;
  return Math.max(compressed, bent) < ratio * settings.stressFactor * (1 - SAME);
}

/** Whether a compressed span's blank length in the plane needs typing: without sway of second order, at α_cr × f below 10. */
function mayNeedLength(of: SpanBuckling, state: ResultState, f: number): boolean {
  if (of.blankInPlane === null) return false;
  const swayed = state.order === 2 && state.method !== null && state.method.imperfection !== null;
  return !swayed && !((state.criticalLoadFactor ?? Infinity) * f >= 10);
}

function refused(
  settings: Settings,
  span: Span,
  subject: Subject,
  state: ResultState,
  of: SpanBuckling,
  found: Screening,
): Check {
  const inputs = inputsOf(settings, span, of, found, null);
  if (found.needs.length > 0) return notCheckedRow(subject, state.name, `needs ${found.needs.join(', ')}`, inputs);
  const figures: string[] = [];
  if (found.major > NEGLIGIBLE_N) figures.push(`N/N_cr major ${figure(found.major, 'up')}`);
  if (found.minor > NEGLIGIBLE_N) figures.push(`N/N_cr minor ${figure(found.minor, 'up')}`);
  if (found.bending > NEGLIGIBLE_M) figures.push(`M/M_cr ${figure(found.bending, 'up')}`);
  const cure = 'closer restraints (lengths) or a design-code check would clear it';
  return notCheckedRow(subject, state.name, `buckling not negligible (${figures.join(', ')}): ${cure}`, inputs);
}

function negligible(
  settings: Settings,
  span: Span,
  subject: Subject,
  state: ResultState,
  of: SpanBuckling,
  found: Screening,
): Check {
  const { ratio } = found;
  return {
    subjectKind: subject.subjectKind,
    subject: subject.subject,
    check: subject.check,
    combination: state.name,
    at: null,
    face: null,
    value: ratio,
    limit: 1,
    quantity: subject.quantity,
    ratio,
    verdict: 'within',
    reason: null,
    reference: subject.reference,
    member: subject.member,
    inputs: inputsOf(settings, span, of, found, ratio),
  };
}

/** Everything the working puts in; what a combination does not bring about (no compression, no bending) is null. */
function inputsOf(settings: Settings, span: Span, of: SpanBuckling, found: Screening, ratio: number | null): Check['inputs'] {
  const { E, ltb } = of;
  const { N } = found;
  const pressed = N > 0;
  const minor = pressed && of.Iminor !== null;
  const bent = found.positive > 0 || found.negative > 0;
  const top = found.positive / of.McrTop >= found.negative / of.McrBottom;
  const formula = bent && ltb.kind === 'formula' ? ltb : null;
  return {
    f: settings.stressFactor,
    E,
    L: span.length_m,
    N,
    Imajor: pressed ? of.Imajor : null,
    Lmajor: pressed ? of.Lmajor : null,
    NcrMajor: pressed ? of.NcrMajor : null,
    NNcrMajor: pressed ? found.major : null,
    Iminor: minor ? of.Iminor : null,
    Lminor: minor ? of.Lminor : null,
    NcrMinor: minor ? of.NcrMinor : null,
    NNcrMinor: minor ? found.minor : null,
    M: (formula ? top : found.positive >= found.negative) ? found.positive : -found.negative,
    noLtb: bent && ltb.kind === 'none' ? ltb.why : null,
    ltbFace: formula ? (top ? 'top' : 'bottom') : null,
    Lltb: formula ? (top ? of.Ltop : of.Lbottom) : null,
    Mcr: formula ? (top ? of.McrTop : of.McrBottom) : null,
    Iz: formula?.Iz ?? null,
    It: formula?.It ?? null,
    Iw: formula?.Iw ?? null,
    G: formula?.G ?? null,
    MMcr: formula ? found.bending : null,
    value: ratio,
    limit: ratio === null ? null : 1,
    ratio,
  };
}
