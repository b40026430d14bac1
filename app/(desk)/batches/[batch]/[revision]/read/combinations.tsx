import Link from 'next/link';
import { CombinationTable } from '@/components/combinations/combination-table';
import { Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listCombinations } from '@/db/queries/combinations';
import { iterateFrames } from '@/db/queries/frames';
import { letterOf, listRevisions, type RevisionRecord } from '@/db/queries/revisions';
import { may, type Person } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { WriteCombinations } from './write-combinations';

/** Combinations shown here; the input workbook and the results hold all. */
const most = 1000;

interface CombinationsProps {
  readonly person: Person;
  readonly revision: RevisionRecord;
}

/** What the frames are combined by, before they are run: listed and generated, which may be written into the sheet. */
export async function Combinations({ person, revision }: CombinationsProps) {
  const { id, office, batch, letter, settings, frames, framesStopped } = revision;
  const { list, all } = await listCombinations(db(), office, id, most);
  if (frames === framesStopped) return null;
  const change = may(person, 'change a revision');
  if (list.length === 0 && !change) return null;
  const generated = list.filter(({ clause }) => clause !== null).length;
  const set = settings?.combinationSet ?? null;
  const note =
    set === null
      ? all === 0
        ? 'none'
        : `${all} listed`
      : `${set}: ${generated} generated${all > generated ? `, ${all - generated} listed` : ''}`;
  const revisions = await listRevisions(db(), office, batch);
  const table = <CombinationTable combinations={list} frames={frames - framesStopped} />;
  return (
    <Zone
      title="Combinations"
      note={all > most ? `the first ${most} of ${all.toLocaleString('en-GB')}` : note}
      aside={<Link href={pages.sheet(batch, letter, 'settings')}>Choose a set</Link>}
    >
      {all <= most && change ? (
        <WriteCombinations
          key={`${batch} ${letter}`}
          batch={batch}
          letter={letter}
          next={letterOf(revisions.length)}
          combinations={list}
          cases={await casesOf(revision)}
          frames={frames - framesStopped}
        />
      ) : (
        table
      )}
    </Zone>
  );
}

/** Load cases by name: those of the first frame that was read, then further ones that combinations hold. */
async function casesOf({ office, id }: RevisionRecord): Promise<string[]> {
  for await (const { read } of iterateFrames(db(), office, id)) if (read.frame) return read.frame.cases.map(({ name }) => name);
  return [];
}
