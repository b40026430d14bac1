import { splitSign } from '@/lib/combinations/expand-signs';
import { nearestAny } from '@/lib/intake/distance';
import { idKey } from '@/lib/intake/ids';
import type { Entry, ProblemList } from '@/lib/intake/problem-list';
import type { Read, Reader, Reading } from '@/lib/intake/reader';
import type { LoadCases } from '@/lib/intake/sheets/load-cases';
import { type Column, headingPlace, type Part, partPlace, placeAt, type Row, type Table } from '@/lib/intake/table';
import { wordKey } from '@/lib/intake/words';
import * as say from '@/lib/problems/wording';

/** One term of a listed combination, with the cell that gave its factor. */
export interface Term {
  readonly caseKey: string;
  readonly caseName: string;
  readonly factor: number;
  readonly signed: boolean;
  readonly row: Row;
  readonly column: Column;
}

interface Terms {
  readonly terms: readonly Term[];
  readonly unknownCase: string | null;
  readonly sound: boolean;
}

interface CaseColumn {
  readonly column: Column;
  readonly caseKey: string;
  readonly caseName: string;
  /** Not a case of the batch, over numbers: whatever it factors is lost. */
  readonly unknown: Entry | null;
}

/** Reads terms from both forms of the sheet: a row a term (case, factor), or a column a case. */
export class CombinationTerms {
  private readonly wide = new Map<Part, readonly CaseColumn[]>();

  constructor(
    table: Table | undefined,
    private readonly cases: LoadCases,
    private readonly reader: Reader,
    private readonly problems: ProblemList,
  ) {
    for (const part of table?.parts ?? []) if (part.headingRow !== null) this.settleForm(part);
  }

  /** Decides a part's form and tells headings that are no case. */
  private settleForm(part: Part): void {
    const { problems } = this;
    const long = part.byName.has('case') || part.byName.has('factor');
    const others = part.columns.filter((column) => column.known === null);
    if (long) {
      for (const name of ['case', 'factor']) {
        if (part.byName.has(name)) continue;
        const place = { ...partPlace(part.raw), row: part.headingRow, heading: name };
        problems.add(place, { code: 'missing-column', message: say.missingColumn([name], 'Combinations'), stopsAll: true }, null);
      }
    }
    const columns: CaseColumn[] = [];
    const seen = new Map<string, Column>();
    for (const column of others) {
      const found = this.caseOf(column);
      const filled = part.dataRows.some((row) => looksLikeFactor(row.cells[column.index]?.text ?? ''));
      if (long) {
        if (found && filled)
          problems.add(headingPlace(part, column), { code: 'conflicting-row', message: say.bothForms(), stopsAll: true }, null);
        else
          problems.add(
            headingPlace(part, column),
            { code: 'column-ignored', message: say.columnIgnored(column.text, 'Combinations') },
            null,
          );
      } else if (found) {
        const first = seen.get(found.key);
        if (first) {
          const message = say.columnTwice(column.text, first.text);
          problems.add(headingPlace(part, column), { code: 'conflicting-row', message, stopsAll: true }, null);
          continue;
        }
        seen.set(found.key, column);
        columns.push({ column, caseKey: found.key, caseName: found.name, unknown: null });
      } else if (filled) {
        const near = nearestAny(idKey(column.text), this.cases.names);
        const fault = {
          code: 'combination-without-case',
          message: say.headingIsNoCase(column.text, near),
          stops: false,
        } as const;
        const unknown = problems.add(headingPlace(part, column), fault, null);
        columns.push({ column, caseKey: idKey(column.text), caseName: column.text, unknown });
      } else
        problems.add(
          headingPlace(part, column),
          { code: 'column-ignored', message: say.columnIgnored(column.text, 'Combinations') },
          null,
        );
    }
    if (!long) this.wide.set(part, columns);
  }

  /** The case that heads a column: as an id, else without its unit, else as a heading matches. */
  private caseOf(column: Column): { key: string; name: string } | null {
    for (const text of [column.text, column.name]) {
      const name = this.cases.names.get(idKey(text));
      if (name !== undefined) return { key: idKey(text), name };
    }
    const loose = [...this.cases.names].filter(([, name]) => wordKey(name) === wordKey(column.name));
    const [only] = loose;
    return only && loose.length === 1 ? { key: only[0], name: only[1] } : null;
  }

  of(rows: readonly Row[], reading: Reading): Terms {
    const terms: Term[] = [];
    const given = new Set<string>();
    let unknownCase: string | null = null;
    let sound = true;
    for (const row of rows) {
      const columns = this.wide.get(row.part);
      const read = columns ? this.wideTerms(row, columns, reading) : this.longTerm(row, reading);
      sound &&= read.sound;
      unknownCase ??= read.unknownCase;
      // a wide row gives every case, blank or not: a second one repeats them all
      const keys = columns ? columns.map((each) => each.caseKey) : read.terms.map((term) => term.caseKey);
      if (keys.some((key) => given.has(key))) {
        const message = say.termTwice(read.terms[0]?.caseName ?? '');
        this.reader.tell(row, columns ? 'combination' : 'case', { code: 'conflicting-row', message }, reading);
        sound = false;
      } else terms.push(...read.terms);
      for (const key of keys) given.add(key);
    }
    return { terms, unknownCase, sound };
  }

  private wideTerms(row: Row, columns: readonly CaseColumn[], reading: Reading): Terms {
    const terms: Term[] = [];
    let unknownCase: string | null = null;
    let sound = true;
    for (const { column, caseKey, caseName, unknown } of columns) {
      const factor = this.factor(row, column, reading);
      if (factor === undefined) sound = false;
      if (!factor) continue;
      if (unknown) {
        if (factor.value === 0) continue;
        unknownCase ??= caseName;
        this.problems.add(unknown.place, unknown, reading.frame);
      } else terms.push({ caseKey, caseName, factor: factor.value, signed: factor.signed, row, column });
    }
    return { terms, unknownCase, sound };
  }

  private longTerm(row: Row, reading: Reading): Terms {
    const none: Terms = { terms: [], unknownCase: null, sound: false };
    const id = this.reader.needId(row, 'case', reading);
    const column = row.part.byName.get('factor');
    const factor = column ? this.factor(row, column, reading) : null;
    if (factor === null && column) {
      this.problems.add(placeAt(row, column), { code: 'not-a-number', message: say.numberMissing('factor') }, reading.frame);
    }
    if (id === undefined || !factor || !column) return none;
    const name = this.cases.names.get(idKey(id));
    if (name === undefined) {
      const message = say.termWithoutCase(id, nearestAny(idKey(id), this.cases.names));
      this.reader.tell(row, 'case', { code: 'combination-without-case', message, stops: false }, reading);
      return { terms: [], unknownCase: factor.value === 0 ? null : id, sound: true };
    }
    const term = { caseKey: idKey(id), caseName: name, factor: factor.value, signed: factor.signed, row, column };
    return { terms: [term], unknownCase: null, sound: true };
  }

  /** A factor, with ± in front or not. */
  private factor(row: Row, column: Column, reading: Reading): Read<{ value: number; signed: boolean }> {
    const cell = row.raw.cells[column.index];
    const bare = cell?.kind === 'text' ? splitSign(cell.text) : null;
    if (bare !== null && cell) {
      const cells = row.raw.cells.map((each, i) => (i === column.index ? ({ kind: 'text', text: bare } as const) : each));
      // read as if from a text file: ±1.5 is no number stored as text by mistake
      const unsigned: Row = { part: { ...row.part, typed: false }, raw: { ...row.raw, cells } };
      const value = this.reader.numberAs(unsigned, column, 'number', 1, reading);
      return value === null || value === undefined ? value : { value, signed: true };
    }
    const value = this.reader.numberAs(row, column, 'number', 1, reading);
    return value === null || value === undefined ? value : { value, signed: false };
  }
}

function looksLikeFactor(text: string): boolean {
  return /^[±+−–\-\s/]*[.,]?\d/.test(text) || text.startsWith('{');
}
