import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { day } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { RuleTable } from '@/components/combination-sets/rule-table';
import { WhatItMakes } from '@/components/combination-sets/what-it-makes';
import { Notice } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listSetUses, listSetVersions } from '@/db/queries/combination-sets';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { idInput } from '@/lib/api/inputs';
import { EditSet } from '../edit-set';
import { OfferSet } from './offer-set';

export const metadata: Metadata = { title: 'Combination set' };

interface SetPageProps {
  readonly params: Promise<{ readonly set: string }>;
  readonly searchParams: Promise<{ readonly version?: string | string[] }>;
}

/** One of the office's combination sets: its rules in the latest or an earlier version, where it is used, and its next version. */
export default async function SetPage({ params, searchParams }: SetPageProps) {
  const [{ set }, asked] = await Promise.all([params, searchParams]);
  const id = idInput.safeParse(set);
  const person = await requirePagePerson(
    'read combination sets',
    id.success ? pages.combinationSet(id.data) : pages.combinationSets,
  );
  if (!id.success) notFound();
  const versions = await listSetVersions(db(), person.office, id.data);
  const [latest] = versions;
  if (!latest) notFound();
  const shown = asked.version === undefined ? latest : versions.find(({ version }) => String(version) === asked.version);
  if (!shown) notFound();
  const uses = await listSetUses(db(), person.office, id.data);
  const lead = may(person, 'change combination sets');
  return (
    <Sheet>
      <Zone
        title={shown.name}
        note={`version ${shown.version}, kept ${day(shown.at)} by ${shown.person}`}
        level={1}
        aside={<Link href={pages.combinationSets}>All sets</Link>}
      >
        {latest.withdrawnAt !== null && <Notice>Out of use since {day(latest.withdrawnAt)}: it is not offered any more.</Notice>}
        {shown.version !== latest.version && (
          <Notice>
            An earlier version. <Link href={pages.combinationSet(latest.set)}>Version {latest.version}</Link> is offered now.
          </Notice>
        )}
        <p>
          {shown.basedOn === null ? 'Made from nothing' : `Begun from ${shown.basedOn}`}; strength combinations hold{' '}
          {shown.level === 'factored' ? 'factored loads' : 'loads of allowable stress'}; cases of one kind act{' '}
          {shown.together ? 'all together' : 'each alone and together'}.
        </p>
        <p className="max-w-3xl">{shown.provenance}</p>
        <RuleTable rules={shown.rules} />
        <WhatItMakes set={shown} />
        {versions.length > 1 && (
          <p>
            Versions:{' '}
            {versions.map(({ version }, i) => (
              <span key={version}>
                {i > 0 && ' · '}
                {version === shown.version ? (
                  version
                ) : (
                  <Link className="link" href={pages.combinationSet(latest.set, version)}>
                    {version}
                  </Link>
                )}
              </span>
            ))}
          </p>
        )}
        {lead && <OfferSet set={latest.set} offered={latest.withdrawnAt === null} />}
      </Zone>
      <Zone title="Where it is used">
        {uses.length === 0 ? (
          <p>No revision was made by it yet.</p>
        ) : (
          <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Revisions made by the set">
            <table className="tbl">
              <caption className="sr-only">Revisions made by the set</caption>
              <thead>
                <tr>
                  <th scope="col">Batch</th>
                  <th scope="col">Revision</th>
                  <th scope="col">Project</th>
                  <th scope="col" className="num">
                    Version
                  </th>
                  <th scope="col">Made</th>
                </tr>
              </thead>
              <tbody>
                {uses.map((use) => (
                  <tr key={`${use.batch} ${use.letter}`}>
                    <th scope="row">{use.batchName}</th>
                    <td>
                      <Link href={pages.sheet(use.batch, use.letter, 'read')}>{use.letter}</Link>
                    </td>
                    <td>{use.project}</td>
                    <td className="num">{use.version}</td>
                    <td>
                      {day(use.at)}, {use.person}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        )}
      </Zone>
      {lead && shown.version === latest.version && (
        <Zone title={`Change it: version ${latest.version + 1}`} note="what earlier versions made stays as it is">
          <EditSet key={latest.version} from={latest} />
        </Zone>
      )}
    </Sheet>
  );
}
