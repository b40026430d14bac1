/** In a thread: what changes of section would do to a revision, from its rows; nothing is stored. */
import { applyChanges } from '@/lib/changes/apply-changes';
import type { Change } from '@/lib/changes/change';
import { previewSection, type SectionPreview } from '@/lib/changes/section-preview';
import { storedInput } from './make-changed';
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
export type PreviewAnswer = { readonly previews: readonly (SectionPreview | null)[] } | { readonly refused: string };

export async function previewChanges({ file, office, revision, changes, by }: PreviewTask): Promise<PreviewAnswer> {
  let input = await storedInput(openOnce(file), office, revision);
  const previews: (SectionPreview | null)[] = [];
  for (const change of changes) {
    if (change.kind !== 'section') {
      input = applyChanges(input, [change], by);
      previews.push(null);
      continue;
    }
    const previewed = previewSection(input, change, by);
    if ('refused' in previewed) return previewed;
    input = previewed.input;
    previews.push(previewed.preview);
  }
  return { previews };
}
