import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { NumberTable } from './number-table';
import { decimalsFor, tableText } from './number-text';
import type { NumberTable as NumberTableData } from './numbers-data';

const k: NumberTableData = {
  id: 'k',
  title: 'k, local axes',
  corner: 'force on, for unit of',
  columns: [
    { label: 'u₁', unit: 'm' },
    { label: 'v₁', unit: 'm' },
  ],
  rows: [
    { label: 'X₁', unit: 'kN', cells: [188335.00000000003, 0] },
    { label: 'Y₁', unit: 'kN', cells: [0, -974.8666666666667] },
  ],
};

describe('a matrix that a checker follows', () => {
  it('shows decimal points under one another, a true zero as 0, units beside forces and under movements', () => {
    render(<NumberTable table={k} />);
    const table = screen.getByRole('table', { name: 'k, local axes' });
    expect(
      within(table)
        .getAllByRole('cell')
        .map((cell) => cell.textContent),
    ).toEqual(['188335.0', '0', '0', '−974.9']);
    expect(
      within(table)
        .getAllByRole('rowheader')
        .map((head) => head.textContent),
    ).toEqual(['X₁ kN', 'Y₁ kN']);
    expect(
      within(table)
        .getAllByRole('columnheader')
        .map((head) => head.textContent),
    ).toEqual(['force on, for unit of', 'u₁m', 'v₁m']);
  });

  it('shows figures of several kinds with six figures each, and no idle zeros', () => {
    const mixed = { ...k, mixed: true, columns: [{ label: 'value' }], rows: [188335.00000000003, 0.8, 144, 0.000117669123].map((value) => ({ label: 'x', cells: [value] })) }; // prettier-ignore
    render(<NumberTable table={mixed} />);
    expect(screen.getAllByRole('cell').map((cell) => cell.textContent)).toEqual(['188335', '0.8', '144', '0.000117669']);
  });

  it('copies every digit as tab-separated text with its headings', async () => {
    const user = userEvent.setup();
    render(<NumberTable table={k} />);
    await user.click(screen.getByRole('button', { name: 'Copy k, local axes' }));
    expect(await navigator.clipboard.readText()).toBe(
      'k, local axes: force on, for unit of\tu₁ [m]\tv₁ [m]\nX₁ [kN]\t188335.00000000003\t0\nY₁ [kN]\t0\t-974.8666666666667',
    );
    expect(screen.getByRole('status')).toHaveTextContent('copied');
  });

  it('lets no text that is copied be taken for a formula', () => {
    const text = tableText({ ...k, columns: [{ label: 'what', words: true }], rows: [{ label: '=A1', cells: ['+cmd'] }] });
    expect(text.split('\n')[1]).toBe("'=A1\t'+cmd");
  });

  it('keeps six figures of the largest and four of the smallest that matters, and no more than there are', () => {
    expect(decimalsFor([188335.12345, 974.8666])).toBe(1);
    expect(decimalsFor([0.986394123456, 0.164399])).toBe(6);
    expect(decimalsFor([4, 15, 6])).toBe(0);
    expect(decimalsFor([1.35, -0.7])).toBe(2);
    // rounding of a large figure is no figure of its own
    expect(decimalsFor([1000.5, 3e-13])).toBe(1);
    expect(decimalsFor([])).toBe(0);
  });
});
