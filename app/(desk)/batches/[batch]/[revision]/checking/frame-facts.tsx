'use client';
import { useState } from 'react';
import { Certificate } from '@/components/certificate/certificate';
import { DiagramView, LoadsView, RatioView } from '@/components/drawing/views';
import { RatioText } from '@/components/ui/ratio-text';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { Zone } from '@/components/ui/sheet';
import { CheckWorking } from '@/components/working/check-working';
import type { FrameDetail } from '@/app/_server/frame-detail';
import Link from 'next/link';
import { ChecksTable } from '../frames/[number]/checks-table';

interface FrameFactsProps {
  readonly frame: FrameDetail;
  /** Its own page. */
  readonly href: string;
  /** Every reason it is on the list for; [] = it isn't. */
  readonly why: readonly string[];
}

/** What a checker looks at of a frame: moments, loads, ratios; its checks with the working of one; its certificate. */
export function FrameFacts({ frame, href, why }: FrameFactsProps) {
  const { drawing, checks, units, nearLimit } = frame;
  const [open, setOpen] = useState<string | null>(checks[0]?.id ?? null);
  const check = checks.find((one) => one.id === open) ?? checks[0];
  const chosen = drawing?.chosen ?? null;
  return (
    <>
      <Zone flush>
        <p className="ck-headline">
          <b>{frame.id}</b> <VerdictMark verdict={frame.verdict} word />{' '}
          <RatioText ratio={frame.ratio} verdict={frame.verdict} nearLimit={nearLimit} />{' '}
          {check && [check.check, check.where, check.combination].filter(Boolean).join(', ')} <Link href={href}>open</Link>
          <span className="ck-reasons">
            {why.length > 0 ? `On the list for: ${why.join(', ')}.` : 'Not on the list; it may be marked all the same.'}
          </span>
        </p>
        {drawing && chosen && (
          <>
            <svg
              className="d-view ck-svg"
              viewBox="0 0 600 300"
              role="img"
              aria-label={`Frame ${frame.id}, bending moment, ${chosen.name}`}
            >
              <DiagramView data={drawing} result={chosen} force="M" width={600} height={300} large />
            </svg>
            <div className="ck-pair ck-small d-small">
              <svg
                className="d-view ck-svg"
                viewBox="0 0 300 190"
                role="img"
                aria-label={`Frame ${frame.id}, loads and reactions`}
              >
                <LoadsView data={drawing} result={chosen} width={300} height={190} large={false} />
              </svg>
              <svg className="d-view ck-svg" viewBox="0 0 300 190" role="img" aria-label={`Frame ${frame.id}, members by ratio`}>
                <RatioView data={drawing} width={300} height={190} large={false} />
              </svg>
            </div>
            <p className="ck-caption">Bending moment, loads and reactions of {chosen.name}; members by their worst ratio.</p>
          </>
        )}
      </Zone>
      {checks.length > 0 && (
        <Zone title="Checks" note="a row opens its working">
          <ChecksTable checks={checks} units={units} nearLimit={nearLimit} open={check?.id ?? null} onOpen={setOpen} />
        </Zone>
      )}
      {check && (
        <Zone>
          <CheckWorking check={check} nearLimit={nearLimit} />
        </Zone>
      )}
      <Zone>
        <details className="ck-details">
          <summary>Certificate</summary>
          <Certificate {...frame.vouched} settings={[]} />
        </details>
      </Zone>
    </>
  );
}
