import type { Metadata } from 'next';
import Link from 'next/link';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { defaultLines, problemLines, readSummary, sheetLines } from '@/app/_server/reading-lines';
import { DefaultsTaken } from '@/components/intake/defaults-taken';
import { WhatWasRead } from '@/components/intake/what-was-read';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listProblems, listSheets } from '@/db/queries/problems';
import { listUploads } from '@/db/queries/uploads';
import type { RevisionRecord } from '@/db/queries/revisions';
import { may, type Person } from '@/lib/access/may';
import { api, pages } from '@/lib/api/addresses';
import { RevisionHead } from '../_head/revision-head';
import { Combinations } from './combinations';
import { MadeOf } from './made-of';
import { ProblemsByCell } from './problems-by-cell';
import { Reading } from './reading';
import { RunGood } from './run-good';

export const metadata: Metadata = { title: 'What was read' };

/** Problems listed here; all of them stand on sheet 7. */
const most = 300;

interface ReadPageProps {
  readonly params: Promise<RevisionParams>;
}

/** What was read of the files, every problem at its cell, and what may run. */
export default async function ReadPage({ params }: ReadPageProps) {
  const { person, revision } = await pageRevision(params, 'read');
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="read" />
      <h1 className="sr-only">What was read of {revision.batchName}</h1>
      {revision.state === 'reading' ? (
        <Zone title="Reading">
          <Reading batch={revision.batch} letter={revision.letter} madeFrom={revision.madeFrom} />
        </Zone>
      ) : (
        <WasRead person={person} revision={revision} />
      )}
    </Sheet>
  );
}

async function WasRead({ person, revision }: { readonly person: Person; readonly revision: RevisionRecord }) {
  const { id, office, batch, letter, settings, origins, errors, warnings, notes, framesStopped } = revision;
  const [problems, sheets, files] = await Promise.all([
    listProblems(db(), office, id),
    listSheets(db(), office, id),
    listUploads(db(), office, id),
  ]);
  const defaults = settings && origins ? defaultLines(settings, origins) : [];
  const mayBring = may(person, 'bring sheets in');
  const side = (
    <>
      <Zone
        title="What was read"
        aside={
          <>
            {revision.frames > 0 && <Link href={pages.sheet(batch, letter, 'settings')}>Settings</Link>}
            {mayBring && (
              <Link className="ml-4" href={pages.next(batch, letter)}>
                Bring mended sheets in
              </Link>
            )}
          </>
        }
      >
        {sheets.length === 0 ? (
          <p>{readSummary(files, 0)}: nothing of it could be read.</p>
        ) : (
          <WhatWasRead sheets={sheetLines(sheets, problems)} summary={readSummary(files, sheets.length)} />
        )}
      </Zone>
      <MadeOf person={person} revision={revision} />
      {defaults.length > 0 && revision.frames > 0 && (
        <Zone title="Taken as default" note="Setup is silent">
          <DefaultsTaken defaults={defaults} />
        </Zone>
      )}
    </>
  );
  const main = (
    <>
      <Zone
        title="Problems by cell"
        note={countWords({ errors, warnings, notes, framesStopped })}
        aside={
          // of a file that could not be opened there is nothing to mark
          problems.length > 0 &&
          sheets.length > 0 && (
            <ButtonLink href={api.part(batch, letter, 'marked-copy')} download>
              Download the marked copy
            </ButtonLink>
          )
        }
      >
        {revision.state === 'failed' && revision.reason && <Notice kind="error">{revision.reason}</Notice>}
        {problems.length === 0 ? (
          <p>No problem was found. Every cell was read as it stands.</p>
        ) : (
          <ProblemsByCell batch={batch} letter={letter} problems={problemLines(problems, most)} />
        )}
        {problems.length > most && (
          <p>
            The first {most} are shown.{' '}
            <Link href={pages.sheet(batch, letter, 'problems')}>All {problems.length.toLocaleString('en-GB')}</Link>
          </p>
        )}
      </Zone>
      <Combinations person={person} revision={revision} />
      <RunGood
        batch={batch}
        letter={letter}
        project={revision.project}
        good={revision.frames - framesStopped}
        stopped={framesStopped}
        state={revision.state}
        may={may(person, 'run')}
      />
    </>
  );
  return (
    <div className="grid min-[1100px]:grid-cols-[minmax(0,418fr)_minmax(0,980fr)]">
      <div className="border-hair min-w-0 max-[1099px]:order-2 max-[1099px]:border-t">{side}</div>
      <div className="border-hair min-w-0 min-[1100px]:border-l">{main}</div>
    </div>
  );
}

interface Counts {
  readonly errors: number;
  readonly warnings: number;
  readonly notes: number;
  readonly framesStopped: number;
}

/** "4 errors stop 8 frames, 3 warnings, 2 notes" */
function countWords({ errors, warnings, notes, framesStopped }: Counts): string {
  const many = (n: number, noun: string) => `${n.toLocaleString('en-GB')} ${noun}${n === 1 ? '' : 's'}`;
  const parts = [
    errors > 0
      ? `${many(errors, 'error')}${framesStopped > 0 ? ` ${errors === 1 ? 'stops' : 'stop'} ${many(framesStopped, 'frame')}` : ''}`
      : null,
    warnings > 0 ? many(warnings, 'warning') : null,
    notes > 0 ? many(notes, 'note') : null,
  ];
  return parts.filter((part) => part !== null).join(', ');
}
