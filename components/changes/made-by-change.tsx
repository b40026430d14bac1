import Link from 'next/link';
import { ChangeList, type ChangeShown } from './change-list';

interface MadeByChangeProps {
  readonly letter: string;
  readonly from: { readonly letter: string; readonly href: string };
  readonly person: string;
  /** "30 Nov, 16:42" */
  readonly at: string;
  readonly reason: string;
  readonly changes: readonly ChangeShown[];
  /** Frames that are the very same as in the revision it was made from; null = not known yet. */
  readonly carriedOver?: { readonly frames: number; readonly of: number } | null;
}

/** Under the title block of a revision made on screen: what sets it apart from the one it was made from. */
export function MadeByChange({ letter, from, person, at, reason, changes, carriedOver = null }: MadeByChangeProps) {
  return (
    <section className="made-by-change" aria-label={`How revision ${letter} was made`}>
      <p>
        Revision {letter} was made from{' '}
        <Link className="link" href={from.href}>
          revision {from.letter}
        </Link>{' '}
        by {person}, {at}, by changing
      </p>
      <ChangeList changes={changes} />
      <p>
        <span className="made-why">Why:</span> {reason}
      </p>
      {carriedOver && carriedOver.frames > 0 && (
        <p>
          <span className="made-why">Carried over:</span> {carriedOver.frames.toLocaleString('en-GB')} of{' '}
          {carriedOver.of.toLocaleString('en-GB')} frames, as in {from.letter} with their results
        </p>
      )}
    </section>
  );
}
