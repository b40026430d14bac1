import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { RunProgress, timeLeft } from './run-progress';

const run = { state: 'running', done: 612, total: 1000, rate: 41.2, secondsLeft: 10, started: '16:42:07' } as const;

describe('the progress of a run', () => {
  it('says frames done, rate and time left, and fills the rail', () => {
    render(<RunProgress run={run} />);
    const rail = screen.getByRole('progressbar', { name: 'Frames done' });
    expect(rail).toHaveAttribute('aria-valuetext', '612 of 1000 frames, about 10 s left');
    expect(parseFloat((rail.firstChild as HTMLElement).style.width)).toBeCloseTo(61.2, 6);
    expect(screen.getByText('41 frames a second')).toBeInTheDocument();
    expect(screen.getByText('about 10 s')).toBeInTheDocument();
  });

  it('says why it failed and what is kept, and shows no rate then', () => {
    render(
      <RunProgress
        run={{
          ...run,
          state: 'failed',
          message: 'The run stopped before it finished. 612 of 1,000 frames are kept. Start it again to do the rest.',
        }}
      />,
    );
    expect(screen.getByRole('alert')).toHaveTextContent('612 of 1,000 frames are kept');
    expect(screen.queryByText('Rate')).toBeNull();
    expect(screen.getByText('stopped by a fault')).toBeInTheDocument();
  });

  it('writes the time left in the unit a person would', () => {
    expect([0.4, 45, 240, 7800].map(timeLeft)).toEqual(['less than a second', 'about 45 s', 'about 4 min', 'about 2 h 10 min']);
  });
});
