import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { databaseFile } from '@/db/client';
import { notFound } from '@/lib/api/error';
import { frameNumberInput } from '@/lib/api/inputs';
import { pools } from '@/worker/boot';
import type { BuckledDrawn, BuckledTask } from '@/worker/threads/draw-buckled';

/**
 * The shape in which a frame buckles under α_cr times the loads of a combination (`?result=C1`), largest movement 1: by member,
 * x, y of each unmoved point and its movement. Worked out when it is asked for, in a thread.
 */
export const GET = door(
  atRevision<'number'>('read a batch', async ({ request, revision, params }) => {
    const number = frameNumberInput.safeParse(params.number);
    const result = new URL(request.url).searchParams.get('result');
    if (!number.success || result === null) throw notFound('buckled shape');
    const task: BuckledTask = {
      file: databaseFile(),
      office: revision.office,
      revision: revision.id,
      index: number.data - 1,
      result,
    };
    const { tables, bundle } = pools();
    const shape = (await tables.run(task, { filename: bundle('write'), name: 'drawBuckled' })) as BuckledDrawn | null;
    if (shape === null) throw notFound('buckled shape');
    return Response.json({ shape });
  }),
);
