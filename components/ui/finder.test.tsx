import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { Finder, type FinderOption } from './finder';

/** Two cases that are not applicable, and eighty combinations in both directions. */
const options: FinderOption[] = [
  ...['dead', 'wind'].map((name) => ({ value: name, label: name, group: 'Load cases', unavailable: 'not applicable' })),
  ...Array.from({ length: 80 }, (_, i) => `C${i + 1}`).flatMap((name) =>
    ['→', '←'].map((arrow) => ({
      value: `${name} ${arrow}`,
      label: `${name} ${arrow}`,
      group: 'Strength',
      note: 'second order',
    })),
  ),
];
const button = () => screen.getByRole('button', { name: /^Load case or combination: / });

function show(value: string) {
  const chosen = vi.fn();
  render(<Finder label="Load case or combination" options={options} value={value} onChange={chosen} />);
  return chosen;
}

describe('finding one of many', () => {
  it('opens at the one taken, and narrows to what is typed', async () => {
    const user = userEvent.setup();
    const chosen = show('C3 →');
    await user.click(button());
    expect(screen.getAllByRole('option')).toHaveLength(162);
    const field = screen.getByRole('combobox');
    expect(field).toHaveFocus();
    expect(document.getElementById(field.getAttribute('aria-activedescendant')!)).toHaveTextContent('C3 →');
    await user.keyboard('c77 ←');
    expect(screen.getAllByRole('option').map((one) => one.textContent)).toEqual(['C77 ← second order']);
    expect(screen.getByRole('status')).toHaveTextContent('1 of 162');
    await user.keyboard('{Enter}');
    expect(chosen).toHaveBeenCalledExactlyOnceWith('C77 ←');
    expect(screen.queryByRole('listbox')).toBeNull();
    expect(button()).toHaveFocus();
  });

  it('moves by arrow keys and leaves things as they were on Escape', async () => {
    const user = userEvent.setup();
    const chosen = show('C1 →');
    button().focus();
    await user.keyboard('{ArrowDown}{ArrowDown}{ArrowDown}{Escape}');
    expect(chosen).not.toHaveBeenCalled();
    await user.keyboard('{ArrowDown}{ArrowDown}{Enter}');
    expect(chosen).toHaveBeenCalledExactlyOnceWith('C1 ←');
  });

  it('goes to the one before and after, past what can’t be taken', async () => {
    const user = userEvent.setup();
    const chosen = show('C1 →');
    expect(screen.getByRole('button', { name: /^One before/ })).toBeDisabled();
    await user.click(screen.getByRole('button', { name: 'One after, C1 ←' }));
    expect(chosen).toHaveBeenCalledExactlyOnceWith('C1 ←');
  });

  it('lists what can’t be taken with the reason, and doesn’t take it', async () => {
    const user = userEvent.setup();
    const chosen = show('C1 →');
    await user.click(button());
    const cases = within(screen.getByRole('group', { name: 'Load cases' })).getAllByRole('option');
    expect(cases[0]).toHaveAttribute('aria-disabled', 'true');
    expect(cases[0]).toHaveTextContent('not applicable');
    await user.click(cases[0]!);
    expect(chosen).not.toHaveBeenCalled();
  });

  it('says so where nothing has the words in its name', async () => {
    const user = userEvent.setup();
    show('C1 →');
    await user.click(button());
    await user.keyboard('snow');
    expect(screen.getByRole('status')).toHaveTextContent('nothing has “snow” in its name');
  });
});
