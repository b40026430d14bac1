import type { Settings } from '@/lib/model/settings';
import type { ClauseRow, Note } from '../design-code/clause-row';
import type { CodeMember } from '../design-code/code-member';
import type { Demand } from '../design-code/demand';
import { saidOnce } from './assumptions';
import {
  bendingInputs,
  combinedInputs,
  flexuralInputs,
  shearInputs,
  slenderInputs,
  tensionInputs,
  torsionalInputs,
} from './clause-inputs';
import { interaction } from './combined';
import { memberStrength, refused, type MemberStrength } from './member-strength';
import { governingSegment, type GoverningSegment } from './segment-moment';
import { available, USUAL, type Method } from './strength';

/**
 * Every clause of AISC 360-22 that a member has something to be held against in, for each state: tension (D2), compression
 * (E3, E4, E7), bending (F2, F3, F6, F7, F8), shear (G2, G4, G5, G6), both together (H1.1, H1.2). In ASD the forces of a state
 * are the required strengths already.
 */
export function aiscRows(
  member: CodeMember,
  demands: readonly Demand[],
  settings: Settings,
  note: Note,
  method: Method,
): readonly ClauseRow[] {
  const name = settings.strengthCheck;
  const of = memberStrength(member, method);
  if (typeof of === 'string') return demands.map((demand) => refusal(name, name, demand, of));
  const rows: ClauseRow[] = [];
  for (const demand of demands) {
    if (!demand.inPlane.allowed) {
      rows.push(refusal(name, name, demand, demand.inPlane.why));
      continue;
    }
    stateRows(member, of, demand, settings, rows);
  }
  saidOnce(member, of, demands, note);
  return rows;
}

function stateRows(member: CodeMember, of: MemberStrength, demand: Demand, settings: Settings, rows: ClauseRow[]): void {
  const { basis, shear, tension } = of;
  const row = rowIn(demand);
  if (demand.tension > 0) {
    const Pr = demand.tension;
    rows.push(
      row('D2 tension', 'AISC 360-22 D2(a), (D2-1)', demand.tensionAt, Pr, tension.Pc, 'force', () => tensionInputs(of, Pr)),
    );
  }
  // a tension-only member goes slack before it is pressed; what is left is its own weight along it
  const Pr = member.tensionOnly ? 0 : demand.compression;
  if (Pr > 0) compressionRows(of, demand, Pr, rows);
  const bending = bendingRow(of, demand, settings, rows);
  if (demand.shear > 0) {
    const Vr = demand.shear;
    rows.push(row(shear.check, shear.reference, demand.shearAt, Vr, shear.Vc, 'force', () => shearInputs(of, Vr)));
  }
  if (bending === null) return;
  const { compression } = of;
  // both parts are the member's largest, wherever they are
  const combine = (clause: 'H1.1' | 'H1.2', P: number, Pc: number, axialClause: string): void => {
    const value = interaction(P / Pc, bending.segment.Mr / bending.Mc);
    const parts = { Pr: P, Pc, Mr: bending.segment.Mr, Mc: bending.Mc, value };
    const clauses = { axial: axialClause, bending: bending.clause };
    const inputs = (): ReturnType<typeof combinedInputs> => combinedInputs(basis, parts, clauses, clause);
    const reference = `AISC 360-22 ${clause}, (H1-1a), (H1-1b)`;
    rows.push(row(`${clause} combined`, reference, bending.segment.at, value, 1, 'number', inputs, bending.segment.face));
  };
  if (Pr > 0 && compression.refused === null) {
    const { slender, torsional, flexural } = compression;
    combine('H1.1', Pr, compression.Pc, slender ? 'E7' : torsional && torsional.Fe < flexural.Fe ? 'E4' : 'E3');
  }
  if (demand.tension > 0) combine('H1.2', demand.tension, tension.Pc, 'D2');
}

function compressionRows(of: MemberStrength, demand: Demand, Pr: number, rows: ClauseRow[]): void {
  const { flexural, torsional, slender, refused: why } = of.compression;
  const row = rowIn(demand);
  const at = demand.compressionAt;
  if (slender) {
    const reference = 'AISC 360-22 E7, (E7-1) to (E7-7), Table E7.1';
    rows.push(row('E7 slender elements', reference, at, Pr, slender.Pc, 'force', () => slenderInputs(of, Pr)));
    return;
  }
  const reference = 'AISC 360-22 E3, (E3-1) to (E3-4)';
  rows.push(row('E3 flexural buckling', reference, at, Pr, flexural.Pc, 'force', () => flexuralInputs(of, Pr)));
  if (why) rows.push(refusal(why.check, 'AISC 360-22 E4, E7', demand, why.reason));
  else if (torsional && torsional.Fe < flexural.Fe) {
    const e4 = 'AISC 360-22 E4, (E4-1), (E4-2), (E3-2), (E3-3)';
    rows.push(row('E4 torsional buckling', e4, at, Pr, torsional.Pc, 'force', () => torsionalInputs(of, torsional, Pr)));
  }
}

/** The bending of a state, for H1; null where there is none, or where it could not be checked. */
function bendingRow(
  of: MemberStrength,
  demand: Demand,
  settings: Settings,
  rows: ClauseRow[],
): { readonly segment: GoverningSegment; readonly Mc: number; readonly clause: string } | null {
  const { bending, basis } = of;
  if (!(demand.moment > 0)) return null;
  if (refused(bending)) {
    rows.push(refusal(bending.check, 'AISC 360-22 B4.1, F', demand, bending.reason));
    return null;
  }
  const [top, bottom] = [demand.stretches('top'), demand.stretches('bottom')];
  const { lateral } = bending;
  if (lateral && lateral.criticalStress(1, 1) !== null && settings.loadHeight !== 'shear centre') {
    const affected = [...top, ...bottom].some((s) => s.loaded && s.compressing > 0 && s.length_m > lateral.Lp);
    if (affected) {
      const reason = `loads at the ${settings.loadHeight} (load height): F2 is for loads at the shear centre`;
      rows.push(refusal(bending.check, bending.reference, demand, reason));
      return null;
    }
  }
  const segment = governingSegment(bending, top, bottom);
  if (segment === null) {
    rows.push(refusal(bending.check, bending.reference, demand, 'moments between the restraints are not known'));
    return null;
  }
  const Mc = available(basis.method, segment.Mn, USUAL);
  const inputs = (): ReturnType<typeof bendingInputs> => bendingInputs(basis, bending, segment, Mc);
  rows.push(rowIn(demand)(bending.check, bending.reference, segment.at, segment.Mr, Mc, 'moment', inputs, segment.face));
  return { segment, Mc, clause: bending.clause };
}

function rowIn(demand: Demand) {
  return (
    check: string,
    reference: string,
    at: number,
    value: number,
    limit: number,
    quantity: ClauseRow['quantity'],
    inputs: ClauseRow['inputs'],
    face: ClauseRow['face'] = null,
  ): ClauseRow => ({
    check,
    reference,
    combination: demand.combination,
    at,
    face,
    value,
    limit,
    quantity,
    ratio: value / limit,
    reason: null,
    inputs,
  });
}

const NOTHING = (): Record<string, never> => ({});

function refusal(check: string, reference: string, demand: Demand, reason: string): ClauseRow {
  return {
    check,
    reference,
    combination: demand.combination,
    at: null,
    face: null,
    value: null,
    limit: null,
    quantity: 'number',
    ratio: null,
    reason,
    inputs: NOTHING,
  };
}
