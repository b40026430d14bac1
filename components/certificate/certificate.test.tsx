import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { certificateLines } from '@/lib/analysis/certificate-lines';
import { Certificate } from './certificate';

const hash = 'a'.repeat(64);
const lines = certificateLines({
  residual: 3.14e-15, equilibrium: 2e-7, condition: 4e4, digits: 5.97, second: null, secondReason: 'too large',
}); // prettier-ignore

describe('the certificate of a frame', () => {
  it('gives each item its figure, its tolerance and its outcome, and rounds no figure over its tolerance', () => {
    render(<Certificate lines={lines} engine="engine 1" inputHash={hash} frameHash={null} settings={[]} />);
    const items = screen.getAllByRole('listitem').map((item) => item.textContent);
    expect(items[0]).toMatch(/^1The equations are met3\.1 · 10⁻¹⁵, at most 10⁻¹⁰passed/);
    expect(items[1]).toMatch(/^1Loads and reactions balance2\.0 · 10⁻⁷, at most 10⁻⁸outside/);
    expect(items[2]).toMatch(/^2Digits left5\.9, at least 6outside/);
    expect(items[3]).toMatch(
      /^3Two analyses agreeat most 10⁻⁶not made.*Not made: it is made only by choice above 300 unknowns\.$/,
    );
    expect(items[4]).toContain('engine 1');
  });

  it('gives the input’s hash whole, to be copied, and every setting with its source', async () => {
    const user = userEvent.setup();
    const settings = [{ name: 'analysis', value: 'second order', source: 'changed on screen by Ana Lyst' }];
    render(<Certificate lines={[]} engine={null} inputHash={hash} frameHash={null} settings={settings} />);
    await user.click(screen.getByRole('button', { name: 'Copy the input’s hash' }));
    expect(await navigator.clipboard.readText()).toBe(hash);
    expect(screen.getByRole('row', { name: 'analysis second order changed on screen by Ana Lyst' })).toBeInTheDocument();
  });
});
