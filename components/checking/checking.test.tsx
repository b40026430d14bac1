import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import type { HandChecks } from '@/lib/checking/hand-checks/hand-checks';
import { Strip } from '../strip/strip';
import { CheckList, type CheckListRow } from './check-list';
import { HandChecksShown } from './hand-checks-shown';
import { QueryThread, type Thread } from './query-thread';

const row = (number: number, more: Partial<CheckListRow> = {}): CheckListRow => ({
  number, id: `F${number}`, part: 'over', why: ['over'], verdict: 'over', ratio: 1.1, check: 'normal stress', subject: 'BC', seen: false,
  openQueries: 0, toAccept: 1, accepted: 0, ...more,
}); // prettier-ignore

describe('the frames to see', () => {
  it('stand in parts with every reason, and what is left to do with each', async () => {
    const onGo = vi.fn();
    const rows = [
      row(7, { why: ['over', 'greatest span of shed'] }),
      row(9, { seen: true, accepted: 1 }),
      row(3, { part: 'sample', verdict: 'within', ratio: 0.5, toAccept: 0, why: ['picked by hash'], seen: true }),
      row(4, { part: 'sample', verdict: 'within', ratio: 0.6, toAccept: 0, openQueries: 1, why: ['worst of sway'] }),
    ];
    render(<CheckList rows={rows} nearLimit={0.9} at={9} onGo={onGo} />);
    expect(screen.getAllByRole('heading').map((one) => one.textContent)).toEqual(['Over, all 2', 'Sample of within, 2']);
    const of = (name: RegExp) => screen.getByRole('button', { name });
    expect(of(/F7/)).toHaveTextContent(/to see.*1 to accept.*over · greatest span of shed/);
    expect(of(/F9/)).toHaveTextContent('accepted');
    expect(of(/F9/)).toHaveAttribute('aria-current', 'true');
    expect(of(/F3/)).toHaveTextContent(/seen.*picked by hash/);
    expect(of(/F4/)).toHaveTextContent(/queried, to see/);
    await userEvent.click(of(/F7/));
    expect(onGo).toHaveBeenCalledWith(7);
  });
});

describe('marks on the strip', () => {
  it('stand over their cells, are said in words, and a cell opens what the page wants', async () => {
    const onOpen = vi.fn();
    const frames = [
      { id: 'F1', verdict: 'over', ratio: 1.1, mark: 'queried' },
      { id: 'F2', verdict: 'within', ratio: 0.5 },
    ] as const;
    const { rerender } = render(<Strip frames={frames} nearLimit={0.9} initial={0} onOpen={onOpen} />);
    expect(screen.getByRole('option', { name: 'F1, over, 1.10, queried' }).querySelector('[data-mark="queried"]')).not.toBeNull();
    expect(screen.getByRole('option', { name: 'F2, within, 0.50' }).querySelector('[data-mark]')).toBeNull();
    expect(screen.getByTestId('strip-readout')).toHaveTextContent('queried');
    rerender(<Strip frames={frames} nearLimit={0.9} initial={1} onOpen={onOpen} />);
    expect(screen.getByTestId('strip-readout')).toHaveTextContent('F2');
    screen.getByRole('listbox').focus();
    await userEvent.keyboard('{Enter}');
    expect(onOpen).toHaveBeenCalledWith(1);
  });
});

describe('a query', () => {
  const thread: Thread = {
    id: 1, revision: 'A', frameId: 'F7', subject: 'BC', check: null, raisedBy: 'Cai', mine: false, inputHash: 'abcd1234',
    closed: null, messages: [{ by: 'Cai', when: '1 Dec, 09:14', text: 'Is there a haunch?' }],
  }; // prettier-ignore

  it('is answered by whoever reads it, and closed only by who raised it', async () => {
    const onSay = vi.fn().mockResolvedValue(undefined);
    const { rerender } = render(<QueryThread thread={thread} onSay={onSay} />);
    expect(screen.queryByRole('button', { name: 'Close the query' })).toBeNull();
    await userEvent.type(screen.getByLabelText('Your answer'), 'None.');
    await userEvent.click(screen.getByRole('button', { name: 'Answer' }));
    expect(onSay).toHaveBeenCalledWith({ text: 'None.', close: false });
    rerender(<QueryThread thread={{ ...thread, mine: true }} onSay={onSay} />);
    await userEvent.click(screen.getByRole('button', { name: 'Close the query' }));
    expect(onSay).toHaveBeenLastCalledWith({ text: '', close: true });
  });

  it('says who closed it, and takes nothing more', () => {
    render(<QueryThread thread={{ ...thread, closed: { by: 'Cai', when: '2 Dec, 10:00' } }} onSay={vi.fn()} />);
    expect(screen.getByText(/Closed by Cai/)).toBeVisible();
    expect(screen.queryByRole('textbox')).toBeNull();
  });

  it('keeps the words where they could not be sent', async () => {
    render(<QueryThread thread={thread} onSay={() => Promise.reject(new Error('no connection'))} />);
    await userEvent.type(screen.getByLabelText('Your answer'), 'None.');
    await userEvent.click(screen.getByRole('button', { name: 'Answer' }));
    expect(screen.getByLabelText('Your answer')).toHaveValue('None.');
  });
});

describe('checks by hand', () => {
  const zero = { H: 0, V: 0, M: 0 };
  const checks: HandChecks = {
    about: 'A',
    balance: [
      { result: 'dead', loads: { ...zero, V: -12_000 }, reactions: { ...zero, V: 12_000 }, agreement: 'agrees' },
      { result: 'wind', loads: { ...zero, H: 5000 }, reactions: { ...zero, H: -4000 }, agreement: 'differs' },
    ],
    spans: [],
    spansLeftOut: [
      { result: 'dead', member: 'AB', why: 'a point load acts on it' },
      { result: 'dead', member: 'CD', why: 'a point load acts on it' },
    ],
    sway: [],
    swayLeftOut: [{ result: null, why: 'AC braces it' }],
    none: null,
  };

  it('show both sums in the batch’s unit, and say where they differ or do not apply', () => {
    render(<HandChecksShown checks={checks} units="metric" />);
    const sums = screen.getByRole('region', { name: 'Loads as typed against reactions' });
    const wind = within(sums).getByRole('row', { name: /wind/ });
    expect(wind).toHaveTextContent('5.000');
    expect(within(wind).getByText('differs')).toBeVisible();
    expect(within(sums).getByRole('row', { name: /dead/ })).toHaveTextContent(/−12.00.*12.00.*agrees/);
    expect(screen.getByText(/AB, CD in dead: a point load acts on it/)).toBeVisible();
    expect(screen.getByText(/AC braces it/)).toBeVisible();
  });

  it('say why there are none', () => {
    render(<HandChecksShown checks={{ ...checks, none: 'The frame has no results.' }} units="metric" />);
    expect(screen.getByText(/The frame has no results/)).toBeVisible();
  });
});
