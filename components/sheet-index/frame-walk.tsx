'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useEffect, useRef, type ReactNode } from 'react';
import { useKeys, type KeyMap } from '../ui/use-keys';
import { createWalk } from './walk';

interface Neighbour {
  readonly id: string;
  readonly href: string;
}

interface FrameWalkProps {
  /** Address of this very page, as its neighbours have it. */
  readonly here: string;
  readonly previous: Neighbour | null;
  readonly next: Neighbour | null;
  /** "in 19 frames over, worst first": the list that k and j walk through, with its link or choices. */
  readonly list: ReactNode;
  /** Back to the list (key `u`). */
  readonly listHref?: string;
  readonly tools?: ReactNode;
  /** What is walked through. */
  readonly noun?: 'frame' | 'member';
}

/** One for all pages: each frame's page is drawn anew, and steps asked for meanwhile must outlive it. */
const walk = createWalk();

/** Second row of a frame's page: previous (k) and next (j) through the filtered list. */
export function FrameWalk({ here, previous, next, list, listHref, tools, noun = 'frame' }: FrameWalkProps) {
  const router = useRouter();
  const [on, back] = [next?.href ?? null, previous?.href ?? null];
  const known = useRef<string | null>(null);
  useEffect(() => {
    walk.drawn({ here, next: on, previous: back, go: (href) => router.push(href) }, known.current !== here);
    known.current = here;
  }, [here, on, back, router]);
  const keys: Record<string, () => void> = { k: () => walk.step(-1), j: () => walk.step(1) };
  if (listHref) keys.u = () => router.push(listHref);
  useKeys(keys satisfies KeyMap);
  return (
    <nav className="sheet-index" aria-label={noun === 'frame' ? 'Frames of this list' : 'Members of this frame'}>
      <div className="si-walk">
        {previous ? (
          <Link href={previous.href} rel="prev" aria-label={`Previous ${noun}, ${previous.id}`}>
            <kbd>k</kbd> ← {previous.id}
          </Link>
        ) : (
          <span className="si-end">
            <kbd>k</kbd> first
          </span>
        )}
        {next ? (
          <Link href={next.href} rel="next" aria-label={`Next ${noun}, ${next.id}`}>
            <kbd>j</kbd> {next.id} →
          </Link>
        ) : (
          <span className="si-end">
            <kbd>j</kbd> last
          </span>
        )}
        <span>{list}</span>
      </div>
      {tools && <div className="si-tools">{tools}</div>}
    </nav>
  );
}
