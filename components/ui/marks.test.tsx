import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Field } from './field';
import { LevelBar } from './level-bar';
import { Mark } from './mark';
import { QuantityText } from './quantity-text';
import { RatioText } from './ratio-text';
import { SeverityMark } from './severity-mark';
import { VerdictMark } from './verdict-mark';

describe('small marks', () => {
  it('never prints a ratio across its boundary', () => {
    const { container } = render(
      <>
        <RatioText ratio={1.003} verdict="over" nearLimit={0.9} /> <RatioText ratio={0.997} verdict="near" nearLimit={0.9} />{' '}
        <RatioText ratio={0.897} verdict="within" nearLimit={0.9} />{' '}
        <RatioText ratio={null} verdict="not checked" nearLimit={0.9} />
      </>,
    );
    expect(container.textContent).toBe('1.01 1.00 0.89 –');
  });

  it('puts the unit beside a number', () => {
    const { container } = render(<QuantityText value={-158_700} quantity="moment" units="metric" />);
    expect(container.textContent).toBe('−159 kN·m');
  });

  it('names verdicts and severities in words', () => {
    render(
      <>
        <VerdictMark verdict="not checked" word />
        <SeverityMark severity="error" />
      </>,
    );
    expect(screen.getByText('not checked')).toBeInTheDocument();
    expect(screen.getByText('error')).toBeInTheDocument();
  });

  it('gives a near verdict and a warning different shapes', () => {
    const near = render(<VerdictMark verdict="near" />).container.innerHTML;
    const warning = render(<SeverityMark severity="warning" />).container.innerHTML;
    expect(near).toContain('rect');
    expect(warning).not.toContain('rect');
  });

  it('fills a level bar to its ratio, with the line at 1.00', () => {
    const { container } = render(<LevelBar ratio={0.5} verdict="within" width={50} />);
    expect(container.querySelector('.level-fill')?.getAttribute('width')).toBe('20');
    expect(container.querySelector('.level-one')?.getAttribute('d')).toBe('M40 0V10');
  });

  it('draws the mark twice on a page without sharing a mask', () => {
    const { container } = render(
      <>
        <Mark />
        <Mark />
      </>,
    );
    const ids = [...container.querySelectorAll('mask')].map((mask) => mask.id);
    expect(new Set(ids).size).toBe(2);
  });

  it('ties a field to its label, its unit and its error', () => {
    render(<Field label="Near limit" unit="–" error="Enter the near-limit ratio, a number between 0.5 and 1" />);
    const input = screen.getByLabelText('Near limit');
    expect(input).toBeInvalid();
    expect(input).toHaveAccessibleDescription('Enter the near-limit ratio, a number between 0.5 and 1');
  });
});
