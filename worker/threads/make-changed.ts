/** A revision made from an earlier one by changes: its rows, its input workbook, and what they say. */
import type { OpenDatabase } from '@/db/open';
import { listChanges, type Making } from '@/db/queries/changes';
import { findSetVersion } from '@/db/queries/combination-sets';
import { listOfficeLimits } from '@/db/queries/office-limits';
import { listOwnThings } from '@/db/queries/own-parts';
import { listProblems, listSheets } from '@/db/queries/problems';
import { deleteUploads, insertUpload, listUploadedFiles } from '@/db/queries/uploads';
import { inputRows } from '@/db/queries/waiting';
import { applyChanges, setKey } from '@/lib/changes/apply-changes';
import type { Change } from '@/lib/changes/change';
import type { OfficeSet } from '@/lib/combinations/office-set';
import { identityOf } from '@/lib/intake/files/identity';
import { readFiles } from '@/lib/intake/files/read-files';
import type { Intake } from '@/lib/intake/intake';
import { canBeReadAgain, inputRows as rowsOf, type StoredInput } from '@/lib/intake/rows/input-rows';
import { isOfFile, readRows } from '@/lib/intake/rows/read-rows';
import { inputWorkbook } from '@/lib/reports/input-workbook/input-workbook';

/**
 * Reads the earlier revision's rows with the changes made to them. The workbook written from them is kept as the revision's
 * upload: by its SHA-256 the input is known, and uploaded anew it gives the same frames.
 */
export async function makeChanged({ db, raw }: OpenDatabase, office: number, revision: number, making: Making): Promise<Intake> {
  const [changes, problems] = await Promise.all([listChanges(db, office, revision), listProblems(db, office, making.from)]);
  const before = await storedInput({ db, raw }, office, making.from);
  const own = await listOwnThings(db, office);
  const asked = changes.map(({ change }) => change);
  const after = applyChanges(before, asked, making.personName, await officeSets(db, office, asked), own);
  const unnamed = { name: '', sha256: '', files: [] };
  const read = readRows(
    { ...after, identity: unnamed, problems: problems.filter(isOfFile) },
    { officeLimits: await listOfficeLimits(db, office), own },
  );
  const file = inputWorkbook(read, `${making.batch} ${making.letter}`);
  const identity = identityOf([file]);
  const [{ sha256, size } = { sha256: '', size: 0 }] = identity.files;
  await deleteUploads(db, office, revision);
  await insertUpload(db, office, { revision, ...file, sha256, size, person: making.person });
  return { ...read, input: identity };
}

/** A revision's input as it is kept; of one that an earlier version kept without its sheets, its files are read again. */
export async function storedInput(
  { db, raw }: Pick<OpenDatabase, 'db' | 'raw'>,
  office: number,
  revision: number,
): Promise<StoredInput> {
  const rows = [...inputRows(raw, revision)];
  if (canBeReadAgain(rows)) return { sheets: await listSheets(db, office, revision), rows };
  const { sheets } = await readFiles(await listUploadedFiles(db, office, revision));
  const parts = sheets.flatMap((sheet) => sheet.parts).sort((a, b) => a.order - b.order);
  return { sheets: parts, rows: rowsOf(sheets) };
}

/** The versions of the office's combination sets that changes name. */
export async function officeSets(
  db: OpenDatabase['db'],
  office: number,
  changes: readonly Change[],
): Promise<Map<string, OfficeSet>> {
  const sets = new Map<string, OfficeSet>();
  for (const change of changes) {
    if (change.kind !== 'office combinations') continue;
    const found = await findSetVersion(db, office, change.set, change.version);
    if (found) sets.set(setKey(change), found);
  }
  return sets;
}
