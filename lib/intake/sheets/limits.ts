import { signedName } from '@/lib/combinations/expand-signs';
import type { FrameEntry } from '@/lib/intake/batch';
import type { Draft } from '@/lib/intake/draft';
import type { Family } from '@/lib/intake/families/family';
import { idKey } from '@/lib/intake/ids';
import type { ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Reader } from '@/lib/intake/reader';
import { level, RowsByFrame } from '@/lib/intake/rows-by-frame';
import type { Combinations } from '@/lib/intake/sheets/combinations';
import { type LimitedFrame, officeLimits } from '@/lib/intake/sheets/office-limits';
import { type LimitTarget, targetOf } from '@/lib/intake/sheets/limit-target';
import { type Row, rawCell, type Table } from '@/lib/intake/table';
import { ratioText } from '@/lib/intake/words';
import type { Limit, Measure } from '@/lib/model/frame';
import type { OfficeLimit } from '@/lib/model/office-limit';
import type { SettingOrigin, Settings } from '@/lib/model/settings';
import * as say from '@/lib/problems/wording';

const measures = ['deflection', 'sway', 'displacement', 'spread'] as const;
const directions = ['x', 'y', 'resultant'] as const;

interface Given {
  readonly limit: Limit;
  readonly row: Row | null;
  /** How closely the row names the frame: one for its family takes the place of one for all. */
  readonly level: number;
}

/** Limits on movement, as they apply to each frame; Setup's ratios are `*` rows. */
export class Limits {
  private readonly rows: RowsByFrame;
  private readonly shared = new Map<string, readonly Limit[]>();
  private readonly matched = new Set<Row>();
  private readonly unmatched = new Map<Row, { column: 'applies to' | 'to node'; frames: string[] }>();

  constructor(
    private readonly table: Table | undefined,
    known: { readonly framesByKey: ReadonlyMap<string, FrameEntry>; readonly families: ReadonlyMap<string, Family> },
    private readonly settings: Settings,
    private readonly origins: { readonly deflectionRatio: SettingOrigin; readonly swayRatio: SettingOrigin },
    private readonly combinations: Combinations,
    private readonly reader: Reader,
    private readonly problems: ProblemList,
    private readonly office: readonly OfficeLimit[],
  ) {
    this.rows = new RowsByFrame('Limits', table, known, reader);
  }

  for(draft: Draft): readonly Limit[] {
    const given: Given[] = [];
    for (const { row, level: at } of this.rows.for(draft.entry)) {
      if (at === level.all) this.rows.fits(row);
      if (!this.reader.keeps(row, draft.reading)) continue;
      given.push(...this.read(draft, row, at));
    }
    for (const each of this.fromSetup()) if (!given.some((other) => sets(other.limit, each.limit))) given.push(each);
    const office =
      this.office.length === 0 ? [] : officeLimits(this.office, given.map(({ limit }) => limit), this.settings, this.limited(draft)); // prettier-ignore
    given.push(...office.map((limit) => ({ limit, row: null, level: level.all })));
    const closest = closestOf(draft, given);
    this.tellEquals(draft, closest);
    const list = closest.map((each) => each.limit);
    const key = JSON.stringify(list);
    const known = this.shared.get(key);
    if (known) return known;
    this.shared.set(key, list);
    return list;
  }

  /** What of a frame the office's limits may name. */
  private limited({ members, nodes, combinationNames }: Draft): LimitedFrame {
    return {
      roles: new Set(members.flatMap(({ role }) => role ?? [])),
      places: new Map(nodes.flatMap(({ place }) => (place === null ? [] : [[idKey(place), place] as const]))),
      services: combinationNames.filter((name) => this.combinations.names.get(idKey(name))?.purpose === 'service'),
    };
  }

  private fromSetup(): Given[] {
    const of = (measure: Measure, n: number | 'none' | null, origin: SettingOrigin): Given[] => {
      if (typeof n !== 'number') return [];
      const source = origin.cell ?? origin.source;
      const any = { direction: null, toNode: null, absolute_m: null, combination: null, namedFrame: false };
      return [{ limit: { target: 'all', name: '*', measure, ratio: n, ...any, source }, row: null, level: level.all }];
    };
    return [
      ...of('deflection', this.settings.deflectionRatio, this.origins.deflectionRatio),
      ...of('sway', this.settings.swayRatio, this.origins.swayRatio),
    ];
  }

  private read(draft: Draft, row: Row, at: number): Given[] {
    const { reader } = this;
    const { reading } = draft;
    const name = reader.needId(row, 'applies to', reading);
    const measure = reader.word<Measure>(row, 'measure', measures, reading);
    if (measure === null)
      reader.tell(row, 'measure', { code: 'unknown-word', message: say.unknownWord('measure', '', measures) }, reading);
    const direction = reader.word(row, 'direction', directions, reading);
    const ratio = this.positive(draft, row, 'ratio');
    const absolute = this.positive(draft, row, 'absolute');
    const toNode = reader.id(row, 'to node', reading);
    const combinations = this.combinationsOf(draft, row);
    if (
      name === undefined ||
      !measure ||
      direction === undefined ||
      ratio === undefined ||
      absolute === undefined ||
      toNode === undefined
    )
      return [];
    if (combinations === undefined) return [];
    const fault = this.faultOf(row, name, measure, ratio, absolute, toNode);
    if (fault) {
      reader.tell(row, fault.column, { code: fault.code, message: fault.message }, reading);
      return [];
    }
    const target = targetOf(draft, name, measure);
    if (!target) return this.fitsNot(row, 'applies to', draft);
    if (toNode !== null && measure === 'spread' && !draft.nodeIndex.has(idKey(toNode)))
      return this.fitsNot(row, 'to node', draft);
    this.matched.add(row);
    return combinations.map((combination) => ({
      row,
      level: at,
      limit: {
        ...target,
        measure,
        direction,
        toNode:
          measure === 'spread' && toNode !== null ? (draft.nodes[draft.nodeIndex.get(idKey(toNode)) ?? -1]?.id ?? toNode) : null,
        ratio,
        absolute_m: absolute,
        combination,
        namedFrame: at === level.named,
        source: `${row.part.raw.name} row ${row.raw.row}`,
      },
    }));
  }

  /** Notes that a row is not for this frame; if it is for none, that is told when every frame is read. */
  private fitsNot(row: Row, column: 'applies to' | 'to node', draft: Draft): [] {
    // what it names may be the very row of this frame that is wrong, and told
    if (draft.shapeTrouble) this.matched.add(row);
    const before = this.unmatched.get(row);
    if (!before) this.unmatched.set(row, { column, frames: [draft.entry.id] });
    else {
      if (column === 'to node') before.column = column;
      before.frames.push(draft.entry.id);
    }
    return [];
  }

  private faultOf(
    row: Row,
    name: string,
    measure: Measure,
    ratio: number | null,
    absolute: number | null,
    toNode: string | null,
  ): { column: string; code: 'out-of-range' | 'not-a-number' | 'unknown-node'; message: string } | null {
    // prettier-ignore
    if (measure === 'displacement' && ratio !== null) return { column: 'ratio', code: 'out-of-range', message: say.displacementIsAbsolute() };
    if (ratio === null && absolute === null) {
      const column =
        measure === 'displacement' || (row.part.byName.has('absolute') && !row.part.byName.has('ratio')) ? 'absolute' : 'ratio';
      return { column, code: 'not-a-number', message: say.limitNeedsFigure(measure) };
    }
    if (measure === 'spread' && toNode === null)
      return { column: 'to node', code: 'unknown-node', message: say.spreadNeedsNode() };
    if (measure === 'spread' && toNode !== null && idKey(toNode) === idKey(name))
      return { column: 'to node', code: 'unknown-node', message: say.spreadOfOneNode() };
    return null;
  }

  private positive(draft: Draft, row: Row, column: 'ratio' | 'absolute'): number | null | undefined {
    const value = ratioIn(row, column) ?? this.reader.number(row, column, draft.reading);
    if (value === null || value === undefined || value > 0) return value;
    const text = rawCell(row, column)?.text ?? '';
    this.reader.tell(row, column, { code: 'not-positive', message: say.notPositive(column, text) }, draft.reading);
    return undefined;
  }

  /** The combination a row names, in all its signs; [null] for every service combination; undefined where unknown (told). */
  private combinationsOf(draft: Draft, row: Row): (string | null)[] | undefined {
    const typed = this.reader.id(row, 'combination', draft.reading);
    if (typed === undefined) return undefined;
    if (typed === null || typed === '*') return [null];
    const id = signedName(typed);
    const named = this.combinations.names.get(idKey(id));
    if (!named || named.purpose !== 'service') {
      const message = named ? say.limitOnStrength(id) : say.unknownCombination(id);
      this.reader.tell(row, 'combination', { code: 'unknown-word', message }, draft.reading);
      return undefined;
    }
    const signs = [...this.combinations.names].filter(([key, each]) => each.base === named.base && key !== idKey(named.base));
    const isBase = idKey(named.base) === idKey(id);
    return isBase && signs.length > 0 ? draft.combinationNames.filter((name) => signs.some(([key]) => key === idKey(name))) : [isBase ? named.base : id]; // prettier-ignore
  }

  /** Two limits of equal standing for one thing that differ: which is meant nobody can say. */
  private tellEquals(draft: Draft, given: readonly Given[]): void {
    const first = new Map<string, Given>();
    for (const each of given) {
      const { limit } = each;
      const key = standing(draft, limit);
      const before = first.get(key);
      if (!before) {
        first.set(key, each);
        continue;
      }
      const same = before.limit.ratio === limit.ratio && before.limit.absolute_m === limit.absolute_m;
      const [row, other] = each.row ? [each.row, before] : [before.row, each];
      if (!row) continue;
      const where = other.row ? `row ${other.row.raw.row}` : other.limit.source;
      const fault = same
        ? ({ code: 'repeated-row', message: say.repeatedLimit(where) } as const)
        : ({ code: 'conflicting-row', message: say.limitsDiffer(where) } as const);
      this.reader.tell(row, 'applies to', fault, draft.reading);
    }
  }

  /** Tells the rows that apply to nothing in any frame. */
  tellUnmatched(frames: readonly FrameEntry[]): void {
    if (this.table) this.rows.tellUnfit(this.reader, frames, this.problems);
    for (const [row, { column, frames: touched }] of this.unmatched) {
      if (this.matched.has(row)) continue;
      const code = column === 'to node' ? 'unknown-node' : 'unknown-word';
      const ofNodes = column === 'to node' || /displacement|spread/i.test(rawCell(row, 'measure')?.text ?? '');
      const message = say.limitFitsNothing(
        rawCell(row, column)?.text ?? '',
        column === 'to node' ? 'to node' : ofNodes ? 'nodes' : 'members',
      );
      for (const frame of touched) this.reader.tell(row, column, { code, message }, { ...forNobody, frame });
    }
  }
}

/** n of a cell typed as `L/250`; null for every other. */
function ratioIn(row: Row, column: 'ratio' | 'absolute'): number | null {
  const cell = column === 'ratio' ? rawCell(row, column) : null;
  const n = cell?.kind === 'text' ? ratioText(cell.text) : cell?.text;
  return cell && n !== undefined && n !== cell.text ? Number(n.replace(',', '.')) : null;
}

/** True where a sheet's limit stands instead of the office's own ratio for the same measure. */
function sets(given: Limit, other: Limit): boolean {
  return other.source === 'office' && given.target === 'all' && given.measure === other.measure && given.combination === null;
}

/** Without limits that a row closer to the frame says again. */
function closestOf(draft: Draft, given: readonly Given[]): readonly Given[] {
  const levels = new Map<string, number>();
  for (const each of given) {
    const key = standing(draft, each.limit);
    levels.set(key, Math.max(each.level, levels.get(key) ?? each.level));
  }
  return given.filter((each) => each.level === levels.get(standing(draft, each.limit)));
}

const ranks: Readonly<Record<LimitTarget['target'], number>> = {
  node: 1,
  member: 1,
  span: 1,
  place: 2,
  group: 2,
  role: 3,
  all: 4,
};

/** What makes two limits equals: the thing, its rank, measure, direction, combination, and whether the frame is named. */
function standing(draft: Draft, limit: Limit): string {
  let thing = limit.name;
  // a piece of a span and the span are one subject
  if (limit.target === 'member') thing = draft.members.find((m) => m.id === limit.name)?.span ?? limit.name;
  // only a displacement has a direction, and without one it is the resultant
  const direction = limit.measure === 'displacement' ? (limit.direction ?? 'resultant') : '';
  const parts = [ranks[limit.target], thing, limit.measure, direction, limit.toNode ?? '', limit.combination ?? '', limit.namedFrame]; // prettier-ignore
  return parts.join('|').toLowerCase();
}
