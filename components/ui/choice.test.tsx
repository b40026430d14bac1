import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { Choice } from './choice';

const options = [
  { value: 'a', label: 'beam' },
  { value: 'b', label: 'column' },
  { value: 'c', label: 'rafter', count: 480 },
];

describe('a choice in a sentence', () => {
  it('opens by the down key, moves by arrows, takes by Enter and gives the focus back', async () => {
    const user = userEvent.setup();
    const taken = vi.fn();
    render(<Choice label="role" options={options} value={['a']} onChange={taken} />);
    const button = screen.getByRole('button', { name: 'role: beam' });
    button.focus();
    await user.keyboard('{ArrowDown}');
    const list = screen.getByRole('listbox', { name: 'role' });
    expect(list).toHaveFocus();
    await user.keyboard('{ArrowDown}{ArrowDown}');
    expect(list).toHaveAttribute('aria-activedescendant', screen.getByRole('option', { name: /rafter/ }).id);
    await user.keyboard('{Enter}');
    expect(taken).toHaveBeenCalledWith(['c']);
    expect(screen.queryByRole('listbox')).toBeNull();
    expect(button).toHaveFocus();
  });

  it('finds an option by its first letters', async () => {
    const user = userEvent.setup();
    const taken = vi.fn();
    render(<Choice label="role" options={options} value={[]} onChange={taken} />);
    await user.click(screen.getByRole('button'));
    await user.keyboard('ra{Enter}');
    expect(taken).toHaveBeenCalledWith(['c']);
  });

  it('takes several and stays open, closes on Escape without taking', async () => {
    const user = userEvent.setup();
    const taken = vi.fn();
    render(<Choice label="role" several options={options} value={['a']} onChange={taken} />);
    await user.click(screen.getByRole('button'));
    await user.click(screen.getByRole('option', { name: 'column' }));
    expect(taken).toHaveBeenCalledWith(['a', 'b']);
    await user.click(screen.getByRole('option', { name: 'beam' }));
    expect(taken).toHaveBeenLastCalledWith([]);
    await user.keyboard('{Escape}');
    expect(screen.queryByRole('listbox')).toBeNull();
    expect(taken).toHaveBeenCalledTimes(2);
  });

  it('says that values are being read', async () => {
    const user = userEvent.setup();
    const opened = vi.fn();
    render(<Choice label="section" options={[]} value={[]} loading onOpen={opened} onChange={() => {}} />);
    await user.click(screen.getByRole('button'));
    expect(opened).toHaveBeenCalledOnce();
    expect(screen.getByText('reading the values')).toBeInTheDocument();
  });
});
