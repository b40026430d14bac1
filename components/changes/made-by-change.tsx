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
}

/** Under the title block of a revision made on screen: what sets it apart from the one it was made from. */
export function MadeByChange({ letter, from, person, at, reason, changes }: MadeByChangeProps) {
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
    </section>
  );
}
