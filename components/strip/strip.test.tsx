import { fireEvent, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { Strip } from './strip';
import { cellHeight, countVerdicts, type StripFrame } from '@/lib/drawing/strip-data';
import { columnAt, columnX, layOutStrip } from '@/lib/drawing/strip-layout';

const verdictOf = (ratio: number) => (ratio > 1 ? 'over' : ratio >= 0.9 ? 'near' : 'within');
const frame = (index: number, ratio: number | null, more: Partial<StripFrame> = {}): StripFrame => ({
  id: `F${index + 1}`,
  ratio,
  verdict: ratio === null ? 'not checked' : verdictOf(ratio),
  ...more,
});
const batch = (count: number) => Array.from({ length: count }, (_, i) => frame(i, i % 17 === 5 ? null : 0.4 + (i % 13) * 0.06));
const strip = (frames: readonly StripFrame[]) => render(<Strip frames={frames} nearLimit={0.9} hrefPattern="/frames/{n}" />);

describe('the strip', () => {
  it('fills every cell to its ratio, cut at 1.25, and leaves one without a ratio hollow to 1.00', () => {
    const ratios = [0.5, 0.9, 1, 1.003, 1.13, 1.4, 0, null];
    strip(ratios.map((ratio, i) => frame(i, ratio)));
    for (const [i, ratio] of ratios.entries()) {
      const cell = screen.getByRole('option', { name: new RegExp(`^F${i + 1},`) });
      const drawn = (Number(cell.dataset.height) / Number(cell.dataset.full)) * 1.25;
      expect(drawn).toBeCloseTo(Math.min(ratio ?? 1, 1.25), 9);
      const body = cell.querySelector('rect.cell-body');
      if (body && ratio !== null) expect(Number(body.getAttribute('height'))).toBeCloseTo(Number(cell.dataset.height), 9);
    }
  });

  it('says every verdict in words, and prints no ratio across a boundary', () => {
    strip([frame(0, 0.897), frame(1, 0.997), frame(2, 1.003), frame(3, null)]);
    expect(screen.getByRole('option', { name: 'F1, within, 0.89' })).toBeInTheDocument();
    expect(screen.getByRole('option', { name: 'F2, near, 1.00' })).toBeInTheDocument();
    expect(screen.getByRole('option', { name: 'F3, over, 1.01' })).toBeInTheDocument();
    expect(screen.getByRole('option', { name: 'F4, not checked' })).toBeInTheDocument();
  });

  it('gives each verdict a shape of its own: a notch in the head of an over, a broken outline where not checked', () => {
    const { container } = strip([frame(0, 0.5), frame(1, 0.95), frame(2, 1.1), frame(3, null)]);
    expect(container.querySelector('.cell-over path.cell-body')?.getAttribute('d')).toMatch(/^M.*L.*z$/);
    expect(container.querySelector('.cell-near .cell-body')?.getAttribute('fill')).toMatch(/^url\(#/);
    expect(container.querySelector('.cell-not-checked rect')).not.toBeNull();
    expect(container.querySelector('.cell-not-checked .cell-level')).toBeNull();
  });

  it('reads the worst frame first, then moves by arrow keys, Home and End', async () => {
    const user = userEvent.setup();
    strip(batch(120));
    const list = screen.getByRole('listbox');
    const readout = () => screen.getByTestId('strip-readout').textContent;
    expect(readout()).toContain('13 of 120');
    list.focus();
    await user.keyboard('{ArrowRight}');
    expect(readout()).toContain('14 of 120');
    await user.keyboard('{ArrowDown}');
    expect(readout()).toContain('64 of 120');
    await user.keyboard('{Home}');
    expect(readout()).toContain('51 of 120');
    await user.keyboard('{End}');
    expect(readout()).toContain('100 of 120');
    await user.keyboard('{ArrowUp}{ArrowLeft}');
    expect(readout()).toContain('49 of 120');
    expect(list).toHaveAttribute('aria-activedescendant', screen.getByRole('option', { selected: true }).id);
  });

  it('opens the frame that is read by Enter', async () => {
    const user = userEvent.setup();
    strip(batch(20));
    const opened = vi.fn();
    screen.getByRole('link', { name: 'F13' }).addEventListener('click', (event) => {
      event.preventDefault();
      opened();
    });
    expect(screen.getByRole('link', { name: 'F13' })).toHaveAttribute('href', '/frames/13');
    screen.getByRole('listbox').focus();
    await user.keyboard('{Enter}');
    expect(opened).toHaveBeenCalledOnce();
  });

  it('walks only over the verdict that was chosen in the legend', async () => {
    const user = userEvent.setup();
    strip([frame(0, 1.2), frame(1, 0.5), frame(2, 0.6), frame(3, 1.1), frame(4, 0.7)]);
    const over = within(screen.getByRole('group', { name: 'Frames by verdict' })).getByRole('button', { name: '2 over' });
    await user.click(over);
    expect(over).toHaveAttribute('aria-pressed', 'true');
    screen.getByRole('listbox').focus();
    await user.keyboard('{ArrowRight}');
    expect(screen.getByTestId('strip-readout')).toHaveTextContent('4 of 5F4');
    await user.keyboard('{ArrowRight}');
    expect(screen.getByTestId('strip-readout')).toHaveTextContent('4 of 5F4');
  });

  it('keeps names of groups apart and out of the tallies, however short the groups are', () => {
    const frames = Array.from({ length: 50 }, (_, i) => frame(i, 0.5, { group: `Depot ${Math.floor(i / 3)}` }));
    render(<Strip frames={frames} nearLimit={0.9} />);
    const names = [...document.querySelectorAll('.strip-group')].map((text) => ({
      from: Number(text.getAttribute('x')),
      // a condensed letter of this size is some 5 px wide
      to: Number(text.getAttribute('x')) + (text.textContent?.length ?? 0) * 5,
    }));
    expect(names.length).toBeGreaterThan(5);
    names.slice(1).forEach(({ from }, i) => expect(from).toBeGreaterThan(names[i]!.to + 6));
    expect(names.at(-1)!.to).toBeLessThan(884 - 50);
  });

  it('tallies each row and writes a group where it begins', () => {
    const { container } = strip(
      Array.from({ length: 60 }, (_, i) => frame(i, i < 3 ? 1.1 : 0.5, { group: i < 20 ? 'D01' : 'D02' })),
    );
    const rows = container.querySelectorAll('.strip-row');
    expect(rows).toHaveLength(2);
    expect(rows[0]!.querySelector('.strip-tally-over')).toHaveTextContent('3');
    expect(rows[1]!.querySelector('.strip-tally-over')).toBeNull();
    expect([...rows[0]!.querySelectorAll('.strip-group')].map((text) => text.textContent)).toEqual(['D01', 'D02']);
  });

  it('shows a run: cells done, outlined in hand, a tick where one waits; only the done ones are counted', () => {
    const frames = [
      frame(0, 0.5),
      { id: 'F2', verdict: null, ratio: null, state: 'in hand' as const },
      { id: 'F3', verdict: null, ratio: null, state: 'waiting' as const },
    ];
    const { container } = strip(frames);
    expect(container.querySelectorAll('.cell-in-hand rect')).toHaveLength(1);
    expect(container.querySelectorAll('.cell-waiting .cell-tick')).toHaveLength(1);
    expect(countVerdicts(frames)).toEqual({ over: 0, near: 0, within: 1, 'not checked': 0 });
    expect(screen.getByRole('option', { name: 'F3, waiting' })).toBeInTheDocument();
  });

  it('draws a thousand frames at once, and above that only the rows in sight', () => {
    const { container, unmount } = strip(batch(1000));
    expect(container.querySelectorAll('[role="option"]')).toHaveLength(1000);
    unmount();
    const long = strip(batch(20_000)).container;
    expect(long.querySelectorAll('.strip-row').length).toBeLessThan(60);
  });

  it('reads the cell under the pointer', () => {
    strip(batch(60));
    const row = document.querySelector('.strip-row')!;
    const layout = layOutStrip(60, 884);
    row.getBoundingClientRect = () => ({
      left: 0,
      top: 0,
      width: 884,
      height: 61,
      right: 884,
      bottom: 61,
      x: 0,
      y: 0,
      toJSON: () => '',
    });
    fireEvent.pointerMove(row, { clientX: columnX(layout, 21) + 2, clientY: 30, pointerType: 'mouse' });
    expect(screen.getByTestId('strip-readout')).toHaveTextContent('22 of 60');
  });
});

describe('the layout of the strip', () => {
  it('puts a thousand frames in twenty rows of fifty within 500 px', () => {
    const layout = layOutStrip(1000, 884);
    expect(layout.columns).toBe(50);
    expect(20 * layout.rowPitch).toBeLessThanOrEqual(500);
  });

  it('puts twenty-five in a row on a phone', () => {
    expect(layOutStrip(240, 358).columns).toBe(25);
  });

  it('finds the column it drew', () => {
    const layout = layOutStrip(240, 884);
    for (let column = 0; column < 50; column++) expect(columnAt(layout, columnX(layout, column) + layout.cell / 2)).toBe(column);
  });

  it('gives a height in proportion to the ratio', () => {
    expect(cellHeight(1, 50)).toBe(40);
    expect(cellHeight(0.5, 50)).toBe(20);
    expect(cellHeight(9, 50)).toBe(50);
    expect(cellHeight(-1, 50)).toBe(0);
  });
});
