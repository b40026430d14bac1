import { aboutEntry, askedActivity, detailOf, everyEntry } from '@/app/_server/activity';
import { door, type Params } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { requireProject } from '@/app/_server/things';
import { activityInput } from '@/lib/api/people-inputs';
import { csvLine } from '@/lib/reports/workbook/write-csv';

/** What was done in a project as CSV: every entry that the filters leave. */
export const GET = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'read activity');
  const project = await requireProject(person, (await params).project);
  const asked = askedActivity(project.id, parse(activityInput, queryOf(request)));
  return attachment(`Activity of ${project.name}.csv`, ReadableStream.from(lines(person.office, asked)));
});

async function* lines(...[office, asked]: Parameters<typeof everyEntry>): AsyncGenerator<Uint8Array<ArrayBuffer>> {
  const encoder = new TextEncoder();
  yield encoder.encode(`\ufeff${csvLine(['Number', 'At', 'Who', 'What', 'About', 'Detail'])}`);
  for await (const entry of everyEntry(office, asked)) {
    const { id, at, person, what } = entry;
    yield encoder.encode(csvLine([id, at, person ?? 'the service', what, aboutEntry(entry), detailOf(entry)]));
  }
}
