/** In a thread: what a Changes sheet would do to a revision; nothing is stored. */
import { listOwnThings } from '@/db/queries/own-parts';
import type { SectionChange } from '@/lib/changes/change';
import { readForChange } from '@/lib/changes/change-section';
import { readChangesSheet } from '@/lib/changes/changes-sheet';
import { previewSection, type SectionPreview } from '@/lib/changes/section-preview';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';
import { storedInput } from './make-changed';
import { openOnce } from './open-once';

export interface ChangesSheetTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  readonly files: readonly InputFile[];
  /** Who would make them. */
  readonly by: string;
}

export interface ChangesSheetAnswer {
  readonly rows: number;
  readonly problems: readonly Problem[];
  /** With what each does to the rows as those before it leave them; none where a cell is wrong. */
  readonly changes: readonly { readonly change: SectionChange; readonly preview: SectionPreview }[];
  /** Why they cannot be made though every cell is sound; null where they can. */
  readonly refused: string | null;
}

const deadline_s = 30;

export async function previewChangesSheet({ file, office, revision, files, by }: ChangesSheetTask): Promise<ChangesSheetAnswer> {
  const until = performance.now() + 1000 * deadline_s;
  const sent = await readFiles(files, { shouldStop: () => performance.now() > until, stopsAfter: `${deadline_s} s` });
  const database = openOnce(file);
  const own = await listOwnThings(database.db, office);
  let input = await storedInput(database, office, revision);
  let read = readForChange(input, own);
  const sheet = readChangesSheet(sent.sheets, read);
  const problems = [...sent.problems, ...(sheet?.problems ?? [])];
  const rows = sheet?.rows ?? 0;
  const nothing = { rows, problems, changes: [] };
  if (!sheet && problems.length === 0)
    return { ...nothing, refused: 'No sheet Changes is in these files. Name the sheet so, or send one sheet alone.' };
  if (!sheet || problems.some(({ severity }) => severity === 'error')) return { ...nothing, refused: null };
  if (sheet.changes.length === 0)
    return { ...nothing, refused: rows === 0 ? 'The sheet has no row.' : 'Every member has the section that the sheet gives it already.' }; // prettier-ignore
  const changes: { change: SectionChange; preview: SectionPreview }[] = [];
  for (const change of sheet.changes) {
    const previewed = previewSection(input, change, by, own, read);
    if ('refused' in previewed) return { ...nothing, refused: previewed.refused };
    ({ input, read } = previewed);
    changes.push({ change, preview: previewed.preview });
  }
  return { rows, problems, changes, refused: null };
}
