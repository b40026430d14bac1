import 'server-only';
import type { z } from 'zod';
import { databaseFile, db } from '@/db/client';
import { listChanges } from '@/db/queries/changes';
import { listRevisions, type RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { ApiError, notFound } from '@/lib/api/error';
import type { compareInput } from '@/lib/api/inputs';
import type { RecordedChange } from '@/lib/reports/compare-workbook/compare-sheets';
import { compareSettings, type SettingDifference } from '@/lib/results/compare-inputs';
import type { ComparedPage } from '@/lib/results/compared-page';
import { pools } from '@/worker/boot';
import type { CompareTask } from '@/worker/threads/compare-revisions';

export type CompareInput = z.output<typeof compareInput>;

/** Two revisions of a batch, the one that is compared with first. */
export interface ComparedTwo {
  readonly before: RevisionRecord;
  readonly after: RevisionRecord;
  /** All of the batch, A first. */
  readonly all: readonly RevisionRecord[];
}

/**
 * The revision that another is compared with: the one named, else the one it was made from, else the one before it.
 *
 * @returns null where there is no other to compare it with
 * @throws {ApiError} not-found for a letter that the batch does not have
 */
export async function comparedTwo(
  person: Person,
  after: RevisionRecord,
  letter: string | undefined,
): Promise<ComparedTwo | null> {
  const all = await listRevisions(db(), person.office, after.batch);
  const at = all.findIndex(({ id }) => id === after.id);
  const named = letter ?? after.madeFrom ?? all[at - 1]?.letter;
  if (named === undefined) return null;
  const before = all.find((one) => one.letter === named);
  if (!before) throw notFound('revision');
  return { before, after, all };
}

/** @throws {ApiError} conflict while one of them is still being read, or nothing of it could be read */
export function needRead({ before, after }: ComparedTwo): void {
  for (const { letter, state, settings } of [before, after]) {
    if (state === 'reading') throw new ApiError('conflict', `Revision ${letter} is still being read. Ask again in a moment.`);
    if (settings === null) {
      throw new ApiError('conflict', `Nothing of revision ${letter} could be read, so there is nothing to compare.`);
    }
  }
}

/** What moved, worked out in a thread: a batch's frames are many. */
export async function comparedPage(two: ComparedTwo, asked: CompareInput, strip: boolean): Promise<ComparedPage> {
  const { before, after } = two;
  const { list, show, by, page, size } = asked;
  const task: CompareTask = {
    file: databaseFile(),
    office: after.office,
    before: before.id,
    after: after.id,
    list,
    show,
    by,
    offset: (page - 1) * size,
    limit: size,
    strip,
  };
  const { tables, bundle } = pools();
  const found = (await tables.run(task, { filename: bundle('write'), name: 'compareRevisions' })) as ComparedPage | null;
  if (found === null) throw notFound('revision');
  return found;
}

export function settingsThatDiffer({ before, after }: ComparedTwo): SettingDifference[] {
  return before.settings && after.settings ? compareSettings(before.settings, after.settings) : [];
}

/** The changes chosen on screen that lead to one of the two and not to the other, oldest first. */
export async function recordedBetween({ before, after, all }: ComparedTwo): Promise<RecordedChange[]> {
  const [earlier, later] = [lineOf(before, all), lineOf(after, all)];
  const own = all.filter((one) => earlier.has(one.letter) !== later.has(one.letter));
  const found = await Promise.all(
    own.map(async ({ office, id, letter }) => (await listChanges(db(), office, id)).map((one) => ({ ...one, letter }))),
  );
  return found.flat().map(({ letter, what, from, to, reason, person, at }) => ({ letter, what, from, to, reason, person, at }));
}

/** A revision and those it was made from, one after the other. */
function lineOf(revision: RevisionRecord, all: readonly RevisionRecord[]): Set<string> {
  const line = new Set<string>();
  for (let at: RevisionRecord | undefined = revision; at;) {
    line.add(at.letter);
    const from: string | null = at.madeFrom;
    at = from === null ? undefined : all.find((one) => one.letter === from);
  }
  return line;
}
