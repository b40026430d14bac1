/** In a thread: exactly one view of a table, streamed to whoever asked. */
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { MessagePort } from 'node:worker_threads';
import { iterateRows } from '@/db/queries/lists';
import { viewSheet } from '@/lib/api/view-sheet';
import { csvOf } from '@/lib/reports/workbook/write-csv';
import { writeXlsx } from '@/lib/reports/workbook/write-xlsx';
import type { ParameterColumn } from '@/lib/tables/shown-columns';
import type { View } from '@/lib/tables/view';
import type { System } from '@/lib/units/quantity';
import { openOnce } from './open-once';
import { PortSink } from './port-sink';

export interface WriteTableTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  readonly view: View;
  readonly units: System;
  readonly nearLimit: number;
  readonly parameters: readonly ParameterColumn[];
  readonly as: 'csv' | 'xlsx';
  readonly port: MessagePort;
}

/** Writes the view's rows, columns and order, in the batch's units. */
export async function writeTable({ file, office, revision, as, port, ...shown }: WriteTableTask): Promise<void> {
  const { db } = openOnce(file);
  const { view } = shown;
  const sheet = viewSheet({ ...shown, rows: () => iterateRows(db, office, revision, view) });
  const sink = new PortSink(port);
  const sent = new Promise<void>((resolve, reject) => sink.on('finish', resolve).on('error', reject));
  if (as === 'csv') await pipeline(Readable.from(csvOf(sheet)), sink);
  else {
    await writeXlsx([sheet], sink);
    if (!sink.writableEnded) sink.end();
  }
  await sent;
}
