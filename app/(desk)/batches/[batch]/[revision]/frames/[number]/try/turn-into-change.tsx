import { useState } from 'react';
import Link from 'next/link';
import { Zone } from '@/components/ui/sheet';
import { pages } from '@/lib/api/addresses';
import { askedWords } from '@/lib/changes/members-asked';
import type { Frame } from '@/lib/model/frame';
import { changesOfTry } from '@/lib/sizing/changes-of-try';
import type { TriedSection } from '@/lib/sizing/taken-by';
import { MakeChanges } from '../../../_head/make-changes';

interface TurnIntoChangeProps {
  readonly batch: number;
  readonly letter: string;
  readonly next: string;
  readonly frame: Frame;
  readonly tried: readonly TriedSection[];
}

/** A try as the next revision: one section goes to the change page, filled in; several are made here. */
export function TurnIntoChange({ batch, letter, next, frame, tried }: TurnIntoChangeProps) {
  const { here, everywhere } = changesOfTry(frame, tried);
  const [where, setWhere] = useState<'here' | 'everywhere'>(everywhere.length > 0 ? 'everywhere' : 'here');
  const changes = where === 'everywhere' && everywhere.length > 0 ? everywhere : here;
  const [only] = changes;
  if (!only) return null;
  const address = changes.length === 1 ? pages.changeTo(batch, letter, only) : null;
  return (
    <Zone title="Turn it into a change" note={`makes revision ${next}; ${letter} stays as it is`}>
      {everywhere.length > 0 && (
        <fieldset className="try-where">
          <legend className="sr-only">Where it is changed</legend>
          <label>
            <input type="radio" name="where" checked={where === 'everywhere'} onChange={() => setWhere('everywhere')} /> in every
            frame that has such members
          </label>
          <label>
            <input type="radio" name="where" checked={where === 'here'} onChange={() => setWhere('here')} /> in frame {frame.id}{' '}
            only
          </label>
        </fieldset>
      )}
      <p>{changes.map(({ what, to }) => `${askedWords(what)} → ${to}`).join('; ')}</p>
      {address === null ? (
        <MakeChanges key={where} batch={batch} letter={letter} next={next} changes={changes} />
      ) : (
        <Link className="btn btn-filled" href={address}>
          Turn it into a change
        </Link>
      )}
    </Zone>
  );
}
