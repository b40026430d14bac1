import type { ReportRow } from '@/lib/reports/workbook/report-sheet';
import type { FrameNeed, ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';

/**
 * A sheet's rows, frame by frame. Where the frames are at hand the rows are too: a promise for each of 100,000 rows
 * would cost more than making it.
 */
export function rowsOfFrames(
  source: ReportSource,
  need: FrameNeed,
  rowsOf: (each: ReportFrame) => Iterable<ReportRow>,
): Iterable<ReportRow> | AsyncIterable<ReportRow> {
  const frames = source.frames(need);
  return Symbol.asyncIterator in frames ? later(frames, rowsOf) : atHand(frames, rowsOf);
}

function* atHand(frames: Iterable<ReportFrame>, rowsOf: (each: ReportFrame) => Iterable<ReportRow>): Iterable<ReportRow> {
  for (const each of frames) yield* rowsOf(each);
}

async function* later(
  frames: AsyncIterable<ReportFrame>,
  rowsOf: (each: ReportFrame) => Iterable<ReportRow>,
): AsyncIterable<ReportRow> {
  for await (const each of frames) yield* rowsOf(each);
}
