import type { Metadata } from 'next';
import Link from 'next/link';
import { dayTime } from '@/app/_server/dates';
import { requireOwnPart } from '@/app/_server/own-parts';
import { pageOwnKind } from '@/app/_server/page-own';
import { pageThing } from '@/app/_server/page-thing';
import { OwnSection } from '@/components/sections/own-section';
import { UsedIn } from '@/components/sections/used-in';
import { VersionList } from '@/components/sections/version-list';
import { Notice } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listOwnUses, listOwnVersions, type OwnUse } from '@/db/queries/own-parts';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import { GradeForm } from '../../_own/grade-form';
import { figuresLine } from '../../_own/own-figures';
import { Retire } from '../../_own/retire';
import { SectionForm } from '../../_own/section-form';

export const metadata: Metadata = { title: 'The office’s own' };

interface OwnPartPageProps {
  readonly params: Promise<{ readonly kind: string; readonly part: string }>;
}

/** One section or grade of the office's own: its figures, every version and where each is used; the lead edits and retires it. */
export default async function OwnPartPage({ params }: OwnPartPageProps) {
  const { kind: path, part: id } = await params;
  const { person, kind } = await pageOwnKind(path, 'read sections', id);
  const part = await pageThing(requireOwnPart(person, kind, id));
  const [versions, uses] = await Promise.all([
    listOwnVersions(db(), person.office, part.id),
    listOwnUses(db(), person.office, part.id),
  ]);
  const edits = may(person, 'change sections');
  const { name, units, cells, note, version, retiredAt } = part;
  const start = { id: part.id, name, units, cells, note, next: version + 1 };
  return (
    <Sheet>
      <Zone
        title={name}
        level={1}
        note={`the office’s own ${kind === 'section' ? 'section' : 'steel grade'}, version ${version}`}
        aside={
          <Link className="link" href={pages.own}>
            All of the office’s own
          </Link>
        }
      >
        {retiredAt !== null && <Notice kind="near">No longer offered since {dayTime(retiredAt)}.</Notice>}
        <p>{note === '' ? 'Its source is not said.' : `Source: ${note}.`}</p>
        {!edits && kind === 'material' && <p>{figuresLine(kind, part)}</p>}
      </Zone>
      {edits && (kind === 'section' ? <SectionForm key={version} start={start} /> : <GradeForm key={version} start={start} />)}
      {!edits && part.section && (
        <Zone title="Figures">
          <OwnSection section={part.section} units={units} />
        </Zone>
      )}
      <Zone title="Used in" note="revisions whose frames are made of it">
        <UsedIn name={name} uses={uses.map((use) => ({ ...use, batch: use.batchName, href: hrefOf(kind, use) }))} />
      </Zone>
      <Zone title="Versions">
        <VersionList
          name={name}
          versions={versions.map((one) => ({ ...one, figures: figuresLine(kind, one), at: dayTime(one.at) }))}
        />
      </Zone>
      {edits && retiredAt === null && (
        <Zone title="Retire">
          <Retire kind={kind} id={part.id} name={name} />
        </Zone>
      )}
    </Sheet>
  );
}

/** The members that are made of it, where the revision has results; else the revision. */
function hrefOf(kind: OwnKind, { batch, letter, name, state }: OwnUse): string {
  if (kind === 'material' || state === 'reading' || state === 'read') return pages.revision(batch, letter);
  const filter = { column: 'section', op: 'in' as const, values: [name] };
  return pages.table(batch, letter, { table: 'members', filters: [filter], sort: null, columns: null });
}
