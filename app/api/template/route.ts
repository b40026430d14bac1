import { door } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { templateInput } from '@/lib/api/inputs';
import { writeTemplate } from '@/lib/reports/template/write-template';

/** The same bytes for everyone, so each is written once. */
const written = new Map<'metric' | 'us', Promise<Uint8Array>>();

/** An empty workbook with notes, example rows and drop-downs; `?units=us` for feet and kips. */
export const GET = door(async (request) => {
  await requirePerson(request, 'read projects');
  const { units } = parse(templateInput, queryOf(request));
  const bytes = written.get(units) ?? writeTemplate(units);
  written.set(units, bytes);
  return attachment(`Tallyframe template ${units}.xlsx`, new Uint8Array(await bytes));
});
