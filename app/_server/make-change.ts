import 'server-only';
import type { z } from 'zod';
import { db } from '@/db/client';
import { findSetVersion, type SetVersion } from '@/db/queries/combination-sets';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { ApiError, notFound } from '@/lib/api/error';
import type { changesInput } from '@/lib/api/inputs';
import type { Change } from '@/lib/changes/change';
import { changeWords, officeCombinationsWords, sectionChangeWords, type ChangeWords } from '@/lib/changes/change-words';
import type { SectionPreview } from '@/lib/changes/section-preview';
import { settingText } from '@/lib/changes/setting-text';
import { readSetting, saysTheSame } from '@/lib/changes/setting-value';
import { settingWords, type Settings } from '@/lib/model/settings';
import { ownVersions } from './own-versions';
import { previewChanges } from './preview-changes';
import { askForChange } from '@/worker/ask';
import { queue, serverDatabase } from '@/worker/boot';

/**
 * Makes the next revision of a batch from one that was read, whatever became of that since: it stays as it is.
 *
 * @param known what each change of section does, where that was looked at already
 * @returns the new revision's letter; it is in state "reading" until its rows are read
 * @throws {ApiError} bad-request naming the settings that are refused or stand so already; conflict where nothing was read
 */
export async function makeChange(
  person: Person,
  revision: RevisionRecord,
  { changes, reason, run }: z.output<typeof changesInput>,
  known?: ReadonlyMap<Change, SectionPreview>,
): Promise<string> {
  const settings = requireRead(revision);
  refuse(changes, settings);
  const sets = await setsOf(person, changes);
  const versions = await ownVersions(person, revision, changes);
  const previews = known ?? (await previewsOf(person, revision, changes));
  const made = await askForChange(queue(), serverDatabase(), person.office, {
    from: revision.id,
    person: person.id,
    changes: changes.map((change) => ({ change, ...(versions.get(change) ?? wordsOf(change, settings, previews, sets)) })),
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
    if (change.kind === 'section' || change.kind === 'office combinations' || change.kind === 'own version') continue;
    if (change.kind === 'list combinations') {
      const { leaveOut, factors, add } = change;
      const edits = leaveOut.length + factors.length + (add ?? []).length;
      if (edits === 0 && (settings.combinationSet === null || change.generated === 'keep'))
        fields['combinations'] = ['All combinations are listed already. Add one, change one or leave one out.'];
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

/** What each change of section would do, and whether rows can take the others. @throws {ApiError} bad-request where one cannot be done */
async function previewsOf(person: Person, revision: RevisionRecord, changes: readonly Change[]): Promise<Previews> {
  if (changes.every(({ kind }) => kind === 'setting')) return new Map();
  const previews = await previewChanges(person, revision, changes);
  return new Map(changes.flatMap((change, i): [Change, SectionPreview][] => (previews[i] ? [[change, previews[i]]] : [])));
}

type Sets = ReadonlyMap<Change, SetVersion>;

/** The office's sets that changes name. @throws {ApiError} bad-request where there is none, or it is not offered */
async function setsOf(person: Person, changes: readonly Change[]): Promise<Sets> {
  const sets = new Map<Change, SetVersion>();
  for (const change of changes) {
    if (change.kind !== 'office combinations') continue;
    const found = await findSetVersion(db(), person.office, change.set, change.version);
    if (found === undefined || found.withdrawnAt !== null) {
      const sentence = 'The office has no such combination set in use. Choose another.';
      throw new ApiError('bad-request', sentence, { fields: { set: [sentence] } });
    }
    sets.set(change, found);
  }
  return sets;
}

function wordsOf(change: Change, settings: Settings, previews: Previews, sets: Sets): ChangeWords {
  if (change.kind === 'office combinations') return officeCombinationsWords(change, sets.get(change)?.name ?? '', settings);
  if (change.kind === 'own version') throw new RangeError('Expected the versions of what is taken anew');
  if (change.kind !== 'section') return changeWords(change, settings);
  const preview = previews.get(change);
  if (!preview) throw new RangeError('Expected a preview of each change of section');
  return sectionChangeWords(change, preview);
}
