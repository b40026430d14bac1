import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { clientsOf, makingOf, preparingOf } from '@/app/_server/issue-preparing';
import { db } from '@/db/client';
import { findIssueBasis } from '@/db/queries/issue-basis';
import { ApiError, notFound } from '@/lib/api/error';
import { issueInput } from '@/lib/api/issue-inputs';
import { askForIssue } from '@/worker/ask-issue';
import { queue, serverDatabase } from '@/worker/boot';

/** What issuing this revision would give: number, who signs, clients, what is not issued, why not; and how far its issue is. */
export const GET = door(
  atRevision('read issues', async ({ person, revision }) => {
    const { basis, why, clients } = await preparingOf(person, revision);
    const { number, prepared, checked, acceptances, counts, notIssued, before } = basis;
    return Response.json({
      number: number.text,
      prepared,
      checked,
      acceptances,
      counts,
      notIssued,
      supersedes: before?.number ?? null,
      clients,
      why,
      issue: await makingOf(revision),
    });
  }),
);

/** Issues the revision: its files are made in the queue, then its clients are told. */
export const POST = door(
  atRevision('issue', async ({ request, person, revision }) => {
    const { clients, note, frames } = await readJson(request, issueInput);
    const { office, id } = revision;
    const basis = await findIssueBasis(db(), office, id);
    if (!basis) throw notFound('revision');
    const offered = await clientsOf(office, revision.project, basis);
    if (clients.some((one) => !offered.some((client) => client.id === one))) {
      const sentence = 'Choose clients who are assigned to the project.';
      throw new ApiError('bad-request', sentence, { fields: { clients: [sentence] } });
    }
    if (typeof frames !== 'string' && frames.some((number) => number > revision.frames)) {
      const sentence = `The frames are numbered from 1 to ${revision.frames}.`;
      throw new ApiError('bad-request', sentence, { fields: { frames: [sentence] } });
    }
    const asked = await askForIssue(
      queue(),
      serverDatabase(),
      { office, revision: id },
      {
        note: note === '' ? null : note,
        // whoever holds the issue that this one takes the place of gets it too
        clients: offered.filter((client) => client.holds || clients.includes(client.id)),
        reportFrames: typeof frames === 'string' ? frames : [...new Set(frames)].sort((a, b) => a - b),
        person: { id: person.id, name: person.name, role: person.role },
      },
    );
    if ('why' in asked) throw new ApiError('conflict', asked.why.join(' '));
    return Response.json({ issue: await makingOf(revision) }, { status: 202 });
  }),
);
