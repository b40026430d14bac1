import type { Metadata } from 'next';
import Link from 'next/link';
import { ActButton } from '@/app/_client/act-button';
import { day } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { requireStanding } from '@/app/_server/standing';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listProjects } from '@/db/queries/projects';
import { listStanding } from '@/db/queries/standing';
import { api, pages } from '@/lib/api/addresses';
import { ChangeStanding } from './change-standing';
import { HandOver } from './hand-over';

export const metadata: Metadata = { title: 'Person' };

export default async function PersonPage({ params }: { readonly params: Promise<{ readonly person: string }> }) {
  const { person: asked } = await params;
  const lead = await requirePagePerson('change people', `/people/${asked}`);
  const person = await pageThing(requireStanding(lead, asked));
  const projects = await listProjects(db(), lead.office);
  const takers = (await listStanding(db(), lead.office)).filter(
    (one) => one.id !== person.id && one.disabledAt === null && (one.role === 'client') === (person.role === 'client'),
  );
  const disabled = person.disabledAt !== null;
  const main = (
    <Zone
      title={person.name}
      level={1}
      note={`${person.email}, ${person.role} since ${day(person.since)}`}
      aside={
        <Link className="link" href={pages.people}>
          All people
        </Link>
      }
    >
      <ChangeStanding
        person={person.id}
        role={person.role}
        assigned={person.projects}
        projects={projects.map(({ id, name }) => ({ id, name }))}
      />
    </Zone>
  );
  const side = (
    <>
      <Zone title="Signing in">
        {disabled ? (
          <>
            <p className="mb-3">Disabled since {day(person.disabledAt ?? '')}. What they did stays under their name.</p>
            <ActButton label="Enable again" address={api.person(person.id)} method="PUT" json={{ disabled: false }} />
          </>
        ) : (
          <>
            <p className="mb-3">Disabling ends their sessions, tokens and links at once. What they did stays under their name.</p>
            <ActButton
              label={`Disable ${person.name}`}
              address={api.person(person.id)}
              method="PUT"
              json={{ disabled: true }}
              question="They are signed out at once, everywhere."
            />
          </>
        )}
      </Zone>
      <Zone title="Hand their work over" note={work(person.batches, person.projects.length)}>
        <HandOver
          person={person.id}
          leads={person.role === 'lead'}
          takers={takers.map(({ id, name, role }) => ({ id, name, role }))}
        />
      </Zone>
    </>
  );
  return (
    <Sheet>
      <Columns main={main} side={side} />
    </Sheet>
  );
}

function work(batches: number, projects: number): string {
  return `${batches === 1 ? '1 batch' : `${batches} batches`}, ${projects === 1 ? '1 project' : `${projects} projects`} assigned`;
}
