import { expandSigns, mostSigned } from '@/lib/combinations/expand-signs';
import type { FrameEntry } from '@/lib/intake/batch';
import type { Family } from '@/lib/intake/families/family';
import { idKey } from '@/lib/intake/ids';
import type { Entry, ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Reader, type Reading } from '@/lib/intake/reader';
import { RowsByFrame } from '@/lib/intake/rows-by-frame';
import { CombinationTerms, type Term } from '@/lib/intake/sheets/combination-terms';
import type { GeneratedCombinations } from '@/lib/intake/sheets/generated-combinations';
import type { FrameCases, LoadCases } from '@/lib/intake/sheets/load-cases';
import { placeAt, type Row, type Table } from '@/lib/intake/table';
import type { Combination, Purpose } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

const purposes = ['strength', 'service'] as const;

/** A frame's combinations, and why some of what was listed is not among them. */
export interface FrameCombinations {
  readonly list: readonly Combination[];
  readonly notChecked: readonly string[];
}

/** A combination as listed for some frames: read once. */
interface Listed {
  readonly name: string;
  readonly key: string;
  readonly purpose: Purpose;
  readonly terms: readonly Term[];
  /** Name of a case that the whole batch does not know: the combination is left out everywhere. */
  readonly unknownCase: string | null;
}

interface Once {
  readonly listed: Listed | undefined;
  readonly entries: readonly Entry[];
}

/** The batch's combinations, in either form of the sheet. */
export class Combinations {
  private readonly rows: RowsByFrame;
  private readonly terms: CombinationTerms;
  private readonly once = new Map<Row, Once>();
  /** A row's place in the sheet: combinations come in the sheet's order, whichever frames they are for. */
  private readonly places: ReadonlyMap<Row, number>;
  private readonly shared = new Map<FrameCases, Map<string, FrameCombinations & { entries: readonly Entry[] }>>();
  /** Every listed name (base and with signs) by its key, with its purpose. */
  readonly names = new Map<string, { base: string; purpose: Purpose }>();

  constructor(
    private readonly table: Table | undefined,
    known: { readonly framesByKey: ReadonlyMap<string, FrameEntry>; readonly families: ReadonlyMap<string, Family> },
    cases: LoadCases,
    private readonly reader: Reader,
    private readonly problems: ProblemList,
    /** With imperfections a strength combination has two results, `C1 →` and `C1 ←`. */
    private readonly leans: boolean,
    private readonly generated: GeneratedCombinations,
  ) {
    this.rows = new RowsByFrame('Combinations', table, known, reader);
    this.places = new Map((table?.rows ?? []).map((row, i) => [row, i]));
    this.terms = new CombinationTerms(table, cases, reader, problems);
    for (const row of table?.rows ?? []) {
      const id = reader.id(row, 'combination', forNobody);
      const purpose = reader.word(row, 'purpose', purposes, forNobody);
      if (id && purpose && !this.names.has(idKey(id))) this.names.set(idKey(id), { base: id, purpose });
    }
  }

  for(entry: FrameEntry, cases: FrameCases): FrameCombinations {
    const personal = this.table?.parts.some((part) => part.byName.has('when')) ?? false;
    const scope = this.rows.scopeOf(entry);
    let byScope = this.shared.get(cases);
    if (!byScope) this.shared.set(cases, (byScope = new Map()));
    const known = personal ? undefined : byScope.get(scope);
    const read = known ?? this.problemsRecorded(entry, cases);
    if (known) for (const told of known.entries) this.problems.touch(told, entry.id);
    else if (!personal) byScope.set(scope, read);
    return read;
  }

  private problemsRecorded(entry: FrameEntry, cases: FrameCases): FrameCombinations & { entries: readonly Entry[] } {
    const { value, entries } = this.problems.record(() => this.read(entry, cases));
    for (const told of entries) this.problems.touch(told, entry.id);
    return { ...value, entries };
  }

  private read(entry: FrameEntry, cases: FrameCases): FrameCombinations {
    const groups = new Map<string, { level: number; place: number; rows: Row[] }>();
    for (const { row, level } of this.rows.for(entry)) {
      if (level === 0) this.rows.fits(row);
      if (!this.reader.keeps(row, entry.reading)) continue;
      const id = this.reader.needId(row, 'combination', { ...forNobody, frame: entry.id });
      if (id === undefined) continue;
      const group = groups.get(idKey(id));
      const place = Math.min(this.places.get(row) ?? 0, group?.place ?? Infinity);
      if (!group || group.level < level) groups.set(idKey(id), { level, place, rows: [row] });
      else group.rows.push(row);
    }
    const inOrder = [...groups.values()].sort((a, b) => a.place - b.place);
    const list: Combination[] = [];
    const notChecked: string[] = [];
    const taken = new Map<string, Row | undefined>();
    for (const { rows } of inOrder) {
      const listed = this.listed(rows, entry.reading);
      if (!listed) continue;
      if (listed.unknownCase !== null) {
        notChecked.push(say.combinationLeftOut(listed.name, listed.unknownCase));
        continue;
      }
      for (const each of this.expand(listed, cases, entry)) {
        if (taken.has(idKey(each.name))) {
          const first = rows[0];
          if (first)
            this.reader.tell(
              first,
              'combination',
              { code: 'conflicting-row', message: say.combinationNameTaken(each.name) },
              { ...forNobody, frame: entry.id },
            );
          continue;
        }
        taken.set(idKey(each.name), rows[0]);
        list.push(each);
      }
    }
    const made = this.generated.beside(list, cases, entry.id, (name) => {
      const row = taken.get(idKey(name));
      const fault = { code: 'default-used', message: say.listedInstead(name) } as const;
      if (row) this.reader.tell(row, 'combination', fault, { ...forNobody, frame: entry.id });
    });
    list.push(...made.list);
    notChecked.push(...made.notChecked);
    for (const { name, purpose } of made.list) this.names.set(idKey(name), { base: name, purpose });
    if (this.leans) this.tellDirections(list, taken, entry);
    if (groups.size === 0 && list.length === 0) notChecked.push('no combinations');
    return { list, notChecked };
  }

  /** A service combination with the name that a direction of a strength combination gets. */
  private tellDirections(list: readonly Combination[], rows: ReadonlyMap<string, Row | undefined>, entry: FrameEntry): void {
    const leaning = new Set(list.filter(({ purpose }) => purpose === 'strength').flatMap(({ name }) => [idKey(`${name} →`), idKey(`${name} ←`)])); // prettier-ignore
    for (const { name, purpose } of list) {
      const row = rows.get(idKey(name));
      if (purpose === 'strength' || !row || !leaning.has(idKey(name))) continue;
      const fault = { code: 'conflicting-row', message: say.directionNameTaken(name) } as const;
      this.reader.tell(row, 'combination', fault, { ...forNobody, frame: entry.id });
    }
  }

  /** Reads the rows of one combination, once for all frames that they are for. */
  private listed(rows: readonly Row[], reading: Reading): Listed | undefined {
    const [first] = rows;
    if (!first) return undefined;
    const personal = rows.some((row) => row.raw.cells.some((cell) => cell?.text.startsWith('{')));
    if (personal) return this.readListed(rows, first, reading);
    let once = this.once.get(first);
    if (!once) {
      const { value, entries } = this.problems.record(() => this.readListed(rows, first, forNobody));
      once = { listed: value, entries };
      this.once.set(first, once);
    }
    for (const told of once.entries) this.problems.add(told.place, told, null);
    return once.listed;
  }

  private readListed(rows: readonly Row[], first: Row, reading: Reading): Listed | undefined {
    const { reader } = this;
    const name = reader.id(first, 'combination', reading) ?? '';
    let purpose: Purpose | null = null;
    let purposeRow = 0;
    let sound = true;
    for (const row of rows) {
      const own = reader.word(row, 'purpose', purposes, reading);
      if (own === undefined) sound = false;
      if (!own) continue;
      if (purpose === null) [purpose, purposeRow] = [own, row.raw.row];
      else if (own !== purpose) {
        reader.tell(row, 'purpose', { code: 'conflicting-row', message: say.purposesDiffer(name, purposeRow) }, reading);
        sound = false;
      }
    }
    if (purpose === null && sound) {
      reader.tell(first, 'purpose', { code: 'unknown-word', message: say.unknownWord('purpose', '', purposes) }, reading);
      sound = false;
    }
    const { terms, unknownCase, sound: termsSound } = this.terms.of(rows, reading);
    if (terms.filter((term) => term.signed).length > mostSigned) {
      reader.tell(first, 'combination', { code: 'out-of-range', message: say.tooManySigns(mostSigned) }, reading);
      sound = false;
    }
    if (!sound || !termsSound || purpose === null) return undefined;
    return { name, key: idKey(name), purpose, terms, unknownCase };
  }

  private expand(listed: Listed, cases: FrameCases, entry: FrameEntry): Combination[] {
    return expandSigns(listed.name, listed.terms).map(({ name, factors }) => {
      if (name !== listed.name) this.names.set(idKey(name), { base: listed.name, purpose: listed.purpose });
      const terms = listed.terms.flatMap((term, i) => {
        const factor = factors[i] ?? 0;
        if (factor === 0) return [];
        const index = cases.byKey.get(term.caseKey);
        if (index !== undefined) return [{ case: index, factor }];
        if (cases.sound) {
          const fault = { code: 'default-used', message: say.caseCountsZero(term.caseName) } as const;
          this.problems.add(placeAt(term.row, term.column), fault, entry.id);
        }
        return [];
      });
      return { name, purpose: listed.purpose, terms };
    });
  }

  tellUnfit(frames: readonly FrameEntry[]): void {
    if (this.table) this.rows.tellUnfit(this.reader, frames, this.problems);
    this.generated.tellTaken();
  }
}
