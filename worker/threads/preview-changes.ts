/** In a thread: what changes of section would do to a revision, from its rows; nothing is stored. */
import { listOwnThings } from '@/db/queries/own-parts';
import { applyChanges } from '@/lib/changes/apply-changes';
import type { Change } from '@/lib/changes/change';
import { ChangeRefused } from '@/lib/changes/change-refused';
import { previewSection, type SectionPreview } from '@/lib/changes/section-preview';
import { officeSets, storedInput } from './make-changed';
import { openOnce } from './open-once';

export interface PreviewTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  readonly changes: readonly Change[];
  /** Who would make them. */
  readonly by: string;
}

/** By change: what it does to the rows as the changes before it leave them; null for other kinds. */
export type PreviewAnswer =
  { readonly previews: readonly (SectionPreview | null)[] } | { readonly refused: string; readonly field?: string };

export async function previewChanges({ file, office, revision, changes, by }: PreviewTask): Promise<PreviewAnswer> {
  const database = openOnce(file);
  const sets = await officeSets(database.db, office, changes);
  const own = await listOwnThings(database.db, office);
  let input = await storedInput(database, office, revision);
  const previews: (SectionPreview | null)[] = [];
  for (const change of changes) {
    if (change.kind !== 'section') {
      try {
        input = applyChanges(input, [change], by, sets, own);
      } catch (error) {
        if (error instanceof ChangeRefused) return { refused: `${error.message}.`, field: 'combinations' };
        throw error;
      }
      previews.push(null);
      continue;
    }
    const previewed = previewSection(input, change, by, own);
    if ('refused' in previewed) return previewed;
    input = previewed.input;
    previews.push(previewed.preview);
  }
  return { previews };
}
