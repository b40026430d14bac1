import Link from 'next/link';
import type { ReactNode } from 'react';
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
