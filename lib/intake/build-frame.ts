import { readRuleSet } from '@/lib/combinations/read-rule-set';
import type { Batch, FrameEntry } from '@/lib/intake/batch';
import { type Draft, newDraft } from '@/lib/intake/draft';
import { checkGeometry } from '@/lib/intake/geometry/check-geometry';
import { tellUnheld } from '@/lib/intake/geometry/connected';
import { nodesWithoutRotation } from '@/lib/intake/geometry/joints';
import { RowsByFrame } from '@/lib/intake/rows-by-frame';
import type { SheetName } from '@/lib/intake/sheet-definitions';
import { tellAnalysisNeeds } from '@/lib/intake/sheets/analysis-needs';
import { Combinations } from '@/lib/intake/sheets/combinations';
import { type ChosenSet, GeneratedCombinations } from '@/lib/intake/sheets/generated-combinations';
import { Limits } from '@/lib/intake/sheets/limits';
import { readMemberLoads } from '@/lib/intake/sheets/member-loads';
import { readMembers } from '@/lib/intake/sheets/members';
import { readNodeLoads } from '@/lib/intake/sheets/node-loads';
import { readNodes } from '@/lib/intake/sheets/nodes';
import { readSettlements } from '@/lib/intake/sheets/settlements';
import { readSupports, zerosAndOnes } from '@/lib/intake/sheets/supports';
import { absentPlace, type Row } from '@/lib/intake/table';
import type { Frame, Material, Section } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

const frameSheets = ['Nodes', 'Members', 'Supports', 'Node loads', 'Member loads', 'Settlements'] as const satisfies SheetName[];

/** Reads frames one after the other from the batch's sheets. */
export class FrameBuilder {
  private readonly rows: ReadonlyMap<(typeof frameSheets)[number], RowsByFrame>;
  readonly combinations: Combinations;
  private readonly limits: Limits;
  private readonly refusedSupports;
  private readonly sectionLists = new Shared<Section>();
  private readonly materialLists = new Shared<Material>();

  constructor(private readonly batch: Batch) {
    const { tables, reader, problems } = batch;
    this.rows = new Map(frameSheets.map((name) => [name, new RowsByFrame(name, tables.get(name), batch, reader)]));
    this.combinations = new Combinations(
      tables.get('Combinations'),
      batch,
      batch.cases,
      reader,
      problems,
      batch.settings.imperfections !== 'none',
      new GeneratedCombinations(chosenSet(batch), problems),
    );
    this.limits = new Limits(
      tables.get('Limits'),
      batch,
      batch.settings,
      batch.origins,
      this.combinations,
      reader,
      problems,
      batch.officeLimits,
    );
    this.refusedSupports = zerosAndOnes(tables.get('Supports'));
  }

  private of(name: (typeof frameSheets)[number]): RowsByFrame {
    const rows = this.rows.get(name);
    if (!rows) throw new RangeError(`Expected a sheet with frames, got ${name}`);
    return rows;
  }

  /** The frame in SI, and the row of each member; what is wrong with it is told, and the result is then not to be used. */
  build(entry: FrameEntry): { readonly frame: Frame; readonly memberRows: readonly Row[] } {
    const { batch } = this;
    const draft = newDraft(batch, entry);
    readNodes(draft, this.of('Nodes'));
    if (draft.nodeIndex.size === 0 && !batch.problems.stopped.has(entry.id)) {
      batch.problems.add(entry.place, { code: 'unknown-node', message: say.frameWithoutNodes(entry.id) }, entry.id);
    }
    readMembers(draft, this.of('Members'));
    readSupports(draft, this.of('Supports'), this.refusedSupports);
    readNodeLoads(draft, this.of('Node loads'), nodesWithoutRotation(draft));
    readMemberLoads(draft, this.of('Member loads'));
    readSettlements(draft, this.of('Settlements'));
    checkGeometry(draft);
    tellUnheld(draft);
    tellWeight(draft);
    tellAnalysisNeeds(draft);
    const { list: combinations, notChecked } = this.combinations.for(entry, draft.cases);
    draft.combinationNames.push(...combinations.map((each) => each.name));
    const limits = this.limits.for(draft);
    if (!batch.problems.stopped.has(entry.id)) batch.partOrigins.see(draft);
    const frame: Frame = {
      id: entry.id,
      title: entry.title,
      group: entry.group,
      count: entry.count,
      note: entry.note,
      family: entry.variant?.origin ?? null,
      nodes: draft.nodes,
      members: draft.members,
      sections: this.sectionLists.same(draft.sections),
      materials: this.materialLists.same(draft.materials),
      supports: draft.supports,
      cases: draft.cases.list,
      nodeLoads: draft.nodeLoads,
      memberLoads: draft.memberLoads,
      settlements: draft.settlements,
      combinations,
      limits,
      notChecked,
    };
    return { frame, memberRows: draft.memberRows };
  }

  /** Tells what only shows when every frame is read. */
  finish(): void {
    const { frames, reader, problems, cases } = this.batch;
    for (const rows of this.rows.values()) rows.tellUnfit(reader, frames, problems);
    cases.tellUnfit(frames);
    this.combinations.tellUnfit(frames);
    this.limits.tellUnmatched(frames);
  }
}

/** The rule set that Setup or the office chose; null = only combinations that are listed. */
function chosenSet({ settings, settingPlaces }: Batch): ChosenSet | null {
  if (settings.combinationSet === null) return null;
  const { set } = readRuleSet(settings.combinationSet);
  if (!set) throw new RangeError(`Expected a combination set that was read, got ${settings.combinationSet}`);
  return { set, place: settingPlaces.get('combinationSet') ?? absentPlace('Setup') };
}

/** A material without density where a case has self-weight. */
function tellWeight(draft: Draft): void {
  const heavy = draft.cases.list.find((each) => each.selfWeight !== 0);
  if (!heavy) return;
  draft.materials.forEach((material, i) => {
    const row = draft.materialRows[i];
    if (material.density_kg_m3 !== null || !row) return;
    const at = row.part.byName.has('density') ? 'density' : 'material';
    draft.batch.reader.tell(
      row,
      at,
      { code: 'not-a-number', message: say.densityMissing(material.name, heavy.name) },
      draft.reading,
    );
  });
}

/** Keeps one array for all frames that list the same things. */
class Shared<T extends object> {
  private readonly numbers = new Map<T, number>();
  private readonly lists = new Map<string, readonly T[]>();

  same(list: readonly T[]): readonly T[] {
    const key = list.map((item) => this.numberOf(item)).join(',');
    const known = this.lists.get(key);
    if (known) return known;
    this.lists.set(key, list);
    return list;
  }

  private numberOf(item: T): number {
    const known = this.numbers.get(item);
    if (known !== undefined) return known;
    this.numbers.set(item, this.numbers.size);
    return this.numbers.size - 1;
  }
}
