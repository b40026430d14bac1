import { MadeByChange } from '@/components/changes/made-by-change';
import { dayTime } from '@/app/_server/dates';
import { db } from '@/db/client';
import { countCarriedOver, listChanges } from '@/db/queries/changes';
import type { RevisionRecord } from '@/db/queries/revisions';
import { pages } from '@/lib/api/addresses';

/** Of a revision made on screen: from which, what was changed, by whom and why. Nothing where its files were brought in. */
export async function MadeFrom({ revision }: { readonly revision: RevisionRecord }) {
  const { office, id, batch, letter, madeFrom } = revision;
  if (madeFrom === null) return null;
  const changes = await listChanges(db(), office, id);
  const [first] = changes;
  if (!first) return null;
  return (
    <MadeByChange
      letter={letter}
      from={{ letter: madeFrom, href: pages.revision(batch, madeFrom) }}
      person={first.person}
      at={dayTime(first.at)}
      reason={first.reason}
      carriedOver={
        revision.state === 'reading' ? null : { frames: await countCarriedOver(db(), office, id), of: revision.frames }
      }
      changes={changes.map(({ what, from, to }) => ({ what, from, to }))}
    />
  );
}
