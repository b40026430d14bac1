import { instant } from '@/db/clock';
import type { Db, RawDatabase } from '@/db/open';
import { statement } from '@/db/statements';
import type { IssueFileKind } from '@/lib/issuing/issue-file';

export interface IssueFileRecord {
  readonly id: number;
  readonly kind: IssueFileKind;
  readonly name: string;
  readonly size: number;
  readonly sha256: string;
  /** Of a report; null for what has none. */
  readonly pages: number | null;
}

const order: readonly IssueFileKind[] = ['report', 'workbook', 'input'];

/** The whole files of an issue, as a client takes them: report, workbook, input. */
export async function listIssueFiles(db: Db, office: number, issue: number): Promise<IssueFileRecord[]> {
  const rows = await db
    .selectFrom('issue_file')
    .innerJoin('issue', 'issue.id', 'issue_file.issue')
    .select(['issue_file.id', 'kind', 'name', 'size', 'sha256', 'pages'])
    .where('issue.office', '=', office)
    .where('issue.id', '=', issue)
    .execute();
  return rows.sort((a, b) => order.indexOf(a.kind) - order.indexOf(b.kind));
}

/** A file's bytes, piece by piece. The caller has found the file through `listIssueFiles`. */
export function* issueFilePieces(raw: RawDatabase, issue: number, kind: IssueFileKind): Generator<Buffer> {
  const piece = statement<{ bytes: Buffer }>(raw, 'select bytes from issue_piece where issue = ? and kind = ? and ordinal = ?');
  for (let ordinal = 0; ; ordinal++) {
    const row = piece.get(issue, kind, ordinal);
    if (!row) return;
    yield row.bytes;
  }
}

/** Kinds that stand whole already: they are not made again. */
export function issueFilesMade(raw: RawDatabase, issue: number): Set<IssueFileKind> {
  const rows = statement<{ kind: IssueFileKind }>(raw, 'select kind from issue_file where issue = ?').all(issue);
  return new Set(rows.map(({ kind }) => kind));
}

/** Takes away the pieces of a file that a thread had not finished. @throws {RangeError} for a file that is whole */
export function dropUnfinished(raw: RawDatabase, issue: number, kind: IssueFileKind): void {
  if (issueFilesMade(raw, issue).has(kind)) throw new RangeError(`Expected no ${kind} of issue ${issue} yet`);
  const some = raw.prepare(
    'delete from issue_piece where id in (select id from issue_piece where issue = ? and kind = ? limit 16)',
  );
  // a few at a time: the writer is not held for the length of a large file
  while (some.run(issue, kind).changes > 0);
}

export function insertIssuePiece(
  raw: RawDatabase,
  piece: { readonly issue: number; readonly kind: IssueFileKind; readonly ordinal: number; readonly bytes: Buffer },
): void {
  raw
    .prepare('insert into issue_piece (issue, kind, ordinal, bytes) values (?, ?, ?, ?)')
    .run(piece.issue, piece.kind, piece.ordinal, piece.bytes);
}

/** Says that a file is whole; from here on it is never made again. */
export function insertIssueFile(raw: RawDatabase, issue: number, file: Omit<IssueFileRecord, 'id'>): void {
  raw
    .prepare('insert into issue_file (issue, kind, name, size, sha256, pages, made_at) values (?, ?, ?, ?, ?, ?, ?)')
    .run(issue, file.kind, file.name, file.size, file.sha256, file.pages, instant());
}

/** Bytes made so far, whole files or not: for the page that waits. */
export function bytesMade(raw: RawDatabase, issue: number): number {
  return (
    statement<{ n: number | null }>(raw, 'select sum(length(bytes)) as n from issue_piece where issue = ?').get(issue)?.n ?? 0
  );
}

export interface DownloadRecord {
  readonly person: number;
  readonly name: string;
  readonly role: string | null;
  readonly file: IssueFileKind;
  readonly at: string;
}

/** Records that a person takes a file; to be called before its first byte is sent. */
export async function insertDownload(
  db: Db,
  office: number,
  download: { readonly issue: number; readonly file: number; readonly person: number },
): Promise<void> {
  await db
    .insertInto('download')
    .values({ office, ...download, at: instant() })
    .execute();
}

/** The newest first. */
export async function listDownloads(
  db: Db,
  office: number,
  issue: number,
  of: { readonly person?: number; readonly limit?: number } = {},
): Promise<DownloadRecord[]> {
  let query = db
    .selectFrom('download')
    .innerJoin('issue_file', 'issue_file.id', 'download.file')
    .innerJoin('person', 'person.id', 'download.person')
    .leftJoin('membership', (join) =>
      join.onRef('membership.person', '=', 'download.person').onRef('membership.office', '=', 'download.office'),
    )
    .select(['download.person', 'person.name', 'membership.role', 'issue_file.kind as file', 'download.at'])
    .where('download.office', '=', office)
    .where('download.issue', '=', issue);
  if (of.person !== undefined) query = query.where('download.person', '=', of.person);
  return query
    .orderBy('download.id', 'desc')
    .limit(of.limit ?? 500)
    .execute();
}

/** Acknowledges receipt, once. @returns false where it was acknowledged before */
export async function insertReceipt(db: Db, issue: number, person: number): Promise<boolean> {
  const result = await db
    .insertInto('receipt')
    .values({ issue, person, at: instant() })
    .onConflict((conflict) => conflict.doNothing())
    .executeTakeFirst();
  return Number(result.numInsertedOrUpdatedRows ?? 0) === 1;
}

export async function findReceipt(db: Db, issue: number, person: number): Promise<string | null> {
  const row = await db
    .selectFrom('receipt')
    .select('at')
    .where('issue', '=', issue)
    .where('person', '=', person)
    .executeTakeFirst();
  return row?.at ?? null;
}
