import type { Metadata } from 'next';
import Link from 'next/link';
import { day } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { type SearchParams, toParams } from '@/app/_server/search-params';
import { requireProject } from '@/app/_server/things';
import { standing } from '@/components/issues/issue-data';
import { Empty } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listEngineTests, type EngineTest } from '@/db/queries/engine-tests';
import { listIssues, type IssueListed } from '@/db/queries/issues';
import { readOfficeSetting } from '@/db/queries/office-settings';
import { may } from '@/lib/access/may';
import { engineVersion } from '@/lib/analysis/engine-version';
import { pages } from '@/lib/api/addresses';
import { wasHandedOver } from '@/lib/issuing/issue-states';
import { formatNumber } from '@/lib/units/format';
import { TestEngine } from './test-engine';
import { WhoIssues } from './who-issues';

export const metadata: Metadata = { title: 'Issues' };

/** Every issue of the office or of one project; who may issue; and what the present engine would alter of what was issued. */
export default async function IssuesPage({ searchParams }: { readonly searchParams: Promise<SearchParams> }) {
  const person = await requirePagePerson('read issues', '/issues');
  const asked = toParams(await searchParams).get('project');
  const project = asked === null ? null : await pageThing(requireProject(person, asked));
  const issues = await listIssues(db(), person.office, project ? { project: project.id } : {});
  const tests = await listEngineTests(db(), person.office, engineVersion);
  const handed = issues.filter(({ state }) => wasHandedOver(state));
  const list = (
    <Zone
      title={project ? `Issues of ${project.number ? `${project.number} ` : ''}${project.name}` : 'Issues'}
      level={1}
      note="the newest first"
      aside={project && <Link href={pages.issues()}>of all projects</Link>}
      flush
    >
      {issues.length === 0 ? (
        <Empty>
          <p>Nothing has been issued yet. A revision that a checker passed is issued from its own page.</p>
        </Empty>
      ) : (
        <IssuesTable issues={issues} />
      )}
    </Zone>
  );
  return (
    <Sheet>
      <Columns
        main={list}
        side={
          <>
            <Zone title="Who issues">
              <WhoIssues
                checkersIssue={await readOfficeSetting(db(), person.office, 'checkers issue')}
                may={may(person, 'choose who issues')}
              />
            </Zone>
            <Zone title="Engine" note={`now ${engineVersion}`}>
              <EngineList issues={handed} tests={tests} />
            </Zone>
          </>
        }
      />
    </Sheet>
  );
}

function IssuesTable({ issues }: { readonly issues: readonly IssueListed[] }) {
  return (
    <div className="tbl-wrap" tabIndex={0} role="region" aria-label="Issues">
      <table className="tbl issue-list">
        <caption className="sr-only">Issues</caption>
        <thead>
          <tr>
            <th scope="col">Issue</th>
            <th scope="col">Batch</th>
            <th scope="col">Issued</th>
            <th scope="col">By</th>
            <th scope="col" className="num">
              Clients
            </th>
            <th scope="col" className="num">
              Downloads
            </th>
            <th scope="col" className="num">
              Receipts
            </th>
            <th scope="col" className="num">
              Open questions
            </th>
            <th scope="col">State</th>
          </tr>
        </thead>
        <tbody>
          {issues.map((one) => (
            <tr key={one.id}>
              <th scope="row">
                <Link href={wasHandedOver(one.state) ? pages.issue(one.id) : pages.toIssue(one.batch.id, one.revision.letter)}>
                  {one.number}
                </Link>
              </th>
              <td>
                <Link href={pages.revision(one.batch.id, one.revision.letter)}>
                  {one.batch.name}, {one.revision.letter}
                </Link>
              </td>
              <td>{day(one.issuedAt)}</td>
              <td>{one.issuedBy.name}</td>
              <td className="num">{one.clients}</td>
              <td className="num">{one.downloads}</td>
              <td className="num">{one.receipts}</td>
              <td className="num">{one.open}</td>
              <td className={one.state === 'withdrawn' || one.state === 'failed' ? 'is-over' : ''}>{standing[one.state]}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

interface EngineListProps {
  readonly issues: readonly IssueListed[];
  readonly tests: ReadonlyMap<number, EngineTest>;
}

/** Issues made by another engine first, and whether this one would alter them: it is computed, never guessed. */
function EngineList({ issues, tests }: EngineListProps) {
  const older = issues.filter(({ engine }) => engine !== engineVersion);
  const same = issues.filter(({ engine }) => engine === engineVersion);
  if (issues.length === 0) return <p>Nothing is issued, so nothing can be altered.</p>;
  return (
    <>
      <p>
        {older.length === 0
          ? 'Everything that is issued was made by this engine.'
          : `${older.length} of ${issues.length} issues were made by another engine. What they show stays as it was stored; a test evaluates every frame again and says what would be another.`}
      </p>
      <ul className="issue-files">
        {[...older, ...same].map(({ id, number, engine, state }) => (
          <li key={id}>
            <span>
              <b>
                <Link href={pages.issue(id)}>{number}</Link>
              </b>
              <span className="text-ink2">
                {engine}, {standing[state]}
              </span>
              <Outcome test={tests.get(id)} />
            </span>
            <TestEngine issue={id} number={number} />
          </li>
        ))}
      </ul>
    </>
  );
}

function Outcome({ test }: { readonly test: EngineTest | undefined }) {
  if (!test) return <span className="text-ink2 block">not tested by this engine</span>;
  if (test.altered === 0)
    return (
      <span className="block">
        not altered: {test.frames} frames give the same numbers ({test.by}, {day(test.at)})
      </span>
    );
  return (
    <span className="issue-withdrawn block">
      altered: {test.altered} of {test.frames} frames
      {test.verdicts > 0 && `, ${test.verdicts} with another verdict`}
      {test.largest !== null && `, ratios by up to ${formatNumber(test.largest, { significant: 2 })}`}
    </span>
  );
}
