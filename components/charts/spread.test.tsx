import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { RatioAgainst } from './ratio-against';
import { spreadBins } from '@/lib/drawing/spread-bins';
import { Spread } from './spread';
import { ticks, tickText } from '@/lib/drawing/axis';

describe('the spread of ratios', () => {
  it('counts a ratio of exactly 1.00 as near and one above it as over', () => {
    const { bins } = spreadBins([1, 1.0001, 0.9, 0.8999], 0.9);
    const count = (verdict: string) => bins.filter((bin) => bin.verdict === verdict).reduce((sum, bin) => sum + bin.count, 0);
    expect([count('within'), count('near'), count('over')]).toEqual([1, 2, 1]);
  });

  it('keeps every frame, and never lets a step straddle a near limit of its own', () => {
    const ratios = Array.from({ length: 200 }, (_, i) => ((i * 7919) % 1900) / 1000);
    const { bins } = spreadBins(ratios, 0.885);
    expect(bins.reduce((sum, bin) => sum + bin.count, 0)).toBe(200);
    for (const bin of bins) expect(bin.from < 0.885 && bin.to > 0.885).toBe(false);
    const over = bins.filter((bin) => bin.verdict === 'over').reduce((sum, bin) => sum + bin.count, 0);
    expect(over).toBe(ratios.filter((ratio) => ratio > 1).length);
  });

  it('says what it shows in words', () => {
    render(<Spread ratios={[0.5, 1.2]} nearLimit={0.9} />);
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
