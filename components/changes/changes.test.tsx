import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { MadeByChange } from './made-by-change';
import { SettingField, type SettingOffered } from './setting-field';
import { SettingTable } from './setting-table';

const analysis: SettingOffered = {
  setting: 'analysis',
  word: 'analysis',
  typed: 'first order',
  now: 'first order',
  help: 'Second order finds equilibrium on the deformed shape.',
  options: ['first order', 'second order'],
  hint: null,
};
const sway: SettingOffered = {
  setting: 'swayRatio',
  word: 'sway ratio',
  typed: '',
  now: 'no limit given',
  help: 'Columns may lean by their height over n.',
  options: null,
  hint: 'n of h/n, like 300, or none',
};

describe('a setting to choose', () => {
  it('offers its choices with the one that stands', async () => {
    const onChange = vi.fn();
    render(<SettingField offered={analysis} value="first order" error={null} onChange={onChange} />);
    const group = screen.getByRole('radiogroup', { name: 'analysis' });
    expect(within(group).getByRole('radio', { name: 'first order' })).toBeChecked();
    expect(screen.queryByText(/^Now:/)).toBeNull();
    await userEvent.click(within(group).getByRole('radio', { name: 'second order' }));
    expect(onChange).toHaveBeenCalledWith('second order');
  });

  it('says what stands once another is chosen, and goes back to it', async () => {
    const onChange = vi.fn();
    render(<SettingField offered={analysis} value="second order" error={null} onChange={onChange} />);
    expect(screen.getByText('Now: first order.')).toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: 'Leave analysis as it is' }));
    expect(onChange).toHaveBeenCalledWith('first order');
  });

  it('says at the field what cannot be taken, and what may be typed', () => {
    render(<SettingField offered={sway} value="tall" error="sway ratio is a number, like 300" onChange={vi.fn()} />);
    const field = screen.getByRole('textbox', { name: 'sway ratio' });
    expect(field).toBeInvalid();
    expect(field).toHaveAccessibleDescription(/sway ratio is a number, like 300.*n of h\/n/);
  });
});

describe('the settings of a revision', () => {
  it('stand each with where it comes from', () => {
    const settings = [
      { setting: 'near limit', value: '0.80', source: 'changed on screen by Ana Lyst', onScreen: true },
      { setting: 'stability', value: 'screened', source: 'default, Setup is silent', onScreen: false },
    ];
    render(<SettingTable settings={settings} />);
    expect(screen.getByRole('row', { name: 'near limit 0.80 changed on screen by Ana Lyst' })).toBeInTheDocument();
    expect(screen.getByRole('rowheader', { name: 'stability' })).toBeInTheDocument();
  });
});

describe('the head of a revision made by a change', () => {
  it('says from which, by whom, what it was and is, and why', () => {
    render(
      <MadeByChange
        letter="B"
        from={{ letter: 'A', href: '/batches/7/A' }}
        person="Ana Lyst"
        at="30 Nov, 16:42"
        reason="asked for by the checker"
        changes={[{ what: 'analysis', from: 'first order', to: 'second order' }]}
      />,
    );
    const head = screen.getByRole('region', { name: 'How revision B was made' });
    expect(head).toHaveTextContent('Revision B was made from revision A by Ana Lyst, 30 Nov, 16:42, by changing');
    expect(head).toHaveTextContent('analysis: first order → becomes second order');
    expect(head).toHaveTextContent('Why: asked for by the checker');
    expect(within(head).getByRole('link', { name: 'revision A' })).toHaveAttribute('href', '/batches/7/A');
  });
});
