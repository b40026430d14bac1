import type { Metadata } from 'next';
import Link from 'next/link';
import { checkedWords } from '@/app/_server/checked-words';
import { needResults, pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { GoverningChecks } from '@/components/charts/governing-checks';
import { HardestSections } from '@/components/charts/hardest-sections';
import { Spread } from '@/components/charts/spread';
import { WorstFrames } from '@/components/charts/worst-frames';
import { Strip } from '@/components/strip/strip';
import { Cautions } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listStripMarks } from '@/db/queries/checking';
import { findSummary, listParameterRatios } from '@/db/queries/summary';
import { pages } from '@/lib/api/addresses';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { ParameterColumn } from '@/lib/tables/shown-columns';
import type { View } from '@/lib/tables/view';
import { RevisionHead } from '../_head/revision-head';
import { markedFrames, stripFrames } from '../_head/strip-frames';
import { governingCounts, sectionWork, worstFrames } from './glance-data';
import { RatioOver } from './ratio-over';

export const metadata: Metadata = { title: 'Glance' };

/** Sheet 1: the whole batch at a glance. */
export default async function GlancePage({ params }: { readonly params: Promise<RevisionParams> }) {
  const { person, revision } = await pageRevision(params, 'glance');
  needResults(revision);
  const summary = await findSummary(db(), person.office, revision.id);
  if (summary === undefined) throw new Error(`Expected a summary of revision ${revision.id}`);
  const { batch, letter, units } = revision;
  const marks = await listStripMarks(db(), person.office, revision.id);
  const nearLimit = revision.settings?.nearLimit ?? 0.9;
  const { cells, counts } = summary;
  const numeric = summary.parameters.filter((one) => one.numeric);
  const first = await firstVarying(revision, numeric);
  const worst = worstFrames(batch, letter, summary.worst);
  const over: View = {
    table: 'frames',
    filters: [{ column: 'verdict', op: 'in', values: ['over'] }],
    sort: { column: 'ratio', descending: true },
    columns: null,
  };
  const side = (
    <>
      <Zone
        title="Worst frames"
        note={counts.over > 0 ? `${worst.length} shown, ${counts.over.toLocaleString('en-GB')} over` : `${worst.length} shown`}
        aside={counts.over > 0 && <Link href={pages.table(batch, letter, over)}>all over</Link>}
      >
        <WorstFrames frames={worst} nearLimit={nearLimit} />
      </Zone>
      <Zone title="What governs">
        <GoverningChecks counts={governingCounts(cells)} frames={cells.length} />
      </Zone>
      <Zone title="Sections working hardest">
        <HardestSections sections={sectionWork(summary.sections)} nearLimit={nearLimit} />
      </Zone>
    </>
  );
  const main = (
    <>
      <Zone>
        <Strip
          frames={markedFrames(stripFrames(cells), marks)}
          nearLimit={nearLimit}
          hrefPattern={`${pages.sheet(batch, letter, 'frames')}/{n}`}
        />
      </Zone>
      <div className={`border-hair grid border-t ${first === undefined ? '' : 'md:grid-cols-2'}`}>
        {first !== undefined && (
          <RatioOver
            batch={batch}
            letter={letter}
            units={units}
            nearLimit={nearLimit}
            parameters={numeric}
            first={first}
            frames={cells.map((cell) => cell.id)}
          />
        )}
        <Zone title="Spread of governing ratios" note="frames in steps of 0.025">
          <Spread
            frames={cells.flatMap(({ ratio, verdict }) => (ratio === null ? [] : [{ ratio, verdict }]))}
            without={cells.filter(({ ratio, verdict }) => ratio === null && verdict !== null).length}
            nearLimit={nearLimit}
          />
        </Zone>
      </div>
    </>
  );
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="glance" />
      <h1 className="sr-only">
        {revision.batchName}, revision {letter}, at a glance
      </h1>
      <Columns main={main} side={side} />
      <Cautions {...checkedWords(revision)} />
    </Sheet>
  );
}

/** The first parameter that differs between frames, a span before all others, with its values. */
async function firstVarying(revision: RevisionRecord, parameters: readonly ParameterColumn[]) {
  const spanFirst = [...parameters].sort((a, b) => Number(isSpan(b.name)) - Number(isSpan(a.name)));
  for (const { name } of spanFirst.slice(0, 8)) {
    const ratios = await listParameterRatios(db(), revision.office, revision.id, name);
    if (ratios.some((one) => one.value !== ratios[0]?.value)) return { name, ratios };
  }
  return undefined;
}

const isSpan = (name: string): boolean => /^(span|reach)$/i.test(name);
