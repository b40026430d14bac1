import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { RatioAgainst } from './ratio-against';
import { spreadBins, type SpreadBin, type SpreadFrame } from '@/lib/drawing/spread-bins';
import { Spread } from './spread';
import { ticks, tickText } from '@/lib/drawing/axis';

const framesOf = (ratios: readonly number[]): SpreadFrame[] =>
  ratios.map((ratio) => ({ ratio, verdict: ratio > 1 ? 'over' : ratio >= 0.885 ? 'near' : 'within' }));
const sum = (bins: readonly SpreadBin[], verdict: keyof SpreadBin['of']): number =>
  bins.reduce((all, bin) => all + bin.of[verdict], 0);

describe('the spread of ratios', () => {
  it('counts a ratio of exactly 1.00 as near and one above it as over', () => {
    const { bins } = spreadBins(framesOf([1, 1.0001, 0.9, 0.8999]), 0.9);
    expect([sum(bins, 'within'), sum(bins, 'near'), sum(bins, 'over')]).toEqual([1, 2, 1]);
  });

  it('leaves a frame within that its own check calls so above the near limit, in the step of its ratio', () => {
    const { bins } = spreadBins([{ ratio: 0.96, verdict: 'within' }, { ratio: 0.97, verdict: 'near' }], 0.9); // prettier-ignore
    expect(bins.filter(({ count }) => count > 0)).toEqual([
      { from: 0.95, to: 0.975, count: 2, of: { within: 1, near: 1, over: 0, 'not checked': 0 } },
    ]);
    const { container } = render(<Spread frames={[{ ratio: 0.98, verdict: 'within' }]} nearLimit={0.9} />);
    expect([...container.querySelectorAll('.chart-bar')].map((bar) => bar.getAttribute('class'))).toEqual([
      'chart-bar chart-within',
    ]);
  });

  it('never draws as within what is not checked, and says how many stand in no step', () => {
    const { bins } = spreadBins([{ ratio: 0.6, verdict: 'not checked' }, { ratio: 0.95, verdict: 'not checked' }], 0.9); // prettier-ignore
    expect(['within', 'near', 'over', 'not checked'].map((one) => sum(bins, one as keyof SpreadBin['of']))).toEqual([0, 0, 0, 2]);
    const { container } = render(<Spread frames={[{ ratio: 0.6, verdict: 'not checked' }]} without={29} nearLimit={0.9} />);
    expect(container.querySelectorAll('.chart-not-checked')).toHaveLength(1);
    expect(screen.getByText('29 not checked have no ratio and stand in no step.')).toBeInTheDocument();
  });

  it('keeps every frame, and never lets a step straddle a near limit of its own', () => {
    const ratios = Array.from({ length: 200 }, (_, i) => ((i * 7919) % 1900) / 1000);
    const { bins } = spreadBins(framesOf(ratios), 0.885);
    expect(bins.reduce((all, bin) => all + bin.count, 0)).toBe(200);
    for (const bin of bins) expect(bin.from < 0.885 && bin.to > 0.885).toBe(false);
    expect(sum(bins, 'over')).toBe(ratios.filter((ratio) => ratio > 1).length);
  });

  it('says what it shows in words', () => {
    render(<Spread frames={framesOf([0.5, 1.2])} nearLimit={0.9} />);
    expect(screen.getByRole('img', { name: 'Governing ratios of 2 frames in steps of 0.025: 1 above 1.00' })).toBeInTheDocument();
  });

  it('has round steps on its axes', () => {
    expect(ticks(0.4, 1.2, 4)).toEqual([0.4, 0.6, 0.8, 1, 1.2]);
    expect(tickText(0.6, [0.4, 0.6])).toBe('0.6');
    expect(tickText(-2, [-2, 0])).toBe('−2');
  });
});

describe('ratio against a parameter', () => {
  it('names the worst frame, and leaves out those without a value', () => {
    render(
      <RatioAgainst
        parameter="span"
        unit="m"
        nearLimit={0.9}
        points={[
          { frame: 'D1', ratio: 1.13, verdict: 'over', x: 18.5 },
          { frame: 'D2', ratio: 0.8, verdict: 'within', x: 12 },
          { frame: 'D3', ratio: 2, verdict: 'over', x: null },
        ]}
      />,
    );
    expect(screen.getByRole('img', { name: 'Governing ratio against span, m: worst D1 with 1.13 at 18.5' })).toBeInTheDocument();
  });

  it('says which points stand on the upper edge because they are above it', () => {
    const point = (frame: string, ratio: number, x: number) => ({ frame, ratio, verdict: 'over' as const, x });
    const { container, rerender } = render(
      <RatioAgainst
        parameter="mass"
        unit="kg/m"
        nearLimit={0.9}
        points={[point('a', 5.2, 10), point('b', 2, 20), point('c', 2.4, 15)]}
      />,
    );
    expect(screen.getByText(/; 2 above 2, drawn on the upper edge/)).toBeInTheDocument();
    expect(container.querySelector('.chart-beyond')?.getAttribute('d')?.match(/M/g)).toHaveLength(2);
    rerender(<RatioAgainst parameter="mass" unit="kg/m" nearLimit={0.9} points={[point('b', 2, 20)]} />);
    expect(container.querySelector('.chart-beyond')).toBeNull();
  });

  it('says so where no frame has the parameter', () => {
    render(<RatioAgainst parameter="span" unit="m" nearLimit={0.9} points={[]} />);
    expect(screen.getByText('No frame has a value of span and a ratio.')).toBeInTheDocument();
  });
});
