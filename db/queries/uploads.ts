import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { InputFile } from '@/lib/intake/intake';

export interface UploadRecord {
  readonly name: string;
  readonly size: number;
  readonly sha256: string;
}

/** Keeps a file as sent; the revision's files stand in the order they were inserted. The revision must be the office's. */
export async function insertUpload(
  db: Db,
  office: number,
  upload: UploadRecord & { readonly revision: number; readonly bytes: Uint8Array; readonly person: number },
): Promise<void> {
  const { revision, name, size, sha256, bytes, person } = upload;
  const { changes } = await db
    .insertInto('upload')
    .columns(['office', 'revision', 'ordinal', 'name', 'size', 'sha256', 'bytes', 'created_by', 'created_at'])
    .expression((eb) =>
      eb
        .selectFrom('revision')
        .select((one) => [
          'revision.office',
          'revision.id',
          one
            .selectFrom('upload')
            .select((last) => last.fn.countAll<number>().as('n'))
            .where('upload.revision', '=', revision)
            .as('ordinal'),
          one.val(name).as('name'),
          one.val(size).as('size'),
          one.val(sha256).as('sha256'),
          one.val(Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength)).as('bytes'),
          one.val(person).as('created_by'),
          one.val(instant()).as('created_at'),
        ])
        .where('revision.id', '=', revision)
        .where('revision.office', '=', office),
    )
    .executeTakeFirst()
    .then((result) => ({ changes: Number(result.numInsertedOrUpdatedRows ?? 0) }));
  if (changes !== 1) throw new RangeError(`Expected revision ${revision} to be of office ${office}`);
}

/** Takes away what a reading that was cut short had kept of a revision that is made by changes. */
export async function deleteUploads(db: Db, office: number, revision: number): Promise<void> {
  await db.deleteFrom('upload').where('office', '=', office).where('revision', '=', revision).execute();
}

export async function listUploads(db: Db, office: number, revision: number): Promise<UploadRecord[]> {
  return db
    .selectFrom('upload')
    .select(['name', 'size', 'sha256'])
    .where('office', '=', office)
    .where('revision', '=', revision)
    .orderBy('ordinal')
    .execute();
}

/** The files as sent, with their bytes. */
export async function listUploadedFiles(db: Db, office: number, revision: number): Promise<InputFile[]> {
  return db
    .selectFrom('upload')
    .select(['name', 'bytes'])
    .where('office', '=', office)
    .where('revision', '=', revision)
    .orderBy('ordinal')
    .execute();
}
