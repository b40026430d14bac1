/** In a thread: the differences between two revisions as a workbook, streamed to whoever asked. */
import type { MessagePort } from 'node:worker_threads';
import { compareSheets, type CompareSource } from '@/lib/reports/compare-workbook/compare-sheets';
import { writeXlsx } from '@/lib/reports/workbook/write-xlsx';
import { compareTotals } from '@/lib/results/compare-totals';
import { comparedOf } from './compared';
import { openOnce } from './open-once';
import { PortSink } from './port-sink';

export interface WriteCompareTask extends Omit<CompareSource, 'totals' | 'causes' | 'inputs' | 'frames' | 'members' | 'reactions' | 'before' | 'after'> {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly before: CompareSource['before'] & { readonly revision: number };
  readonly after: CompareSource['after'] & { readonly revision: number };
  readonly port: MessagePort;
} // prettier-ignore

/** @throws {RangeError} where the revisions are not the office's, or not of one batch */
export async function writeCompare({ file, office, port, ...task }: WriteCompareTask): Promise<void> {
  const compared = comparedOf(openOnce(file), office, task.before.revision, task.after.revision);
  if (!compared) throw new RangeError(`Expected revisions of one batch of office ${office}`);
  const sink = new PortSink(port);
  const sent = new Promise<void>((resolve, reject) => sink.on('finish', resolve).on('error', reject));
  const sheets = compareSheets({
    ...task,
    totals: compareTotals(compared.frames, task.by),
    causes: await compared.causes(),
    inputs: await compared.inputs(),
    frames: compared.frames,
    members: compared.members(),
    reactions: compared.reactions(),
  });
  await writeXlsx(sheets, sink);
  if (!sink.writableEnded) sink.end();
  await sent;
}
