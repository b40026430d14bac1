import 'server-only';
import type { z } from 'zod';
import { db } from '@/db/client';
import { listActivity, type ActivityAsked, type ActivityListed } from '@/db/queries/activity';
import type { activityInput } from '@/lib/api/people-inputs';
import { csvLine } from '@/lib/reports/workbook/write-csv';

export type ActivityInput = z.output<typeof activityInput>;

/** Entries on a page. */
export const activityPage = 100;

/** Days as the machine that serves names them, the last one included. */
export function askedActivity(project: number | undefined, { person, what, from, to, before }: ActivityInput): ActivityAsked {
  const start = (day: string, plus: number): string => {
    const date = new Date(`${day}T00:00:00`);
    date.setDate(date.getDate() + plus);
    return date.toISOString();
  };
  return {
    ...(project !== undefined && { project }),
    ...(person !== undefined && { person }),
    ...(what !== undefined && { what }),
    ...(from !== undefined && { from: start(from, 0) }),
    ...(to !== undefined && { until: start(to, 1) }),
    ...(before !== undefined && { before }),
  };
}

/** "Portal sheds, revision B" */
export function aboutEntry({ batchName, letter }: ActivityListed): string {
  return [batchName, letter === null ? null : `revision ${letter}`].filter((part) => part !== null).join(', ');
}

/** "frames 240, over 11" */
export function detailOf({ detail }: ActivityListed): string {
  return Object.entries(detail)
    .filter(([, value]) => value !== null && value !== '')
    .map(([name, value]) => `${name} ${String(value)}`)
    .join(', ');
}

/** Every entry asked for as CSV, as it is read. */
export async function* activityCsv(office: number, asked: ActivityAsked): AsyncGenerator<Uint8Array<ArrayBuffer>> {
  const encoder = new TextEncoder();
  yield encoder.encode(`\ufeff${csvLine(['Number', 'At', 'Who', 'What', 'About', 'Detail'])}`);
  for await (const entry of everyEntry(office, asked)) {
    const { id, at, person, what } = entry;
    yield encoder.encode(csvLine([id, at, person ?? 'the service', what, aboutEntry(entry), detailOf(entry)]));
  }
}

/** Every entry asked for, some at a time, so that others work between. */
async function* everyEntry(office: number, asked: ActivityAsked): AsyncGenerator<ActivityListed> {
  for (let before = asked.before; ;) {
    const entries = await listActivity(db(), office, { ...asked, ...(before !== undefined && { before }), limit: 1000 });
    yield* entries;
    before = entries.at(-1)?.id;
    if (entries.length < 1000) return;
  }
}
