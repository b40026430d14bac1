/** In a thread: the files of an issue, each made once and kept in pieces with its SHA-256. */
import { Readable, type Writable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { OpenDatabase } from '@/db/open';
import { dropUnfinished, insertIssueFile, insertIssuePiece, issueFilesMade } from '@/db/queries/issue-files';
import { findIssue, type IssueRecord } from '@/db/queries/issues';
import { updateJobProgress } from '@/db/queries/jobs';
import { issueFileKinds, issueFileName, type IssueFileKind } from '@/lib/issuing/issue-file';
import { writeReport } from '@/lib/reports/pdf/write-report';
import { openOnce } from './open-once';
import { PieceSink } from './piece-sink';
import { reportFonts } from './report-fonts';
import { revisionSource } from './revision-source';
import { writeResultWorkbook } from './write-files';
import { writeInput } from './write-input';

export interface MakeIssueTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly issue: number;
  /** Whose progress it is, in files. */
  readonly job: number;
}

/** What a file's making found out about it. */
interface Made {
  readonly ending: string;
  readonly pages: number | null;
}

/**
 * Makes the files that are not whole yet. A thread that was killed leaves pieces of one file; they are taken away and that file
 * is made anew.
 *
 * @throws {RangeError} where there is no such issue in the making
 */
export async function makeIssue({ file, office, issue, job }: MakeIssueTask): Promise<void> {
  const database = openOnce(file);
  const found = await findIssue(database.db, office, issue);
  if (found?.state !== 'making') throw new RangeError(`Expected issue ${issue} of office ${office} to be in the making`);
  const made = issueFilesMade(database.raw, issue);
  for (const [index, kind] of issueFileKinds.entries()) {
    await updateJobProgress(database.db, job, { done: index, total: issueFileKinds.length });
    if (!made.has(kind)) await makeFile(database, file, found, kind);
  }
  await updateJobProgress(database.db, job, { done: issueFileKinds.length, total: issueFileKinds.length });
}

async function makeFile(database: OpenDatabase, file: string, issue: IssueRecord, kind: IssueFileKind): Promise<void> {
  const { raw } = database;
  dropUnfinished(raw, issue.id, kind);
  const sink = new PieceSink((ordinal, bytes) => insertIssuePiece(raw, { issue: issue.id, kind, ordinal, bytes }));
  const kept = new Promise<void>((resolve, reject) => sink.on('finish', resolve).on('error', reject));
  const [{ ending, pages }] = await Promise.all([write[kind](database, file, issue, sink), kept]);
  const { size, sha256 } = sink;
  insertIssueFile(raw, issue.id, { kind, name: issueFileName(issue.number, kind, ending), size, sha256, pages });
}

const write: Readonly<
  Record<IssueFileKind, (database: OpenDatabase, file: string, issue: IssueRecord, sink: Writable) => Promise<Made>>
> = {
  async report(database, _file, issue, sink) {
    const { pages } = await writeReport(
      { source: await issueSource(database, issue), cover: issue.cover, frames: issue.reportFrames, fonts: reportFonts() },
      sink,
    );
    return { ending: 'pdf', pages };
  },
  async workbook(database, _file, issue, sink) {
    await writeResultWorkbook(await issueSource(database, issue), sink);
    if (!sink.writableEnded) sink.end();
    return { ending: 'xlsx', pages: null };
  },
  async input(_database, file, { office, revision }, sink) {
    const { name, bytes } = await writeInput({ file, office, revision: revision.id });
    await pipeline(Readable.from([bytes]), sink);
    return { ending: name.split('.').at(-1) ?? 'xlsx', pages: null };
  },
};

/** The revision as it will be once it is handed over, with who signs it. */
async function issueSource(database: OpenDatabase, { office, revision, cover }: IssueRecord) {
  const source = await revisionSource(database, office, revision.id);
  return { ...source, issue: cover, title: { ...source.title, state: 'issued' } };
}
