import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { CellFragment } from './cell-fragment';
import { DropZone } from './drop-zone';
import type { ProblemLine } from './intake-data';
import { ProblemList } from './problem-list';
import { RunWhatIsGood } from './run-what-is-good';
import { WhatWasRead } from './what-was-read';

const file = (name: string) => new File(['x'], name);
const problem = (id: string, more: Partial<ProblemLine> = {}): ProblemLine => ({
  id, severity: 'error', code: 'unknown-section', sheet: 'Members', file: null, cell: 'E412', found: 'IPE 33O', message: 'no such section.', frames: ['D06-03'], stopsAll: false, ...more,
}); // prettier-ignore

describe('bringing sheets in', () => {
  it('takes several files dropped, or chosen by keyboard', async () => {
    const user = userEvent.setup();
    const taken = vi.fn();
    const { container } = render(<DropZone onFiles={taken} />);
    fireEvent.drop(container.firstChild!, { dataTransfer: { files: [file('nodes.csv'), file('members.csv')] } });
    expect(taken.mock.lastCall?.[0].map((one: File) => one.name)).toEqual(['nodes.csv', 'members.csv']);
    await user.upload(screen.getByLabelText('Choose files'), [file('a.csv')]);
    expect(taken.mock.lastCall?.[0].map((one: File) => one.name)).toEqual(['a.csv']);
    expect(screen.getByLabelText('Choose files')).toHaveAttribute('multiple');
  });

  it('takes nothing while files are on their way, and says how far they are', () => {
    const taken = vi.fn();
    const { container } = render(<DropZone onFiles={taken} busy="sending frames.xlsx, 41 %" progress={0.41} />);
    fireEvent.drop(container.firstChild!, { dataTransfer: { files: [file('a.csv')] } });
    expect(taken).not.toHaveBeenCalled();
    expect(screen.getByRole('status')).toHaveTextContent('sending frames.xlsx, 41 %');
    expect(screen.getByRole('progressbar')).toHaveAttribute('aria-valuenow', '41');
  });

  it('lists problems by cell with what was found and the frames they touch', async () => {
    const user = userEvent.setup();
    const chosen = vi.fn();
    const many = problem('2', { found: null, frames: ['F1', 'F2', 'F3', 'F4', 'F5'], severity: 'warning' });
    render(<ProblemList problems={[problem('1'), many, problem('3', { stopsAll: true })]} selected="1" onSelect={chosen} />);
    expect(screen.getByRole('row', { name: /error Members E412 IPE 33O no such section. D06-03/ })).toHaveAttribute(
      'aria-selected',
      'true',
    );
    expect(
      screen.getByRole('row', { name: /warning Members E412 \(blank\) no such section. F1, F2 and 3 more/ }),
    ).toBeInTheDocument();
    expect(screen.getByRole('row', { name: /all$/ })).toBeInTheDocument();
    screen.getByRole('region').focus();
    await user.keyboard('{ArrowDown}');
    expect(chosen).toHaveBeenCalledWith('2');
  });

  it('rings the very cell in a piece of the sheet', () => {
    const rows = [411, 412].map((row) => ({ row, cells: ['D06-03', row === 412 ? 'IPE 33O' : 'IPE 330'] }));
    render(
      <CellFragment
        note="no such section."
        fragment={{
          sheet: 'Members',
          columns: ['A', 'E'],
          heading: { row: 1, cells: ['frame', 'section'] },
          rows,
          cell: 'E412',
          row: 412,
        }}
      />,
    );
    const ringed = document.querySelectorAll('.fragment-ring');
    expect(ringed).toHaveLength(1);
    expect(ringed[0]).toHaveTextContent('IPE 33O');
    expect(screen.getByText('section')).toBeInTheDocument();
    expect(screen.getByText('E412:')).toBeInTheDocument();
  });

  it('says what running now does, in one sentence', () => {
    const { rerender } = render(
      <RunWhatIsGood letter="A" good={232} stopped={8}>
        {null}
      </RunWhatIsGood>,
    );
    expect(
      screen.getByText(/232 frames run now as revision A. The 8 stopped frames stay in the batch, not checked/),
    ).toBeInTheDocument();
    rerender(
      <RunWhatIsGood letter="A" good={1} stopped={0}>
        {null}
      </RunWhatIsGood>,
    );
    expect(screen.getByRole('heading')).toHaveTextContent('Every frame can run');
    rerender(
      <RunWhatIsGood letter="A" good={0} stopped={3}>
        {null}
      </RunWhatIsGood>,
    );
    expect(screen.getByRole('heading')).toHaveTextContent('No frame can run yet');
  });

  it('shows what was read of each sheet, and which it does not know', () => {
    const base = { file: null, rows: 960, headings: 9, headingsKnown: 8, errors: 2, warnings: 1, notes: 0 };
    render(
      <WhatWasRead
        summary="frames.xlsx"
        sheets={[
          { ...base, name: 'Members', known: 'Members' },
          { ...base, name: 'Notes from site', known: null, errors: 0, warnings: 0 },
        ]}
      />,
    );
    expect(screen.getByRole('row', { name: /Members 960 8 of 9 error 2\s*warning 1/ })).toBeInTheDocument();
    expect(screen.getByText('not a sheet it knows')).toBeInTheDocument();
  });
});
