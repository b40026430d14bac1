/** In a thread: the result files of a revision, streamed to whoever asked. */
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { MessagePort } from 'node:worker_threads';
import { resultsJson } from '@/lib/results/json';
import { openOnce } from './open-once';
import { PortSink } from './port-sink';
import { revisionSource } from './revision-source';
import { writeResultCsvZip, writeResultWorkbook } from './write-files';

export { compareRevisions } from './compare-revisions';
export { drawBuckled } from './draw-buckled';
export { listGroups } from './list-groups';
export { makeIssue } from './make-issue';
export { retestIssue } from './retest-issue';
export { takeSections } from './take-sections';
export { writeCompare } from './write-compare';
export { writeInput } from './write-input';
export { writeMarkedCopy } from './write-marked-copy';
export { writeDraftReport } from './write-report';
export { writeTable } from './write-table';

export type ResultFile = 'xlsx' | 'json' | 'csv';

export interface WriteTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  readonly as: ResultFile;
  readonly port: MessagePort;
}

/** Writes one result file; csv is a zip of one file a sheet. */
export async function writeResult({ file, office, revision, as, port }: WriteTask): Promise<void> {
  const source = await revisionSource(openOnce(file), office, revision);
  const sink = new PortSink(port);
  const sent = new Promise<void>((resolve, reject) => sink.on('finish', resolve).on('error', reject));
  if (as === 'json') await pipeline(Readable.from(resultsJson(source, { all: false })), sink);
  else {
    await (as === 'xlsx' ? writeResultWorkbook(source, sink) : writeResultCsvZip(source, sink));
    if (!sink.writableEnded) sink.end();
  }
  await sent;
}
