import Link from 'next/link';
import type { ReactNode } from 'react';
import type { ShownQuestion } from './issue-data';

interface QuestionThreadProps {
  readonly question: ShownQuestion;
  /** "waiting for the office", "waiting for an answer" */
  readonly waiting: string;
  readonly children?: ReactNode;
}

/** A question with everything said to it, in order; the office's words are set in. */
export function QuestionThread({ question, waiting, children }: QuestionThreadProps) {
  const { id, about, href, open, posts } = question;
  return (
    <article className="thread" id={`question-${id}`} aria-label={`Question on ${about}`}>
      <h3>
        {href === null ? about : <Link href={href}>{about}</Link>}
        {open && <span className="text-ink2 font-normal">, {waiting}</span>}
      </h3>
      {posts.map(({ by, text, at, office }, index) => (
        <div key={index} className={`thread-post ${office ? 'is-office' : ''}`}>
          <p>{text}</p>
          <div className="thread-who">
            {by}, {at}
          </div>
        </div>
      ))}
      {children}
    </article>
  );
}
