import Link from 'next/link';
import type { CompareInput } from '@/app/_server/compared';
import type { MovementKind } from '@/lib/results/compare';
import type { ComparedList } from '@/lib/results/compared-page';

interface CompareChoiceProps {
  readonly action: string;
  readonly chosen: CompareInput & { readonly with: string };
  /** Letters of the batch's other revisions. */
  readonly others: readonly string[];
  readonly address: (chosen: Partial<CompareInput>) => string;
  readonly letters: { readonly before: string; readonly after: string };
}

const lists: readonly (readonly [ComparedList, string])[] = [
  ['frames', 'Frames'],
  ['members', 'Members'],
  ['reactions', 'Reactions'],
  ['inputs', 'Inputs'],
  ['cells', 'Cell by cell'],
];

const shows: Readonly<Record<'frames' | 'members', readonly (readonly [MovementKind, string])[]>> = {
  frames: [
    ['moved', 'moved'],
    ['over', 'became over'],
    ['not-checked', 'became not checked'],
    ['near', 'became near'],
    ['within', 'became within'],
    ['only', 'only in one'],
    ['critical', 'α_cr moved'],
    ['mass', 'steel changed'],
    ['all', 'all'],
  ],
  members: [
    ['moved', 'moved'],
    ['over', 'became over'],
    ['not-checked', 'became not checked'],
    ['near', 'became near'],
    ['within', 'became within'],
    ['only', 'only in one'],
    ['all', 'all of frames that changed'],
  ],
};

/** Which list, what of it, and what counts as a movement; all of it stands in the address. */
export function CompareChoice({ action, chosen, others, address, letters }: CompareChoiceProps) {
  const { list, show, by } = chosen;
  const offered = list === 'frames' || list === 'members' ? shows[list] : null;
  return (
    <>
      <ul className="compare-lists" aria-label="Lists">
        {lists.map(([value, label]) => (
          <li key={value}>
            <Link className="link" href={address({ list: value, show: 'moved' })} aria-current={value === list ? 'page' : undefined}>
              {label}
            </Link>
          </li>
        ))}
      </ul>
      {offered && (
        <ul className="compare-shows" aria-label="What is shown">
          {offered.map(([value, label]) => (
            <li key={value}>
              <Link className="link" href={address({ show: value })} aria-current={value === show ? 'true' : undefined}>
                {label}
              </Link>
            </li>
          ))}
        </ul>
      )}
      <form className="compare-by" action={action} method="get">
        <input type="hidden" name="list" value={list} />
        <input type="hidden" name="show" value={show} />
        <label>
          From revision{' '}
          <select name="with" defaultValue={letters.before} key={letters.before}>
            {others.map((letter) => (
              <option key={letter}>{letter}</option>
            ))}
          </select>
        </label>{' '}
        to {letters.after},{' '}
        <label>
          {list === 'reactions' ? 'moved by more than this share of the frame’s largest' : 'moved by more than'}{' '}
          <input type="number" name="by" min="0" max="1000" step="any" defaultValue={by} key={by} />
        </label>
        <button type="submit" className="link">
          Show
        </button>
      </form>
    </>
  ); // prettier-ignore
}
