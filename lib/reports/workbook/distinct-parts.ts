/** Sections, materials, cases, combinations and limits of a batch, each once by its content, in order of first use. */
import type { Frame, Limit, LoadCase, Material, Section } from '@/lib/model/frame';
import type { ReportRow } from '@/lib/reports/workbook/report-sheet';

class Distinct<T> {
  private readonly byContent = new Map<string, T>();
  /** Lists that were seen as a whole are not looked into again: most frames of a batch share theirs. */
  private readonly lists = new Set<string>();

  add(things: readonly T[]): void {
    const list = JSON.stringify(things);
    if (this.lists.has(list)) return;
    this.lists.add(list);
    for (const thing of things) {
      const key = JSON.stringify(thing);
      if (!this.byContent.has(key)) this.byContent.set(key, thing);
    }
  }

  values(): Iterable<T> {
    return this.byContent.values();
  }
}

export class DistinctParts {
  readonly sections = new Distinct<Section>();
  readonly materials = new Distinct<Material>();
  readonly cases = new Distinct<LoadCase>();
  readonly limits = new Distinct<Limit>();
  /** Combination, purpose, case, factor: a row a term. */
  readonly terms = new Distinct<ReportRow>();

  add(frame: Frame): void {
    this.sections.add(frame.sections);
    this.materials.add(frame.materials);
    this.cases.add(frame.cases);
    this.limits.add(frame.limits);
    this.terms.add(
      frame.combinations.flatMap((each) =>
        each.terms.map((term): ReportRow => [each.name, each.purpose, frame.cases[term.case]?.name ?? '', term.factor]),
      ),
    );
  }
}
