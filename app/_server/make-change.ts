import 'server-only';
import type { z } from 'zod';
import { db } from '@/db/client';
import { listCombinations } from '@/db/queries/combinations';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { ApiError, notFound } from '@/lib/api/error';
import type { changesInput } from '@/lib/api/inputs';
import type { Change } from '@/lib/changes/change';
import { changeWords, sectionChangeWords, type ChangeWords } from '@/lib/changes/change-words';
import { mostRowsWritten } from '@/lib/changes/list-combinations';
import type { SectionPreview } from '@/lib/changes/section-preview';
import { settingText } from '@/lib/changes/setting-text';
import { readSetting, saysTheSame } from '@/lib/changes/setting-value';
import { settingWords, type Settings } from '@/lib/model/settings';
import { previewChanges } from './preview-changes';
import { askForChange } from '@/worker/ask';
import { queue, serverDatabase } from '@/worker/boot';

/**
 * Makes the next revision of a batch from one that was read, whatever became of that since: it stays as it is.
 *
 * @returns the new revision's letter; it is in state "reading" until its rows are read
 * @throws {ApiError} bad-request naming the settings that are refused or stand so already; conflict where nothing was read
 */
export async function makeChange(
  person: Person,
  revision: RevisionRecord,
  { changes, reason, run }: z.output<typeof changesInput>,
): Promise<string> {
  const settings = requireRead(revision);
  refuse(changes, settings);
  await refuseUnknown(changes, revision);
  const previews = await previewsOf(person, revision, changes);
  const made = await askForChange(queue(), serverDatabase(), person.office, {
    from: revision.id,
    person: person.id,
    changes: changes.map((change) => ({ change, ...wordsOf(change, settings, previews) })),
    reason,
    run,
  });
  if (made === undefined) throw notFound('revision');
  return made.letter;
}

/** @throws {ApiError} conflict where a revision is still being read, or nothing of it could be */
export function requireRead({ state, settings, input, frames }: RevisionRecord): Settings {
  if (state === 'reading') throw new ApiError('conflict', 'The sheets are still being read. Ask again in a moment.');
  if (settings === null || input === null || frames === 0) {
    throw new ApiError('conflict', 'No frame of this revision could be read. Mend its sheets and bring them in again.');
  }
  return settings;
}

function refuse(changes: readonly Change[], settings: Settings): void {
  const fields: Record<string, string[]> = {};
  for (const change of changes) {
    if (change.kind === 'section') continue;
    if (change.kind === 'list combinations') {
      if (settings.combinationSet === null)
        fields['combinations'] = ['No combination set is chosen, so nothing is generated. All combinations are listed already.'];
      continue;
    }
    const { setting, value } = change;
    const { refused } = readSetting(setting, value);
    const already = `${settingWords[setting]} is ${settingText(setting, settings) ?? value} already. Choose another value, or leave it out.`;
    const sentence = refused ?? (saysTheSame(settings, setting, value) ? already : null);
    if (sentence !== null) fields[setting] = [sentence];
  }
  const [first] = Object.values(fields);
  if (first) throw new ApiError('bad-request', first[0] ?? '', { fields });
}

type Previews = ReadonlyMap<Change, SectionPreview>;

/** What each change of section would do, read in a thread. @throws {ApiError} bad-request where one cannot be done */
async function previewsOf(person: Person, revision: RevisionRecord, changes: readonly Change[]): Promise<Previews> {
  if (!changes.some(({ kind }) => kind === 'section')) return new Map();
  const previews = await previewChanges(person, revision, changes);
  return new Map(changes.flatMap((change, i): [Change, SectionPreview][] => (previews[i] ? [[change, previews[i]]] : [])));
}

function wordsOf(change: Change, settings: Settings, previews: Previews): ChangeWords {
  if (change.kind !== 'section') return changeWords(change, settings);
  const preview = previews.get(change);
  if (!preview) throw new RangeError('Expected a preview of each change of section');
  return sectionChangeWords(change, preview);
}

/** Names that are no generated combination of the revision: they may be of an earlier look at it. */
async function refuseUnknown(changes: readonly Change[], revision: RevisionRecord): Promise<void> {
  for (const change of changes) {
    if (change.kind !== 'list combinations') continue;
    const { list } = await listCombinations(db(), revision.office, revision.id, mostRowsWritten);
    const names = new Set(list.flatMap(({ name, clause }) => (clause === null ? [] : [name])));
    const asked = [...change.leaveOut, ...change.factors.map(({ combination }) => combination)];
    const unknown = asked.find((name) => !names.has(name));
    const sentence =
      unknown !== undefined
        ? `${unknown} is no generated combination of this revision. Open it again.`
        : names.size === 0
          ? 'Nothing is generated in this revision.'
          : list.reduce((sum, { frames }) => sum + frames, 0) > mostRowsWritten &&
              list.some(({ frames }) => frames !== revision.frames - revision.framesStopped)
            ? 'Too many rows would be written. List the combinations in the sheets.'
            : null;
    if (sentence !== null) throw new ApiError('bad-request', sentence, { fields: { combinations: [sentence] } });
  }
}
