import { PassThrough } from 'node:stream';
import { door } from '@/app/_server/door';
import { attachment, bodyOf } from '@/app/_server/download';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { listOwnParts } from '@/db/queries/own-parts';
import { ApiError } from '@/lib/api/error';
import { columnsOfLibrary } from '@/lib/library/columns-of-library';
import { librarySheet } from '@/lib/library/library-sheet';
import { type LibraryView, libraryRows, libraryViewFrom } from '@/lib/library/library-view';
import { csvOf } from '@/lib/reports/workbook/write-csv';
import { writeXlsx } from '@/lib/reports/workbook/write-xlsx';
import { ranges } from '@/lib/sections/library';

const formats = ['json', 'csv', 'xlsx'];

/** The library's sections of a view, in its order: as JSON in SI, or with `format=csv` or `xlsx` as a file in the view's units. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read sections');
  const params = new URL(request.url).searchParams;
  const { view, wrong } = libraryViewFrom(params);
  const format = params.get('format') ?? 'json';
  const fields: Record<string, string[]> = Object.fromEntries(Object.entries(wrong).map(([key, says]) => [key, [says]]));
  if (!formats.includes(format)) fields['format'] = ['Choose the format: json, csv or xlsx.'];
  const first = Object.values(fields)[0]?.[0];
  if (first !== undefined) throw new ApiError('bad-request', first, { fields });
  const { rows, note, suggestion } = libraryRows(view);
  if (format === 'json') {
    const sections = rows.map(({ range, section }) => ({
      designation: section.designation,
      range,
      standard: ranges[range].standard,
      shape: section.shape,
      made: section.made,
      properties: Object.fromEntries(columnsOfLibrary.map(({ key, value }) => [key, value(section)])),
      source: 'derived',
    }));
    return Response.json({ own: await ownFitting(person.office, view), sections, note, suggestion });
  }
  const sheet = librarySheet(rows, view.units);
  const name = `Tallyframe sections${view.range === null ? '' : ` ${view.range}`}.${format}`;
  if (format === 'csv') return attachment(name, bodyOf(csvOf(sheet)));
  const sink = new PassThrough();
  writeXlsx([sheet], sink).then(
    () => (sink.writableEnded ? undefined : sink.end()),
    (error: unknown) => sink.destroy(error instanceof Error ? error : new Error('The workbook could not be written')),
  );
  return attachment(name, bodyOf(sink));
});

/** The office's own sections whose names hold what is searched for; none where a range is chosen. */
async function ownFitting(office: number, { search, range }: LibraryView) {
  if (range !== null) return [];
  const key = (text: string): string => text.toLowerCase().replace(/\s+/g, '');
  const parts = await listOwnParts(db(), office, 'section');
  return parts
    .filter(({ retiredAt, name }) => retiredAt === null && key(name).includes(key(search)))
    .flatMap(({ name, version, section }) => {
      if (!section) return [];
      const properties = Object.fromEntries(columnsOfLibrary.map(({ key: column, value }) => [column, value(section)]));
      return [
        {
          designation: name,
          range: null,
          standard: `office v${version}`,
          shape: section.shape,
          made: null,
          properties,
          source: 'office',
        },
      ];
    });
}
