import Link from 'next/link';
import { Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listOwnParts, listRevisionParts } from '@/db/queries/own-parts';
import type { RevisionRecord } from '@/db/queries/revisions';
import { may, type Person } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { originOfPart } from '@/lib/intake/own/own-thing';
import { TakeVersion } from './take-version';

/** Sections and grades of the office's own that the frames are made of, by version; and the way to other sections. */
export async function MadeOf({ person, revision }: { readonly person: Person; readonly revision: RevisionRecord }) {
  const { office, id, batch, letter } = revision;
  const parts = await listRevisionParts(db(), office, id);
  if (parts.length === 0) return null;
  const own = parts.filter(({ origin }) => origin === 'office');
  const kept = own.length === 0 ? [] : (await Promise.all((['section', 'material'] as const).map((kind) => listOwnParts(db(), office, kind)))).flat(); // prettier-ignore
  const count = (origin: 'sheet' | 'library') => parts.filter((part) => part.kind === 'section' && part.origin === origin).length;
  const words = [
    count('library') > 0 && `${count('library')} of the standard ranges`,
    count('sheet') > 0 && `${count('sheet')} of the sheets`,
  ].filter((word) => word !== false);
  return (
    <Zone
      title="Made of"
      note={words.length === 0 ? undefined : `sections: ${words.join(', ')}`}
      aside={
        may(person, 'change a revision') && (
          <Link className="link" href={pages.sheet(batch, letter, 'change')}>
            Change a section
          </Link>
        )
      }
    >
      {own.length === 0 ? (
        <p>Nothing of the office’s own.</p>
      ) : (
        <ul className="made-of">
          {own.map((part) => {
            const now = kept.find(({ kind, name }) => kind === part.kind && name === part.own);
            const newer = now !== undefined && now.retiredAt === null && part.version !== null && now.version > part.version;
            return (
              <li key={`${part.kind} ${part.name}`}>
                {now ? (
                  <Link className="link" href={pages.ownPart(part.kind, now.id)}>
                    {part.name}
                  </Link>
                ) : (
                  part.name
                )}
                : {originOfPart(part)}, in {part.frames.toLocaleString('en-GB')} {part.frames === 1 ? 'frame' : 'frames'}.
                {newer && may(person, 'change a revision') && (
                  <TakeVersion batch={batch} letter={letter} part={part.kind} name={now.name} version={now.version} />
                )}
              </li>
            );
          })}
        </ul>
      )}
    </Zone>
  );
}
