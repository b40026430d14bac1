import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { Bar } from './bar';

describe('the bar', () => {
  it('says where one is and who one is', () => {
    render(
      <Bar
        words={[
          { label: 'Projects', href: '/projects', current: true },
          { label: 'People', href: '/people' },
        ]}
        office="Grayling Street office"
        person="M. Ostrane"
        role="analyst"
      />,
    );
    expect(screen.getByRole('link', { name: 'Projects' })).toHaveAttribute('aria-current', 'page');
    expect(screen.getByRole('link', { name: 'People' })).not.toHaveAttribute('aria-current');
    expect(screen.getByText('Grayling Street office')).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'To the content' })).toHaveAttribute('href', '#content');
  });

  it('names no office and offers no keys before sign-in', () => {
    render(<Bar words={[]} office={null} person={null} />);
    expect(screen.queryByRole('button')).toBeNull();
  });

  it('shows the keys by ?', async () => {
    const user = userEvent.setup();
    let shown = false;
    HTMLDialogElement.prototype.showModal = () => {
      shown = true;
    };
    render(<Bar words={[]} office="Grayling Street office" person="M. Ostrane" />);
    await user.keyboard('?');
    expect(shown).toBe(true);
  });
});
