import type { Frame, Limit } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { degreeDeflection, headNumbers, ofDeflection, segmentNumbers } from '@/lib/analysis/flat-line';
import type { StateLines } from '@/lib/analysis/flat-lines';
import type { ResultState } from '@/lib/results/result';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import { namesSpan } from './limits';
import { checkMovement, withoutLimit, type Movement } from './movement';
import { bound, valueIn } from './line-bounds';
import { SAME, turningPoints } from './peak';
import { valueAt } from './polynomial';
import { freeEnds, supported, type Span } from './spans';

/** Roles whose deflection is only limited where Limits name them; `*` does not bring them in. */
const onlyNamed: ReadonlySet<string | null> = new Set(['column', 'strut', 'tie', 'brace']);
/** A rod's sag is no one's concern either, whatever its role. */
const onlyWhereNamed = (frame: Frame, span: Span): boolean =>
  onlyNamed.has(span.role) || span.pieces.some((piece) => frame.members[piece.member]!.tensionOnly);

/** How a span's deflection is measured: from the line between its moved ends, or from its root. */
type DeflectionRule = { readonly kind: 'span' } | { readonly kind: 'cantilever'; readonly root: 'start' | 'end' };

/**
 * Deflection of a span in every service combination. A span: largest departure, square to the line between its moved ends.
 * A cantilever: largest displacement square to the member relative to the root node's, root rotation not deducted.
 * @param given the frame's limits of deflection, Setup's among them   @param lines of each of `states`
 */
export function checkDeflection(
  frame: Frame,
  settings: Settings,
  given: readonly Limit[],
  span: Span,
  states: readonly ResultState[],
  lines: readonly StateLines[],
  findings: Findings,
): void {
  const named = given.filter((limit) => namesSpan(limit, span, frame));
  const byName = onlyWhereNamed(frame, span);
  const limits = byName ? named.filter((limit) => limit.target !== 'all') : named;
  const subject: Subject = {
    subjectKind: span.kind,
    subject: span.name,
    check: 'deflection',
    quantity: 'displacement',
    reference: 'Limits',
    member: span.pieces[0]!.member,
  };
  if (limits.length === 0) {
    if (byName) return;
    const why = withoutLimit(settings, 'deflection', findings);
    if (why) keepGoverning(findings, [notCheckedRow(subject, null, why)]);
    return;
  }
  if (!span.whole) return keepGoverning(findings, [notCheckedRow(subject, null, 'pieces of the span do not form one line')]);
  const rule = deflectionRule(frame, span, findings);
  const measured = (c: number, floor: number): Movement => deflectionOf(span, rule, lines[c]!, floor);
  const inputs = { rule: rule.kind, root: rule.kind === 'cantilever' ? rule.root : null };
  checkMovement(subject, 'deflection', limits, span.length_m, settings, states, measured, () => inputs, findings);
}

/**
 * A cantilever is a span of that role, or an arm or beam with one end that has no other member and no support.
 * The root of a cantilever whose both ends are joined to something is its one supported end, else its start.
 */
function deflectionRule(frame: Frame, span: Span, findings: Findings): DeflectionRule {
  const { start, end } = freeEnds(frame, span);
  if (start !== end && (span.role === 'cantilever' || span.role === 'arm' || span.role === 'beam'))
    return { kind: 'cantilever', root: start ? 'end' : 'start' };
  if (span.role !== 'cantilever') {
    if (start !== end) findings.assumptions.add(`${span.name}: its end is free, but deflection is measured from the line between its ends; for that from its root, give it the role cantilever`); // prettier-ignore
    return { kind: 'span' };
  }
  const root = supported(frame, span.endNode) && !supported(frame, span.startNode) ? 'end' : 'start';
  findings.assumptions.add(`${span.name}: a cantilever with no free end; its ${root} is taken as the root`);
  return { kind: 'cantilever', root };
}

const departure = new Float64Array(16);
const points = new Float64Array(32);

/**
 * Largest deflection of a span in size, m, and where; of equal ones the one nearest the span's start.
 * @param floor one that is not above it need not be exact, m
 */
function deflectionOf(span: Span, rule: DeflectionRule, lines: StateLines, floor: number): Movement {
  const last = span.pieces.length - 1;
  const first = endDeflection(span, 0, lines, 'near');
  const final = endDeflection(span, last, lines, 'far');
  const rest = rule.kind === 'span' ? first : rule.root === 'start' ? first : final;
  const slope = rule.kind === 'span' ? (final - first) / span.length_m : 0;
  let value = 0;
  let at = 0;
  for (let p = 0; p <= last; p++) {
    const { from_m, length_m, reversed } = span.pieces[p]!;
    const sign = reversed ? -1 : 1;
    const line = lines.at(span.pieces[p]!.member);
    const { numbers } = lines;
    const segments = numbers[line]!;
    for (let i = 0; i < segments; i++) {
      const o = line + headNumbers + segmentNumbers * (reversed ? segments - 1 - i : i);
      const from = numbers[o]!;
      const to = numbers[o + 1]!;
      let degree = numbers[o + degreeDeflection]!;
      departure[1] = 0;
      for (let k = 0; k <= degree; k++) departure[k] = sign * numbers[o + ofDeflection + k]!;
      degree = Math.max(1, degree);
      const x0 = reversed ? from_m + length_m - from : from_m + from;
      departure[0] = departure[0]! - rest - slope * x0;
      departure[1] = departure[1]! - sign * slope;
      // turning points are looked for only where they can matter
      if (bound(departure, 0, degree, to - from) <= Math.max(floor, value)) continue;
      const count = turningPoints(departure, degree, to - from, points);
      for (let j = 0; j < count; j++) {
        const s = points[reversed ? count - 1 - j : j]!;
        const here = Math.abs(valueAt(departure, degree, s));
        if (here > value * (1 + SAME)) {
          value = here;
          at = x0 + sign * s;
        }
      }
    }
  }
  return { value, at };
}

/** Deflection at the near or far end of a piece as the span runs, square to it, m. */
function endDeflection(span: Span, piece: number, lines: StateLines, which: 'near' | 'far'): number {
  const { member, reversed } = span.pieces[piece]!;
  const line = lines.at(member);
  const { numbers } = lines;
  const atStart = (which === 'near') !== reversed;
  const o = line + headNumbers + (atStart ? 0 : segmentNumbers * (numbers[line]! - 1));
  const v = valueIn(numbers, o + ofDeflection, numbers[o + degreeDeflection]!, atStart ? 0 : numbers[o + 1]! - numbers[o]!);
  return reversed ? -v : v;
}
