import { generateCombinations, type Generated, sameTerms } from '@/lib/combinations/generate';
import type { RuleSet } from '@/lib/combinations/rule-set';
import { idKey } from '@/lib/intake/ids';
import type { Place, ProblemList } from '@/lib/intake/problem-list';
import type { FrameCases } from '@/lib/intake/sheets/load-cases';
import type { Combination } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

/** The rule set of a batch, and where it was chosen. */
export interface ChosenSet {
  readonly set: RuleSet;
  readonly place: Place;
}

/** Combinations made by the batch's rule set, beside those that its sheet lists. */
export class GeneratedCombinations {
  private readonly made = new Map<FrameCases, Generated>();
  /** What was taken for kinds that some frame has. */
  private readonly said = new Set<string>();

  constructor(
    private readonly chosen: ChosenSet | null,
    private readonly problems: ProblemList,
  ) {}

  /**
   * What the set makes of a frame's cases, without those that the sheet lists: of one name, or of the same factors for the
   * same purpose. Too many of them, or a case without a rule, is told at the set.
   *
   * @param onSameName told for a listed combination that stands in place of a generated one with other factors
   */
  beside(
    listed: readonly Combination[],
    cases: FrameCases,
    frame: string,
    onSameName: (name: string) => void,
  ): { readonly list: readonly Combination[]; readonly notChecked: readonly string[] } {
    if (!this.chosen) return { list: [], notChecked: [] };
    const { set, place } = this.chosen;
    let made = this.made.get(cases);
    if (!made) this.made.set(cases, (made = generateCombinations(cases.list, set)));
    if (made.tooMany !== null) {
      this.problems.add(place, { code: 'out-of-range', message: say.tooManyCombinations(set.name, made.tooMany) }, frame);
      return { list: [], notChecked: [] };
    }
    for (const words of made.said) this.said.add(words);
    const names = new Set(listed.map(({ name }) => idKey(name)));
    const factors = new Set(listed.map(({ purpose, terms }) => sameTerms(purpose, terms)));
    const list = made.list.filter(({ name, purpose, terms }) => {
      if (factors.has(sameTerms(purpose, terms))) return false;
      if (!names.has(idKey(name))) return true;
      onSameName(name);
      return false;
    });
    return {
      list: list.map(({ name, purpose, terms }) => ({ name, purpose, terms })),
      notChecked: made.noRule.map(({ name, kind }) => say.noRuleForKind(name, kind, set.name)),
    };
  }

  /** Says at the set, once every frame is read, what it takes for the kinds that the batch has. */
  tellTaken(): void {
    if (!this.chosen || this.said.size === 0) return;
    const { set, place } = this.chosen;
    this.problems.add(place, { code: 'default-used', message: say.setTakes(set.name, [...this.said]) }, null);
  }
}
