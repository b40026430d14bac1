import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Check, MemberLine, ResultState } from '@/lib/results/result';
import { inPlane, type InPlane } from '@/lib/sections/in-plane';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import { peakEquivalentStress } from './equivalent-stress';
import { peakNormalStress } from './normal-stress';
import { SAME, type Peak } from './peak';
import { peakShearStress } from './shear-stress';
import { plateProportions, slenderPlate, type PlateProportions } from './slender-plates';
import { verdictOf } from './verdict';

export type StressName = 'normal stress' | 'shear stress' | 'equivalent stress';
const names: readonly StressName[] = ['normal stress', 'shear stress', 'equivalent stress'];
const references: Readonly<Record<StressName, string>> = {
  'normal stress': 'elastic stress, σ = N/A ∓ M/W ≤ f·fy (EN 1993-1-1 6.2.1(4))',
  'shear stress': 'elastic stress, τ = V/Av ≤ f·fy/√3 (EN 1993-1-1 6.2.6(4))',
  'equivalent stress': 'elastic stress, σ_v = √(σ² + 3τ²) ≤ f·fy (EN 1993-1-1 6.2.1(5))',
};

export const stressSubject = (frame: Frame, member: number, check: StressName): Subject => ({
  subjectKind: 'member',
  subject: frame.members[member]!.id,
  check,
  quantity: 'stress',
  reference: references[check],
  member,
});

/** A row for each stress check of a member that can't be made at all. */
export function stressNotChecked(frame: Frame, member: number, reason: string, findings: Findings): void {
  for (const check of names) keepGoverning(findings, [notCheckedRow(stressSubject(frame, member, check), null, reason)]);
}

/**
 * Elastic stress of one member over all strength combinations: normal, shear and equivalent stress.
 * @param lines the member's line in each of `states`
 */
export function checkStress(
  frame: Frame,
  settings: Settings,
  member: number,
  states: readonly ResultState[],
  lines: readonly MemberLine[],
  findings: Findings,
): void {
  const m = frame.members[member]!;
  const section = frame.sections[m.section]!;
  const material = frame.materials[m.material]!;
  const of = inPlane(section, m.turned);
  const plates = plateProportions(section, m.turned, material);
  notePlates(section.name, plates, findings);

  const fy = material.fy_Pa;
  const noYield =
    fy !== null ? null : material.grade !== null && section.properties.t_m === null ? 'needs t (fy depends on it)' : 'needs fy';
  const noAv = of.AvPeak_m2 === null ? 'needs Av' : null;
  if (fy === null || noYield !== null) return stressNotChecked(frame, member, noYield ?? 'needs fy', findings);

  const gather = new Gather(frame, settings, member, of, fy, findings.all !== null);
  for (let c = 0; c < lines.length; c++) {
    const line = lines[c]!;
    const combination = states[c]!.name;
    const slender = plates.watch.length > 0 ? slenderPlate(plates.watch, line, of, fy) : null;
    const noW = modulusMissing(of, line);
    const perTop = of.Wtop_m3 && !noW ? 1 / of.Wtop_m3 : 0;
    const perBottom = of.Wbottom_m3 && !noW ? 1 / of.Wbottom_m3 : 0;
    const noNormal = slender ? `slender ${slender}` : noW;
    let normal = 0;
    if (noNormal) gather.refuse(0, combination, noNormal);
    else normal = gather.take(0, combination, peakNormalStress(line, 1 / of.A_m2, perTop, perBottom));
    if (noAv) {
      gather.refuse(1, combination, noAv);
      gather.refuse(2, combination, noNormal ?? noAv);
      continue;
    }
    const perAv = 1 / of.AvPeak_m2!;
    const shear = gather.take(1, combination, peakShearStress(line, perAv));
    if (noNormal) gather.refuse(2, combination, noNormal);
    else {
      const bound = Math.sqrt(normal * normal + 3 * shear * shear);
      const floor = gather.floor(2);
      gather.take(2, combination, peakEquivalentStress(line, 1 / of.A_m2, perTop, perBottom, perAv, bound, floor));
    }
  }
  gather.finish(findings);
}

/** Why bending stress can't be had: a modulus is missing though the member bends (moments of rounding's size count as none). */
function modulusMissing(of: InPlane, line: MemberLine): string | null {
  if (of.Wtop_m3 !== null && of.Wbottom_m3 !== null) return null;
  let moment = 0;
  let force = 0;
  for (const { N, V, M, from, to } of line.segments) {
    const h = to - from;
    for (let k = 0; k < M.length; k++) moment += Math.abs(M[k]!) * h ** k;
    for (let k = 0; k < N.length; k++) force += Math.abs(N[k]!) * h ** k;
    for (let k = 0; k < V.length; k++) force += Math.abs(V[k]!) * h ** k;
  }
  if (moment <= 1e-9 * force * line.length) return null;
  if (of.Wtop_m3 === null && of.Wbottom_m3 === null) return 'needs W top, W bottom';
  return of.Wtop_m3 === null ? 'needs W top' : 'needs W bottom';
}

function notePlates(section: string, plates: PlateProportions, findings: Findings): void {
  if (!plates.known)
    findings.assumptions.add(
      `Section ${section}: proportions not given, so its plates are taken as not slender (class 3 or better)`,
    );
  if (plates.webBucklesInShear)
    findings.assumptions.add(`Section ${section}: clear web deeper than 72 ε tw; shear buckling of the web is not checked`);
}

/** Keeps, for each of the three checks of a member, what governs: few rows are made, however many combinations there are. */
class Gather {
  private readonly best: (Check | null)[] = [null, null, null];
  private readonly largest = [-1, -1, -1];
  private readonly refused: (Check | null)[] = [null, null, null];
  private readonly reasons: Set<string>[] = [new Set(), new Set(), new Set()];
  private readonly rows: Check[][] = [[], [], []];
  private readonly limits: readonly number[];

  constructor(
    private readonly frame: Frame,
    private readonly settings: Settings,
    private readonly member: number,
    private readonly of: InPlane,
    private readonly fy: number,
    private readonly all: boolean,
  ) {
    const f = settings.stressFactor;
    this.limits = [f * fy, (f * fy) / Math.sqrt(3), f * fy];
  }

  /** Largest stress so far of a check; −1 where every row is wanted, so that each is exact. */
  floor(check: number): number {
    return this.all ? -1 : this.largest[check]!;
  }

  take(check: number, combination: string, peak: Peak): number {
    const governs = this.largest[check]! < 0 || peak.value > this.largest[check]! * (1 + SAME);
    if (!governs && !this.all) return peak.value;
    const row = this.row(check, combination, peak);
    if (this.all) this.rows[check]!.push(row);
    if (governs) [this.largest[check], this.best[check]] = [peak.value, row];
    return peak.value;
  }

  refuse(check: number, combination: string, reason: string): void {
    if (!this.all && this.reasons[check]!.has(reason)) return;
    this.reasons[check]!.add(reason);
    const row = notCheckedRow(stressSubject(this.frame, this.member, names[check]!), combination, reason);
    if (this.all) this.rows[check]!.push(row);
    this.refused[check] ??= row;
  }

  finish(findings: Findings): void {
    for (let check = 0; check < 3; check++) {
      const rows = this.all ? this.rows[check]! : [this.best[check], this.refused[check]].filter((row): row is Check => !!row);
      keepGoverning(findings, rows);
      for (const reason of this.reasons[check]!) findings.notChecked.add(`${names[check]!}: ${reason}`);
    }
  }

  private row(check: number, combination: string, peak: Peak): Check {
    const name = names[check]!;
    const limit = this.limits[check]!;
    const ratio = peak.value / limit;
    const { of, fy } = this;
    const W = peak.face === 'top' ? of.Wtop_m3 : of.Wbottom_m3;
    const section = this.frame.sections[this.frame.members[this.member]!.section]!.name;
    const inputs: Record<string, number | string | null> = { section };
    if (check !== 1) Object.assign(inputs, { N: peak.N, M: peak.M, A: of.A_m2, W, face: peak.face });
    if (check !== 0) Object.assign(inputs, { V: peak.V, Av: of.AvPeak_m2 });
    return {
      ...stressSubject(this.frame, this.member, name),
      combination,
      at: peak.at,
      face: check === 1 ? null : peak.face,
      value: peak.value,
      limit,
      ratio,
      verdict: verdictOf(ratio, this.settings.nearLimit),
      reason: null,
      inputs: { ...inputs, f: this.settings.stressFactor, fy, x: peak.at, value: peak.value, limit, ratio },
    };
  }
}
