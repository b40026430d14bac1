import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { tables, type Row, type RowPage, type View } from '@/lib/tables/view';
import { ResultTable } from './result-table';
import { sentenceOf } from './table-words';

const view: View = {
  table: 'members',
  filters: [
    { column: 'role', op: 'in', values: ['rafter'] },
    { column: 'ratio', op: 'range', min: 0.8, max: null },
  ],
  sort: null,
  columns: null,
};
const row = (id: string, ratio: number, verdict: string): Row => ({
  id,
  frameIndex: Number(id),
  cells: {
    frame: `D${id}`,
    member: 'BC',
    role: 'rafter',
    section: 'IPE 360',
    length: 9.4,
    N: -74_600,
    M: -158_700,
    ratio,
    verdict,
    check: 'normal stress',
  },
});
const page: RowPage = {
  rows: [row('1', 1.003, 'over'), row('2', 0.85, 'within')],
  matching: 80,
  total: 960,
  next: 'n1',
  previous: null,
  totals: { length: 702.1 },
};
const show = (more: Partial<Parameters<typeof ResultTable>[0]> = {}) => {
  const calls = { onView: vi.fn(), onPage: vi.fn(), onOpen: vi.fn() };
  const { onView, onPage } = calls;
  render(
    <ResultTable
      view={view}
      columns={tables.members}
      page={page}
      units="metric"
      nearLimit={0.9}
      facets={{
        role: [
          { value: 'rafter', label: 'rafter', count: 2 },
          { value: 'column', label: 'column', count: 5 },
        ],
      }}
      onView={onView}
      onPage={onPage}
      hrefOf={(one) => `/frames/${one.frameIndex}`}
      exports={[{ label: 'CSV', href: '/x.csv' }]}
      {...more}
    />,
  );
  return calls;
};

describe('the sentence of a view', () => {
  it('says filters, numbers with their units, and the order', () => {
    expect(sentenceOf(view, tables.members, 'metric')).toBe(
      'Members where role is rafter and ratio is at least 0.80, sorted by sheet order',
    );
    const more: View = {
      table: 'reactions',
      filters: [{ column: 'kind', op: 'in', values: ['case', 'combination'] }],
      sort: { column: 'fy', descending: true },
      columns: null,
    };
    expect(sentenceOf(more, tables.reactions, 'metric')).toBe(
      'Reactions where kind is case or combination, sorted by Fy, highest first',
    );
    const parameter: View = {
      table: 'frames',
      filters: [{ column: 'p:span', op: 'range', min: 6.096, max: null }],
      sort: null,
      columns: null,
    };
    const span = { key: 'p:span', label: 'Span', kind: 'number', quantity: 'length', filter: true } as const;
    expect(sentenceOf(parameter, [...tables.frames, span], 'us')).toBe(
      'Frames where span is at least 20 ft, sorted by sheet order',
    );
  });
});

describe('a result table', () => {
  it('is named by its sentence and puts units in the head, never a bare number', () => {
    show();
    const table = screen.getByRole('table', { name: /^Members where role is rafter and ratio is at least 0.80/ });
    const heads = within(table)
      .getAllByRole('columnheader')
      .map((head) => head.textContent);
    expect(heads).toContain('NkN');
    expect(heads).toContain('MkN·m');
    expect(heads).toContain('Lengthm');
    expect(within(table).getAllByText('−158.7')).toHaveLength(2);
    expect(within(table).getByText('1.01')).toBeInTheDocument();
    expect(within(table).getByText('over')).toBeInTheDocument();
  });

  it('shows a check’s own unit beside its value', () => {
    const cells = {
      frame: 'D1',
      subject: 'BC',
      check: 'deflection',
      value: 0.0123,
      limit: 0.037,
      ratio: 0.33,
      verdict: 'within',
    };
    show({
      view: { table: 'checks', filters: [], sort: null, columns: null },
      columns: tables.checks,
      page: { ...page, rows: [{ id: '1', frameIndex: 0, cells }], totals: {} },
    });
    expect(screen.getByRole('cell', { name: '12.3 mm' })).toBeInTheDocument();
  });

  it('sorts numbers from the highest, then the lowest, then in sheet order again', async () => {
    const user = userEvent.setup();
    const { onView } = show();
    await user.click(screen.getByRole('button', { name: /^Ratio/ }));
    expect(onView).toHaveBeenLastCalledWith({ ...view, sort: { column: 'ratio', descending: true } });
  });

  it('goes back to sheet order on the third press, and says how it is sorted', async () => {
    const user = userEvent.setup();
    const { onView } = show({ view: { ...view, sort: { column: 'ratio', descending: false } } });
    expect(screen.getByRole('columnheader', { name: /^Ratio/ })).toHaveAttribute('aria-sort', 'ascending');
    await user.click(screen.getByRole('button', { name: /^Ratio/ }));
    expect(onView).toHaveBeenLastCalledWith({ ...view, sort: null });
  });

  it('takes more values of a filter from the list in place', async () => {
    const user = userEvent.setup();
    const { onView } = show();
    await user.click(screen.getByRole('button', { name: 'role, values: rafter' }));
    await user.click(screen.getByRole('option', { name: /column/ }));
    expect(onView).toHaveBeenLastCalledWith({
      ...view,
      filters: [{ column: 'role', op: 'in', values: ['rafter', 'column'] }, view.filters[1]],
    });
  });

  it('takes a number in the unit on screen and hands on SI', async () => {
    const user = userEvent.setup();
    const length = { key: 'length', label: 'Length', kind: 'number', quantity: 'length', filter: true } as const;
    const { onView } = show({
      units: 'us',
      columns: [...tables.members.filter((one) => one.key !== 'length'), length],
      view: { ...view, filters: [] },
    });
    await user.click(screen.getByRole('button', { name: /^add a filter/ }));
    await user.click(screen.getByRole('option', { name: 'length' }));
    await user.type(screen.getByRole('textbox', { name: 'length at least' }), '20{Enter}');
    const given = onView.mock.lastCall?.[0] as View;
    expect(given.filters[0]).toMatchObject({ column: 'length', op: 'range', max: null });
    expect((given.filters[0] as { min: number }).min).toBeCloseTo(6.096, 12);
  });

  it('marks what is no number and hands nothing on', async () => {
    const user = userEvent.setup();
    const { onView } = show();
    const field = screen.getByRole('textbox', { name: 'ratio at least' });
    await user.clear(field);
    await user.type(field, 'big{Enter}');
    expect(field).toBeInvalid();
    expect(onView).not.toHaveBeenCalled();
  });

  it('takes a filter away', async () => {
    const user = userEvent.setup();
    const { onView } = show();
    await user.click(screen.getByRole('button', { name: 'Take away the filter on role' }));
    expect(onView).toHaveBeenLastCalledWith({ ...view, filters: [view.filters[1]] });
  });

  it('chooses columns', async () => {
    const user = userEvent.setup();
    const { onView } = show();
    await user.click(screen.getByRole('button', { name: /^columns:/ }));
    await user.click(screen.getByRole('option', { name: 'N' }));
    const given = onView.mock.lastCall?.[0] as View;
    expect(given.columns).not.toContain('N');
    expect(given.columns).toContain('M');
  });

  it('chooses rows by arrow keys and opens by Enter', async () => {
    const user = userEvent.setup();
    const onOpen = vi.fn();
    show({ onOpen });
    screen.getByRole('region').focus();
    await user.keyboard('{ArrowDown}{ArrowDown}');
    expect(screen.getAllByRole('row', { selected: true })).toHaveLength(1);
    await user.keyboard('{Enter}');
    expect(onOpen).toHaveBeenCalledWith(page.rows[1]);
  });

  it('counts what fits, goes on by the page’s own cursor, and links the export', async () => {
    const user = userEvent.setup();
    const { onPage } = show();
    expect(screen.getByText(/of 960 members, 2 shown/)).toBeInTheDocument();
    expect(screen.getByRole('button', { name: /previous rows/ })).toBeDisabled();
    await user.click(screen.getByRole('button', { name: /next rows/ }));
    expect(onPage).toHaveBeenCalledWith({ after: 'n1' });
    expect(screen.getByRole('link', { name: 'CSV' })).toHaveAttribute('href', '/x.csv');
    expect(screen.getByText('702.10')).toBeInTheDocument();
  });

  it('says when nothing fits, and offers the way back', async () => {
    const user = userEvent.setup();
    const { onView } = show({ page: { ...page, rows: [], matching: 0, next: null, totals: {} } });
    expect(screen.getByText(/None of 960 members fits this sentence/)).toBeInTheDocument();
    await user.click(screen.getByRole('button', { name: 'Take away the last filter' }));
    expect(onView).toHaveBeenLastCalledWith({ ...view, filters: [view.filters[0]] });
  });

  it('says that it is reading, and what went wrong', () => {
    show({ page: undefined, error: 'The server did not answer. Try again.' });
    expect(screen.getByRole('alert')).toHaveTextContent('The server did not answer. Try again.');
  });
});
