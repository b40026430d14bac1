/** In a thread: the calculation report of a revision as a draft, streamed to whoever asked. */
import type { MessagePort } from 'node:worker_threads';
import type { OpenDatabase } from '@/db/open';
import { findIssueBasis } from '@/db/queries/issue-basis';
import type { IssueCover } from '@/lib/reports/issue-cover';
import type { ReportChoice } from '@/lib/reports/report-choice';
import { writeReport } from '@/lib/reports/pdf/write-report';
import { openOnce } from './open-once';
import { PortSink } from './port-sink';
import { reportFonts } from './report-fonts';
import { revisionSource } from './revision-source';

export interface WriteReportTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  readonly frames: ReportChoice;
  readonly port: MessagePort;
}

/** Each page says that it is a draft, whatever was issued of the revision: what is issued was made once and is kept. */
export async function writeDraftReport({ file, office, revision, frames, port }: WriteReportTask): Promise<void> {
  const database = openOnce(file);
  const source = await revisionSource(database, office, revision);
  const cover = await draftCover(database, office, revision);
  await writeReport({ source, cover, frames, fonts: reportFonts() }, new PortSink(port));
}

async function draftCover({ db }: OpenDatabase, office: number, revision: number): Promise<IssueCover> {
  const basis = await findIssueBasis(db, office, revision);
  if (!basis) throw new RangeError(`Expected revision ${revision} to be of office ${office}`);
  const { projectName, projectNumber, batchName, letter } = basis.revision;
  return {
    number: null,
    office: basis.office,
    project: projectName,
    projectNumber,
    batch: batchName,
    revision: letter,
    prepared: basis.prepared,
    checked: basis.checked,
    approved: null,
    issued: null,
    supersedes: null,
    note: null,
    acceptances: basis.acceptances,
    notIssued: basis.notIssued,
  };
}
