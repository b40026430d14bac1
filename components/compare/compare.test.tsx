import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { Verdict } from '@/lib/results/result';
import { ChangeStrip, type ChangeCell } from './change-strip';
import { MovedTable, type MovedContext } from './moved-table';

const push = vi.fn();
vi.mock('next/navigation', () => ({ useRouter: () => ({ push }) }));
beforeEach(() => push.mockClear());

const at = (verdict: Verdict, ratio: number | null) => ({ verdict, ratio });
const cells: readonly ChangeCell[] = [
  { id: 'D1', before: at('within', 0.5), after: at('within', 0.5), carried: true },
  { id: 'D2', before: at('near', 0.997), after: at('over', 1.003), carried: false },
  { id: 'D3', before: at('within', 0.5), after: at('not checked', null), carried: false },
  { id: 'D4', before: null, after: at('within', 0.4), carried: false },
  { id: 'D5', before: at('within', 0.6), after: null, carried: false },
];
const letters = { before: 'A', after: 'B' };

describe('the strip of changes', () => {
  const show = () => render(<ChangeStrip cells={cells} letters={letters} nearLimit={0.9} by={0.01} hrefPattern="/frames/{n}" />);

  it('reads first what became over, in words and never rounded across 1.00', () => {
    show();
    expect(screen.getByRole('slider')).toHaveAttribute('aria-valuetext', 'D2, 1.00 → 1.01, became over');
  });

  it('is read by keys, opens a frame by Enter, and has a word for every way to move', async () => {
    show();
    const strip = screen.getByRole('slider');
    strip.focus();
    await userEvent.keyboard('{Enter}');
    expect(push).toHaveBeenCalledWith('/frames/2');
    await userEvent.keyboard('{PageDown}');
    expect(strip).toHaveAttribute('aria-valuetext', 'D3, 0.50 → –, became not checked');
    await userEvent.keyboard('{ArrowRight}');
    expect(strip).toHaveAttribute('aria-valuetext', 'D4, only in B');
    await userEvent.keyboard('{End}');
    expect(strip).toHaveAttribute('aria-valuetext', 'D5, only in A');
    push.mockClear();
    await userEvent.keyboard('{Enter}');
    expect(push).not.toHaveBeenCalled();
    await userEvent.keyboard('{Home}');
    expect(strip).toHaveAttribute('aria-valuetext', 'D1, carried over, within 0.50');
  });

  it('draws each way to move by a shape of its own', () => {
    const { container } = show();
    for (const look of ['same', 'over', 'unchecked', 'added', 'gone'])
      expect(container.querySelector(`.change-${look}`), look).not.toBeNull();
    expect(container.querySelector('.change-up')).toBeNull();
  });
});

describe('rows of what moved', () => {
  const of: MovedContext = { letters, nearLimits: { before: 0.9, after: 0.9 }, units: 'metric', frameHref: (side, index) => `/${letters[side]}/${index + 1}` }; // prettier-ignore

  it('say of a reaction its range before and after in the batch’s unit', () => {
    const row = { frame: 'D1', index: 0, node: 'A', direction: 'Fx' as const, before: { min: -1e3, max: 2e3 }, after: { min: -1e3, max: 5e3 }, change: 3e3, share: 0.25 }; // prettier-ignore
    render(<MovedTable page={{ list: 'reactions', rows: [row] }} of={of} />);
    expect(screen.getByRole('row', { name: 'D1 A Fx kN −1.00 … 2.00 −1.00 … 5.00 +3.00 25.0 %' })).toBeInTheDocument();
  });

  it('say of a changed input what it was and is, and how many more rows it is of', () => {
    render(<MovedTable page={{ list: 'inputs', rows: [{ sheet: 'Members', what: 'section', before: 'IPE 300', after: null, cells: 20, where: ['D1, AB', 'D2, AB'] }] }} of={of} />); // prettier-ignore
    const row = screen.getByRole('row', { name: /D1, AB; D2, AB and 18 more/ });
    expect(within(row).getByText('IPE 300').tagName).toBe('S');
    expect(within(row).getByText('(none)')).toBeInTheDocument();
  });

  it('say so where there is none', () => {
    render(<MovedTable page={{ list: 'members', rows: [] }} of={of} />);
    expect(screen.getByText('None.')).toBeInTheDocument();
  });
});
