import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { parse } from '@/app/_server/input';
import { requireRead } from '@/app/_server/make-change';
import { databaseFile } from '@/db/client';
import { ApiError } from '@/lib/api/error';
import { sectionInput } from '@/lib/api/sizing-inputs';
import { pools } from '@/worker/boot';
import type { TakeAnswer, TakeTask } from '@/worker/threads/take-sections';

/** A section as members of the batch would have it (`?name=IPE 300&of=S275`), each material for its thickness and shape. Nothing is stored. */
export const GET = door(
  atRevision('read a batch', async ({ request, revision }) => {
    requireRead(revision);
    const params = new URL(request.url).searchParams;
    const { name, of } = parse(sectionInput, { name: params.get('name') ?? undefined, of: params.getAll('of') });
    const asked = [{ name, materials: [...new Set(of)] }];
    const task: TakeTask = { file: databaseFile(), office: revision.office, revision: revision.id, asked };
    const threads = pools();
    const [taken] = (await threads.tables.run(task, { filename: threads.bundle('write'), name: 'takeSections' })) as TakeAnswer;
    if (!taken || 'unfit' in taken) {
      const why = taken?.unfit ?? `There is no section “${name}”.`;
      throw new ApiError('bad-request', why, { fields: { name: [why] } });
    }
    return Response.json({ taken });
  }),
);
