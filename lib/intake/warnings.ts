import { readRuleSet } from '@/lib/combinations/read-rule-set';
import type { RuleSet } from '@/lib/combinations/rule-set';
import type { Batch } from '@/lib/intake/batch';
import type { Place } from '@/lib/intake/problem-list';
import { absentPlace, headingPlace, partPlace, placeOf, rawCell, type Row } from '@/lib/intake/table';
import { idKey } from '@/lib/intake/ids';
import type { Combination, Frame } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

/** Warnings about the batch as a whole: self-weight, and the stress factor against the combinations' factors. */
export class BatchWarnings {
  private readonly light = new Set<string>();
  private weighed = 0;
  private readonly judged = new Set<readonly Combination[]>();
  private readonly stressTold = new Set<string>();

  /** Of the batch's rule set; null = none is chosen. */
  private readonly setLevel: RuleSet['level'] | null;

  constructor(private readonly batch: Batch) {
    const { combinationSet } = batch.settings;
    this.setLevel = combinationSet === null ? null : (readRuleSet(combinationSet).set?.level ?? null);
  }

  /** Looks at one frame that is read. @param casesSound false where a row of its load cases is wrong (told) */
  look(frame: Frame, casesSound: boolean): void {
    if (casesSound) this.weighed += 1;
    if (casesSound && !frame.cases.some((each) => each.selfWeight !== 0)) this.light.add(frame.id);
    if (this.judged.has(frame.combinations)) return;
    this.judged.add(frame.combinations);
    for (const combination of frame.combinations) {
      this.twoWeights(frame, combination);
      this.stressFactor(combination);
    }
  }

  finish(): void {
    if (this.light.size === 0) return;
    const all = this.light.size === this.weighed;
    const { problems, tables } = this.batch;
    const part = tables.get('Load cases')?.parts[0];
    const column = part?.byName.get('self weight');
    const place = !part
      ? absentPlace('Load cases')
      : column
        ? headingPlace(part, column)
        : { ...partPlace(part.raw), row: part.headingRow };
    const entry = problems.add(place, { code: 'no-self-weight', message: say.noSelfWeight(all) }, null);
    if (!all) for (const frame of this.light) problems.touch(entry, frame);
  }

  private rowOf(combination: Combination): Row | undefined {
    const names = [combination.name, combination.name.replace(/ \([+− ]+\)$/, '')].map(idKey);
    return this.batch.tables
      .get('Combinations')
      ?.rows.find((row) => names.includes(idKey(rawCell(row, 'combination')?.text ?? '')));
  }

  private twoWeights(frame: Frame, combination: Combination): void {
    const heavy = combination.terms
      .filter((term) => frame.cases[term.case]?.selfWeight)
      .map((term) => frame.cases[term.case]?.name ?? '');
    const row = this.rowOf(combination);
    const place = row ? placeOf(row, 'combination') : this.batch.settingPlaces.get('combinationSet');
    if (heavy.length < 2 || !place) return;
    const message = say.twoSelfWeights(combination.name, heavy);
    this.batch.problems.add(place, { code: 'no-self-weight', message }, null);
  }

  private stressFactor(combination: Combination): void {
    const { settings, settingPlaces, problems } = this.batch;
    if (combination.purpose !== 'strength' || settings.strengthCheck !== 'elastic stress') return;
    const largest = Math.max(...combination.terms.map((term) => Math.abs(term.factor)), 0);
    const f = settings.stressFactor;
    const factored = f < 0.75 && largest > 1.2;
    const plain = f >= 0.9 && combination.terms.length > 0 && largest <= 1;
    if (!factored && !plain) return;
    const row = this.rowOf(combination);
    // one of a rule set may hold small factors only and still be of factored loads: the set says which it is
    if (!row && this.setLevel !== null && (factored ? this.setLevel !== 'factored' : this.setLevel !== 'allowable')) return;
    const place: Place | null =
      settingPlaces.get('stressFactor') ??
      (row ? placeOf(row, 'combination') : null) ??
      settingPlaces.get('combinationSet') ??
      null;
    const key = factored ? 'factored' : 'plain';
    if (!place || this.stressTold.has(key)) return;
    this.stressTold.add(key);
    const message = factored ? say.stressFactorLow(f, combination.name, largest) : say.stressFactorHigh(f, combination.name);
    problems.add(place, { code: 'stress-factor', message }, null);
  }
}
