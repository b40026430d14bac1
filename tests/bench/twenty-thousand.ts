/** 20,000 portal sheds, the most a batch may hold: variants of the built-in family, no two of them alike. */
import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import ExcelJS from 'exceljs';
import { portalSheds } from '@/samples/portal-sheds';
import type { SampleCell } from '@/samples/write';

/** Sheds that a depot of the sample has. */
const perDepot = 20;

/** The sample's depots over and over, each a little wider, so that every frame is solved. */
export async function shedWorkbook(frames: number): Promise<Uint8Array> {
  const sink = new PassThrough();
  const bytes = buffer(sink);
  const book = new ExcelJS.stream.xlsx.WorkbookWriter({ stream: sink, useStyles: false, useSharedStrings: true });
  for (const { name, rows } of portalSheds(Math.ceil(frames / perDepot))) {
    if (name === 'Frames') continue;
    const page = book.addWorksheet(name);
    const span = rows[0]?.indexOf('span [m]') ?? -1;
    for (const [at, row] of rows.slice(0, name === 'Variants' ? frames + 1 : undefined).entries()) {
      const cells: SampleCell[] = [...row];
      if (name === 'Variants' && at > 0) {
        cells[0] = `S${at}`;
        // Depots repeat after sixty; a hundredth of a millimetre of span sets the same shed of later ones apart.
        cells[span] = Number((Number(cells[span]) + Math.floor((at - 1) / perDepot) * 1e-5).toFixed(6));
      }
      page.addRow(cells).commit();
    }
    page.commit();
  }
  await book.commit();
  return bytes;
}
