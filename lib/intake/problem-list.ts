import { cellAddress } from '@/lib/intake/files/cell-address';
import { errorCodes, type Problem, type ProblemCode, type Severity, warningCodes } from '@/lib/problems/problem';

/** Where a problem stands. `order` is the part's place among all sheets of all files; Infinity = a sheet that is not there. */
export interface Place {
  readonly order: number;
  readonly sheet: string | null;
  readonly file: string | null;
  /** 1-based. */
  readonly row: number | null;
  /** 0-based; null = no one cell. */
  readonly column: number | null;
  /** Heading as typed, or the missing one's name. */
  readonly heading: string | null;
  readonly found: string | null;
}

export interface Fault {
  readonly code: ProblemCode;
  readonly message: string;
  readonly severity?: Severity;
  /** True: no frame of the batch can run. */
  readonly stopsAll?: boolean;
  /** False: it lowers verdicts and stops nothing. */
  readonly stops?: boolean;
}

/** A problem being collected: one a cell and code, however many frames it touches. */
export class Entry {
  readonly frames = new Set<string>();
  constructor(
    readonly place: Place,
    readonly code: ProblemCode,
    readonly severity: Severity,
    readonly message: string,
    readonly stops: boolean,
    public stopsAll: boolean,
  ) {}
}

/** Notes and warnings of one code on one sheet that are listed one by one; what comes after is counted only. */
const mostMinor = 5000;
const errors: ReadonlySet<string> = new Set(errorCodes);
const warnings: ReadonlySet<string> = new Set(warningCodes);

const usual = (code: ProblemCode): Severity => (errors.has(code) ? 'error' : warnings.has(code) ? 'warning' : 'note');

/** Collects what is wrong: one problem a cell with every frame it touches, in the order of sheets, rows, columns. */
export class ProblemList {
  private readonly entries = new Map<string, Entry>();
  private readonly minor = new Map<string, number>();
  private readonly given: Problem[] = [];
  private recorder: Entry[] | null = null;
  readonly stopped = new Set<string>();
  stopsAll = false;

  /** Takes in problems of whole files. */
  take(problems: readonly Problem[]): void {
    for (const problem of problems) {
      this.given.push(problem);
      if (problem.stopsAll) this.stopsAll = true;
      if (problem.severity === 'error') for (const frame of problem.frames) this.stopped.add(frame);
    }
  }

  /** Tells a fault at a place; of one cell and code only the first message is kept. `frame` null = none in particular. */
  add(place: Place, fault: Fault, frame: string | null): Entry {
    const severity = fault.severity ?? usual(fault.code);
    const key = `${place.order}|${place.sheet}|${place.row}|${place.column}|${fault.code}|${place.column === null ? place.heading : ''}`;
    let entry = this.entries.get(key);
    if (!entry) {
      const stopsAll = severity === 'error' && fault.stopsAll === true;
      entry = new Entry(place, fault.code, severity, fault.message, severity === 'error' && fault.stops !== false, stopsAll);
      if (stopsAll) this.stopsAll = true;
      if (severity === 'error' || this.hasRoom(place, fault.code)) this.entries.set(key, entry);
    }
    if (this.recorder && !this.recorder.includes(entry)) this.recorder.push(entry);
    if (frame !== null) this.touch(entry, frame);
    return entry;
  }

  /** Says that a problem told before touches this frame too. */
  touch(entry: Entry, frame: string): void {
    entry.frames.add(frame);
    if (entry.stops) this.stopped.add(frame);
  }

  /** Says that what these problems left unknown concerns every frame. */
  stopEverything(entries: readonly Entry[]): void {
    for (const entry of entries) {
      if (entry.severity !== 'error') continue;
      entry.stopsAll = true;
      this.stopsAll = true;
    }
  }

  /** Runs `read` and hands back what it told, so that frames can be added when they use the thing read. */
  record<T>(read: () => T): { value: T; entries: Entry[] } {
    const outer = this.recorder;
    this.recorder = [];
    const value = read();
    const entries = this.recorder;
    this.recorder = outer;
    return { value, entries };
  }

  list(): Problem[] {
    const sorted = [...this.entries.values()].sort(
      (a, b) =>
        compare(a.place.order, b.place.order) ||
        (a.place.row ?? 0) - (b.place.row ?? 0) ||
        (a.place.column ?? -1) - (b.place.column ?? -1),
    );
    return [...this.given, ...sorted.map(problemOf), ...this.leftOut()];
  }

  private hasRoom(place: Place, code: ProblemCode): boolean {
    const key = `${place.sheet}|${code}`;
    const count = (this.minor.get(key) ?? 0) + 1;
    this.minor.set(key, count);
    return count <= mostMinor;
  }

  private leftOut(): Problem[] {
    return [...this.minor].flatMap(([key, count]) => {
      if (count <= mostMinor) return [];
      const [sheet = null, code] = key.split('|') as [string, ProblemCode];
      const message = `${count - mostMinor} more of the same on this sheet are not listed one by one`;
      const where = { sheet, file: null, row: null, column: null, cell: null, found: null };
      return [{ severity: usual(code), code, ...where, frames: [], message, stopsAll: false }];
    });
  }
}

const compare = (a: number, b: number): number => (a === b ? 0 : a < b ? -1 : 1);

/** A cell may hold 32,000 characters; a problem does not repeat them all. */
const cut = (text: string, most: number): string => (text.length > most ? `${text.slice(0, most)}…` : text);

function problemOf({ place, code, severity, message, frames, stopsAll }: Entry): Problem {
  return {
    severity,
    code,
    sheet: place.sheet,
    file: place.file,
    row: place.row,
    column: place.heading,
    cell: place.row === null || place.column === null ? null : cellAddress(place.row, place.column),
    frames: [...frames],
    found: place.found === null ? null : cut(place.found, 300),
    message: cut(message, 800),
    stopsAll,
  };
}
