import type { ReactNode } from 'react';
import type { RunProgressData } from './run-data';

interface RunProgressProps {
  readonly run: RunProgressData;
  /** "Stop after this frame", "Start again": buttons. */
  readonly acts?: ReactNode;
}

const words: Readonly<Record<RunProgressData['state'], string>> = {
  waiting: 'waiting for its turn',
  running: '',
  stopping: 'stopping',
  stopped: 'stopped',
  done: 'done',
  failed: 'stopped by a fault',
};

/** One big number, the rail, the rate and the time left; what stands still says so. */
export function RunProgress({ run, acts }: RunProgressProps) {
  const { state, done, total, rate, secondsLeft, started, each, message } = run;
  const share = total > 0 ? done / total : 0;
  return (
    <section className="run-progress" aria-label="Run">
      <div className="run-figures">
        <p className="run-count" aria-live="off">
          <b>{done.toLocaleString('en-GB')}</b> of {total.toLocaleString('en-GB')} frames
        </p>
        {state !== 'running' && <Figure label="State">{words[state]}</Figure>}
        {state === 'running' && <Figure label="Rate">{rate === null ? 'not yet' : `${rateText(rate)} frames a second`}</Figure>}
        {state === 'running' && <Figure label="Left">{secondsLeft === null ? 'not yet' : timeLeft(secondsLeft)}</Figure>}
        {started && <Figure label="Started">{started}</Figure>}
        {each && <Figure label="Each frame">{each}</Figure>}
        {acts && <div className="run-acts">{acts}</div>}
      </div>
      {message && (
        <p className="run-message" role={state === 'failed' ? 'alert' : undefined}>
          {message}
        </p>
      )}
      <div
        className="rail"
        role="progressbar"
        aria-label="Frames done"
        aria-valuemin={0}
        aria-valuemax={total}
        aria-valuenow={done}
        aria-valuetext={`${done} of ${total} frames${secondsLeft !== null && state === 'running' ? `, ${timeLeft(secondsLeft)} left` : ''}`}
      >
        <span style={{ width: `${share * 100}%` }} />
      </div>
    </section>
  );
}

function Figure({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  return (
    <div>
      <div className="tb-label">{label}</div>
      <div className="run-value">{children}</div>
    </div>
  );
}

const rateText = (rate: number) => (rate >= 10 ? Math.round(rate).toLocaleString('en-GB') : rate.toFixed(1));

/** "about 10 s", "about 4 min", "about 2 h 10 min". */
export function timeLeft(seconds: number): string {
  if (seconds < 1) return 'less than a second';
  if (seconds < 90) return `about ${Math.round(seconds)} s`;
  const minutes = Math.round(seconds / 60);
  return minutes < 90 ? `about ${minutes} min` : `about ${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}
