'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import type { ReactNode } from 'react';
import { useKeys, type KeyMap } from '../ui/use-keys';

interface Neighbour {
  readonly id: string;
  readonly href: string;
}

interface FrameWalkProps {
  readonly previous: Neighbour | null;
  readonly next: Neighbour | null;
  /** "in 19 frames over, worst first": the list that k and j walk through, with its link or choices. */
  readonly list: ReactNode;
  /** Back to the list (key `u`). */
  readonly listHref?: string;
  readonly tools?: ReactNode;
}

/** Second row of a frame's page: previous (k) and next (j) through the filtered list. */
export function FrameWalk({ previous, next, list, listHref, tools }: FrameWalkProps) {
  const router = useRouter();
  const keys: Record<string, () => void> = {};
  if (previous) keys.k = () => router.push(previous.href);
  if (next) keys.j = () => router.push(next.href);
  if (listHref) keys.u = () => router.push(listHref);
  useKeys(keys satisfies KeyMap);
  return (
    <nav className="sheet-index" aria-label="Frames of this list">
      <div className="si-walk">
        {previous ? (
          <Link href={previous.href} rel="prev" aria-label={`Previous frame, ${previous.id}`}>
            <kbd>k</kbd> ← {previous.id}
          </Link>
        ) : (
          <span className="si-end">
            <kbd>k</kbd> first
          </span>
        )}
        {next ? (
          <Link href={next.href} rel="next" aria-label={`Next frame, ${next.id}`}>
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
