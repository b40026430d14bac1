import type { ReactNode } from 'react';

interface RunWhatIsGoodProps {
  readonly letter: string;
  readonly good: number;
  readonly stopped: number;
  /** The buttons: "Run 232 frames", "Leave it for now". */
  readonly children: ReactNode;
}

/** The foot of bringing sheets in: what running now does, in one sentence, and its button. */
export function RunWhatIsGood({ letter, good, stopped, children }: RunWhatIsGoodProps) {
  const frames = (n: number) => `${n.toLocaleString('en-GB')} ${n === 1 ? 'frame' : 'frames'}`;
  return (
    <div className="run-good">
      <div>
        <h2>{good === 0 ? 'No frame can run yet' : stopped > 0 ? 'Run what is good' : 'Every frame can run'}</h2>
        <p>
          {good === 0 && 'Mend the errors where they stand, then bring the mended sheets in as the next revision. '}
          {good > 0 && `${frames(good)} ${good === 1 ? 'runs' : 'run'} now as revision ${letter}. `}
          {stopped > 0 &&
            `The ${stopped === 1 ? 'stopped frame stays' : `${stopped.toLocaleString('en-GB')} stopped frames stay`} in the batch, not checked, until a mended upload becomes the next revision.`}
        </p>
      </div>
      <div className="run-good-acts">{children}</div>
    </div>
  );
}
