import Link from 'next/link';
import type { ReactNode } from 'react';
import { KeysHelp, type KeyWord } from './keys-help';
import { Mark } from './mark';

export interface BarWord {
  readonly label: string;
  readonly href: string;
  readonly current?: boolean;
  readonly count?: number;
}

interface BarProps {
  readonly words: readonly BarWord[];
  readonly home?: string;
  /** null before sign-in: no office's name is shown then. */
  readonly office: string | null;
  readonly person: string | null;
  /** Role in the trade's word: lead, analyst, checker, client. */
  readonly role?: string | null;
  /** A search field with the key `/`, where there is one. */
  readonly search?: ReactNode;
  /** A form that signs out, or a link. */
  readonly account?: ReactNode;
}

/** The keys that work in the office's pages, shown by `?`. */
const keys: readonly KeyWord[] = [
  { keys: ['1', '…', '9'], does: 'go to a sheet of the revision; on a frame, make a view large (1 to 4)' },
  { keys: ['j', 'k'], does: 'next and previous frame of the list, or member of the frame' },
  { keys: ['u'], does: 'from a frame back to its list, from a member’s numbers back to the frame' },
  { keys: ['n', 'v', 'm', 'b'], does: 'axial force, shear force, bending moment, buckled shape' },
  { keys: ['↑', '↓', '←', '→'], does: 'read the next cell, row, or point of a member' },
  { keys: ['Enter'], does: 'open what is read' },
  { keys: ['s', 'Space'], does: 'on a checker’s list: mark the frame seen and go on' },
  { keys: ['q', 'a', 'o'], does: 'on a checker’s list: query, accept, open the frame’s own page' },
  { keys: ['?'], does: 'show these keys' },
];

/** Office-level navigation: mark, name, a few words, office, person. No icons. */
export function Bar({ words, home = '/', office, person, role, search, account }: BarProps) {
  return (
    <header className="bar">
      <a className="skip" href="#content">
        To the content
      </a>
      <Link className="bar-name" href={home}>
        <Mark size={24} /> Tallyframe
      </Link>
      <nav aria-label="Office" className="bar-words">
        {words.map((word) => (
          <Link key={word.href} href={word.href} aria-current={word.current ? 'page' : undefined}>
            {word.label}
            {word.count !== undefined && <span className="bar-count"> {word.count}</span>}
          </Link>
        ))}
      </nav>
      <div className="bar-right">
        {search}
        {person && <KeysHelp keys={keys} />}
        {office && <span className="bar-office">{office}</span>}
        {person && (
          <span className="bar-person">
            <b>{person}</b>
            {role && <span className="bar-role">, {role}</span>}
          </span>
        )}
        {account}
      </div>
    </header>
  );
}
