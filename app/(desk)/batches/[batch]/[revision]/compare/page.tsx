import type { Metadata } from 'next';
import Link from 'next/link';
import { checkedWords } from '@/app/_server/checked-words';
import { comparedPage, comparedTwo, recordedBetween, settingsThatDiffer, type CompareInput, type ComparedTwo } from '@/app/_server/compared'; // prettier-ignore
import { dayTime } from '@/app/_server/dates';
import { pageThing } from '@/app/_server/page-thing';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { type SearchParams, toParams } from '@/app/_server/search-params';
import { ChangeLegend } from '@/components/compare/change-legend';
import { ChangeStrip } from '@/components/compare/change-strip';
import { ComparedFacts, VerdictTable } from '@/components/compare/compared-totals';
import { RatioShift } from '@/components/compare/ratio-shift';
import { MovedTable } from '@/components/compare/moved-table';
import { Cautions, Notice } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';
import { compareInput } from '@/lib/api/inputs';
import { hasCause, settingsCause } from '@/lib/results/compare-causes';
import type { ComparedRows } from '@/lib/results/compared-page';
import type { RevisionRecord } from '@/db/queries/revisions';
import { RevisionHead } from '../_head/revision-head';
import { CompareChoice } from './compare-choice';
import { RecordedChanges } from './recorded-changes';

export const metadata: Metadata = { title: 'Compare' };

interface ComparePageProps {
  readonly params: Promise<RevisionParams>;
  readonly searchParams: Promise<SearchParams>;
}

/** Sheet 8: what moved between two revisions of the batch. */
export default async function ComparePage({ params, searchParams }: ComparePageProps) {
  const { person, revision } = await pageRevision(params, 'compare');
  const read = compareInput.safeParse(Object.fromEntries(toParams(await searchParams)));
  // an address that was typed wrong shows what there is
  const asked = read.success ? read.data : compareInput.parse({});
  const two = await pageThing(comparedTwo(person, revision, asked.with));
  const why = two === null ? 'This batch has no earlier revision to compare this one with.' : notYet(two);
  if (two === null || why !== null) {
    return (
      <Frame revision={revision}>
        <Zone title="Compare" level={1}>
          <Notice>{why}</Notice>
        </Zone>
      </Frame>
    );
  }
  return <Compared two={two} asked={asked} />;
}

function notYet({ before, after }: ComparedTwo): string | null {
  for (const { letter, state, settings } of [before, after]) {
    if (state === 'reading') return `Revision ${letter} is still being read. Open this page again in a moment.`;
    if (settings === null) return `Nothing of revision ${letter} could be read, so there is nothing to compare.`;
  }
  return null;
}

function Frame({ revision, children }: { readonly revision: RevisionRecord; readonly children: React.ReactNode }) {
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="compare" />
      {children}
    </Sheet>
  );
}

async function Compared({ two, asked }: { readonly two: ComparedTwo; readonly asked: CompareInput }) {
  const { before, after, all } = two;
  const { batch, letter, units } = after;
  const letters = { before: before.letter, after: letter };
  const size = asked.size;
  const { totals, page, causes, matching, strip, inputs } = await comparedPage(two, asked, true);
  const [settings, recorded] = [settingsThatDiffer(two), await recordedBetween(two)];
  const address = (chosen: Partial<CompareInput>) => {
    const { list, show, by } = { ...asked, ...chosen };
    const kept = { with: before.letter, list, show, by };
    return pages.compare(batch, letter, chosen.page === undefined ? kept : { ...kept, page: chosen.page });
  };
  const nearLimits = { before: before.settings?.nearLimit ?? 0.9, after: after.settings?.nearLimit ?? 0.9 };
  const frames = (side: string) => `${pages.sheet(batch, side, 'frames')}/{n}`;
  const lastPage = Math.max(Math.ceil(matching / size), 1);
  const unfinished = [before, after].filter(({ state }) => state === 'read' || state === 'running' || state === 'stopped');
  const side = (
    <>
      <Zone title={`Ratio in ${letters.after} against ratio in ${letters.before}`} note="frames">
        <RatioShift cells={strip ?? []} letters={letters} nearLimit={nearLimits.after} />
      </Zone>
      <Zone title="What moved" note="frames">
        <ComparedFacts totals={totals} letters={letters} units={units} by={asked.by} hrefOf={(show) => `${address({ list: 'frames', show })}#moved`} />
      </Zone>
      <Zone title={`Verdicts, ${letters.before} to ${letters.after}`} note="frames that both have">
        <VerdictTable totals={totals} letters={letters} />
      </Zone>
    </>
  ); // prettier-ignore
  const main = (
    <>
      <Zone title={`How each frame moved, ${letters.before} to ${letters.after}`} note="bar and arrow point from the ratio it had to the one it has; the line is 1.00" level={1}>
        {unfinished.length > 0 && (
          <Notice>
            {unfinished.map((one) => `Revision ${one.letter} is ${one.state}`).join(', ')}: frames that were not run are not checked.
          </Notice>
        )}
        <ChangeStrip cells={strip ?? []} letters={letters} nearLimit={nearLimits.after} by={asked.by} hrefPattern={frames(letter)} />
        <ChangeLegend />
      </Zone>
      <Zone
        title="Inputs that differ"
        note={`${count(inputs.changes + settings.length, 'change')}, ${count(inputs.cells, 'cell or row', 'cells and rows')}`}
        aside={
          inputs.cells > 0 && (
            <>
              <Link className="link" href={`${address({ list: 'inputs' })}#moved`}>
                all
              </Link>
              <Link className="link" href={`${address({ list: 'cells' })}#moved`}>
                cell by cell
              </Link>
            </>
          )
        }
      >
        <RecordedChanges settings={settings} recorded={recorded.map((one) => ({ ...one, at: dayTime(one.at) }))} />
        {inputs.cells > 0 ? (
          <MovedTable page={{ list: 'inputs', rows: inputs.first }} of={{ letters, nearLimits, units, frameHref: (_, index) => frames(letter).replace('{n}', String(index + 1)) }} />
        ) : (
          <p className="zone-note">No row of the sheets differs.</p>
        )}
      </Zone>
    </>
  ); // prettier-ignore
  const otherCause = settingsCause(settings);
  const pager = (
    <nav className="compare-foot" aria-label="Pages">
      {asked.page > 1 && (
        <Link className="link" rel="prev" href={`${address({ page: asked.page - 1 })}#moved`}>
          ← previous
        </Link>
      )}
      <span>
        {matching === 0 ? '0 rows' : `${n((asked.page - 1) * size + 1)} to ${n(Math.min(asked.page * size, matching))} of ${n(matching)}`}
      </span>
      {asked.page < lastPage && (
        <Link className="link" rel="next" href={`${address({ page: asked.page + 1 })}#moved`}>
          next →
        </Link>
      )}
    </nav>
  ); // prettier-ignore
  return (
    <Frame revision={after}>
      <Columns main={main} side={side} />
      <div id="moved" className="border-hair border-t">
        <Zone
          title="Row by row"
          aside={
            <a className="link" href={api.compared(batch, letter, { with: before.letter, by: asked.by }, 'xlsx')} download>
              Export the differences
            </a>
          }
        >
          <CompareChoice
            action={pages.compare(batch, letter)}
            chosen={{ ...asked, with: before.letter }}
            others={all.filter((one) => one.id !== after.id).map((one) => one.letter)}
            address={(chosen) => `${address(chosen)}#moved`}
            letters={letters}
          />
          <MovedTable
            page={page}
            causes={causes?.map((cause, i) => cause ?? (mayHaveCause(page, i) ? otherCause : null)) ?? null}
            of={{
              letters,
              nearLimits,
              units,
              frameHref: (from, index) => frames(letters[from]).replace('{n}', String(index + 1)),
            }}
          />
          {pager}
        </Zone>
      </div>
      <Cautions {...checkedWords(after)} />
    </Frame>
  );
}

function mayHaveCause(page: ComparedRows, i: number): boolean {
  const pair = page.list === 'frames' ? page.rows[i] : undefined;
  return pair === undefined || hasCause(pair);
}
const n = (value: number): string => value.toLocaleString('en-GB');
const count = (value: number, one: string, more = `${one}s`): string => `${n(value)} ${value === 1 ? one : more}`;
