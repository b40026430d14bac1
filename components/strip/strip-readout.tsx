import Link from 'next/link';
import type { RefObject } from 'react';
import { CheckMark } from '../checking/check-mark';
import { RatioText } from '../ui/ratio-text';
import { VerdictMark } from '../ui/verdict-mark';
import type { StripFrame } from '@/lib/drawing/strip-data';

interface StripReadoutProps {
  readonly frame: StripFrame | undefined;
  readonly number: number;
  readonly count: number;
  readonly href: string | null;
  readonly nearLimit: number;
  readonly linkRef: RefObject<HTMLAnchorElement | null>;
}

/** One line, always there, that says everything about the cell being read. */
export function StripReadout({ frame, number, count, href, nearLimit, linkRef }: StripReadoutProps) {
  if (!frame) return <div className="readout">No frames.</div>;
  const where = [frame.check, frame.subject].filter(Boolean).join(', ');
  return (
    <div className="readout" aria-live="polite" data-testid="strip-readout">
      <span className="mono readout-soft">
        {number} of {count}
      </span>
      {href ? (
        <Link ref={linkRef} className="readout-id" href={href} prefetch={false}>
          {frame.id}
        </Link>
      ) : (
        <b>{frame.id}</b>
      )}
      {frame.state ? (
        <span className="readout-soft">{frame.state}</span>
      ) : (
        frame.verdict && (
          <>
            <VerdictMark verdict={frame.verdict} word />
            {frame.ratio !== null && <RatioText ratio={frame.ratio} verdict={frame.verdict} nearLimit={nearLimit} />}
          </>
        )
      )}
      {where && <span>{where}</span>}
      {frame.section && <span>{frame.section}</span>}
      {frame.combination && <span>combination {frame.combination}</span>}
      {frame.reason && <span className="readout-soft">{frame.reason}</span>}
      {frame.mark && (
        <span className="ck-green">
          <CheckMark kind={frame.mark} /> {frame.mark}
        </span>
      )}
      {href && (
        <span className="readout-key">
          <kbd>Enter</kbd> opens
        </span>
      )}
    </div>
  );
}
