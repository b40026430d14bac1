import { door, type Params } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { requireStanding } from '@/app/_server/standing';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { transferWork, updateRole } from '@/db/queries/standing';
import { ApiError } from '@/lib/api/error';
import { transferInput } from '@/lib/api/people-inputs';

/** Hands what someone looks after to someone else of the office: batches and projects, and the lead’s role where asked. */
export const POST = door(async (request, { params }: Params<'person'>) => {
  const lead = await requirePerson(request, 'change people');
  const from = await requireStanding(lead, (await params).person);
  const { to: taker, lead: leads } = await readJson(request, transferInput);
  const to = await requireStanding(lead, String(taker));
  if (to.id === from.id || to.disabledAt !== null) {
    throw new ApiError('conflict', 'Choose someone else of the office, who may sign in.');
  }
  if ((from.role === 'client') !== (to.role === 'client') && !leads) {
    throw new ApiError('conflict', 'A client’s projects go to a client, the office’s work to someone of the office.');
  }
  if (leads && (from.role !== 'lead' || to.role === 'client')) {
    throw new ApiError('conflict', 'The lead’s role goes from a lead to someone of the office who is no client.');
  }
  const handed = await db()
    .transaction()
    .execute(async (within) => {
      const work = await transferWork(within, lead.office, from.id, to.id);
      if (leads) {
        await updateRole(within, lead.office, to.id, 'lead');
        // An office keeps its leads' knowledge of the work: who hands over prepares batches from now on.
        await updateRole(within, lead.office, from.id, to.role === 'lead' ? 'analyst' : to.role);
      }
      const detail = { from: from.name, to: to.name, ...work, lead: leads ? 'yes' : 'no' };
      await insertActivity(within, lead.office, { what: 'handed work over', person: lead.id, detail });
      return work;
    });
  return Response.json({ transfer: { from: from.id, to: to.id, lead: leads, ...handed } });
});
