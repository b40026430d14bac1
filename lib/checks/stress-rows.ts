import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Check } from '@/lib/results/result';
import type { InPlane } from '@/lib/sections/in-plane';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import type { LineBounds } from './line-bounds';
import { noPeak, SAME, type Peak } from './peak';
import { verdictOf } from './verdict';

export const stressNames = ['normal stress', 'shear stress', 'equivalent stress'] as const;
type StressName = (typeof stressNames)[number];
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

/** Keeps, for the three stress checks of a member (by position in stressNames), what governs: a row is made at the end only. */
export class StressRows {
  private readonly best: readonly Peak[] = [noPeak(), noPeak(), noPeak()];
  private readonly combination: string[] = ['', '', ''];
  private readonly refused: (Check | null)[] = [null, null, null];
  private readonly reasons: (Set<string> | null)[] = [null, null, null];
  private readonly rows: readonly Check[][] = [[], [], []];
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
    return this.all ? -1 : this.best[check]!.value;
  }

  /** Whether no stress within these bounds could govern, so that a combination need not be looked at more closely. */
  staysBelow({ N, V, M }: LineBounds, perTop: number, perBottom: number): boolean {
    const normal = N / this.of.A_m2 + M * Math.max(perTop, perBottom);
    if (!(normal <= this.floor(0))) return false;
    const shear = this.of.AvPeak_m2 === null ? Infinity : V / this.of.AvPeak_m2;
    return shear <= this.floor(1) && Math.sqrt(normal * normal + 3 * shear * shear) <= this.floor(2);
  }

  /** Takes a combination's peak and returns its stress. */
  take(check: number, combination: string, peak: Peak): number {
    const best = this.best[check]!;
    if (best.value < 0 || peak.value > best.value * (1 + SAME)) {
      best.value = peak.value;
      best.at = peak.at;
      best.face = peak.face;
      best.N = peak.N;
      best.V = peak.V;
      best.M = peak.M;
      this.combination[check] = combination;
    }
    if (this.all) this.rows[check]!.push(this.row(check, combination, peak));
    return peak.value;
  }

  refuse(check: number, combination: string, reason: string): void {
    const reasons = (this.reasons[check] ??= new Set());
    if (!this.all && reasons.has(reason)) return;
    reasons.add(reason);
    const row = notCheckedRow(stressSubject(this.frame, this.member, stressNames[check]!), combination, reason);
    if (this.all) this.rows[check]!.push(row);
    this.refused[check] ??= row;
  }

  finish(findings: Findings): void {
    for (let check = 0; check < 3; check++) {
      const best = this.best[check]!;
      const rows: Check[] = this.all ? this.rows[check]! : [];
      if (!this.all) {
        if (best.value >= 0) rows.push(this.row(check, this.combination[check]!, best));
        const refused = this.refused[check];
        if (refused) rows.push(refused);
      }
      keepGoverning(findings, rows);
      for (const reason of this.reasons[check] ?? []) findings.notChecked.add(`${stressNames[check]!}: ${reason}`);
    }
  }

  private row(check: number, combination: string, { value, at, face, N, V, M }: Peak): Check {
    const name = stressNames[check]!;
    const limit = this.limits[check]!;
    const ratio = value / limit;
    const { frame, fy } = this;
    const { A_m2: A, AvPeak_m2: Av } = this.of;
    const { id, section: index } = frame.members[this.member]!;
    const section = frame.sections[index]!.name;
    const W = face === 'top' ? this.of.Wtop_m3 : this.of.Wbottom_m3;
    const f = this.settings.stressFactor;
    return {
      subjectKind: 'member',
      subject: id,
      check: name,
      combination,
      at,
      face: check === 1 ? null : face,
      value,
      limit,
      quantity: 'stress',
      ratio,
      verdict: verdictOf(ratio, this.settings.nearLimit),
      reason: null,
      reference: references[name],
      member: this.member,
      inputs:
        check === 0
          ? { section, N, M, A, W, face, f, fy, x: at, value, limit, ratio }
          : check === 1
            ? { section, V, Av, f, fy, x: at, value, limit, ratio }
            : { section, N, M, V, A, W, Av, face, f, fy, x: at, value, limit, ratio },
    };
  }
}
