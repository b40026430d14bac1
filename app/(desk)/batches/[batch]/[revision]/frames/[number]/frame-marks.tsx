'use client';
import { useState } from 'react';
import { HandChecksShown } from '@/components/checking/hand-checks-shown';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { useKeys } from '@/components/ui/use-keys';
import { FramePanel } from '../../checking/frame-panel';
import { useFrameChecking } from '../../checking/use-frame-checking';

interface FrameMarksProps {
  readonly batch: number;
  readonly letter: string;
  readonly number: number;
}

/** A checker's marks on a frame's own page, where its preparer answers too. */
export function FrameMarks({ batch, letter, number }: FrameMarksProps) {
  const acts = useFrameChecking(batch, letter, number);
  const may = acts.marks?.mayMark ?? false;
  const focusOn = (key: string) => document.querySelector<HTMLTextAreaElement>(`textarea[data-key="${key}"]`)?.focus();
  useKeys(may ? { s: () => acts.seen(true), q: () => focusOn('q'), a: () => focusOn('a') } : {});
  return <FramePanel acts={acts} />;
}

/** What a checker works out by hand, made when it is opened. */
export function FrameHandChecks({ batch, letter, number }: FrameMarksProps) {
  const [open, setOpen] = useState(false);
  const { marks, error } = useFrameChecking(batch, letter, number, open);
  return (
    <Zone>
      <details className="ck-details" onToggle={(event) => setOpen(event.currentTarget.open)}>
        <summary>Checks by hand: loads against reactions, wL²/8, sway</summary>
        {error && <Notice kind="error">{error.message}</Notice>}
        {open && !marks && !error && <p>Being worked out …</p>}
        {marks &&
          (marks.handChecks ? (
            <HandChecksShown checks={marks.handChecks} units={marks.units} />
          ) : (
            <p>Errors in its sheets stop this frame, so there is nothing to work out.</p>
          ))}
      </details>
    </Zone>
  );
}
