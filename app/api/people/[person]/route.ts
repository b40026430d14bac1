import { door, type Params } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { lastLead, requireStanding } from '@/app/_server/standing';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { disablePerson, enablePerson, updateProjectsOf, updateRole } from '@/db/queries/standing';
import { standingInput } from '@/lib/api/people-inputs';

/** Where someone of the office stands. */
export const GET = door(async (request, { params }: Params<'person'>) => {
  const lead = await requirePerson(request, 'read people');
  return Response.json({ person: await requireStanding(lead, (await params).person) });
});

/** Changes role, projects, or whether they may sign in: all that is sent, or nothing. */
export const PUT = door(async (request, { params }: Params<'person'>) => {
  const lead = await requirePerson(request, 'change people');
  const person = await requireStanding(lead, (await params).person);
  const { role, projects, disabled } = await readJson(request, standingInput);
  await db()
    .transaction()
    .execute(async (within) => {
      const record = (what: string, detail: Record<string, string | number>) =>
        insertActivity(within, lead.office, { what, person: lead.id, detail: { of: person.name, ...detail } });
      if (role !== undefined && role !== person.role) {
        if (!(await updateRole(within, lead.office, person.id, role))) throw lastLead();
        await record('changed a role', { from: person.role, to: role });
      }
      if (projects !== undefined) {
        await updateProjectsOf(within, lead.office, person.id, projects);
        await record('assigned projects', { projects: projects.length });
      }
      if (disabled === true && person.disabledAt === null) {
        if (!(await disablePerson(within, lead.office, person.id))) throw lastLead();
        await record('disabled a person', {});
      } else if (disabled === false && person.disabledAt !== null) {
        await enablePerson(within, lead.office, person.id);
        await record('enabled a person', {});
      }
    });
  return Response.json({ person: await requireStanding(lead, String(person.id)) });
});
