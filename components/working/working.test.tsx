import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Working } from './working';

describe('a working', () => {
  it('sets out formula, numbers and result, with fractions as columns and the source at the end', () => {
    render(
      <Working
        title="rafter BC, normal stress"
        reference="elastic stress"
        ratio={1.003}
        verdict="over"
        nearLimit={0.9}
        lines={[
          {
            what: 'normal stress',
            parts: [
              { kind: 'symbol', symbol: 'σ' },
              { kind: 'text', text: '=' },
              { kind: 'fraction', over: [{ kind: 'symbol', symbol: 'N' }], under: [{ kind: 'symbol', symbol: 'A' }] },
            ],
          },
          { what: 'limit', parts: [{ kind: 'result', text: '165.0', unit: 'MPa' }], source: 'Setup B6' },
        ]}
      />,
    );
    expect(screen.getByRole('region', { name: 'Working: rafter BC, normal stress' })).toBeInTheDocument();
    const fraction = document.querySelector('.w-fraction')!;
    expect(fraction.querySelector('.w-over')).toHaveTextContent('N');
    expect(fraction).toHaveTextContent('N over A');
    expect(screen.getByText('165.0 MPa').closest('b')).not.toBeNull();
    expect(screen.getByText('Setup B6')).toBeInTheDocument();
    expect(screen.getByText('1.01')).toBeInTheDocument();
    expect(document.querySelector('.verdict-over')).toHaveTextContent('over');
  });

  it('gives the reason where a check was not made', () => {
    render(<Working title="AB, shear stress" ratio={null} verdict="not checked" nearLimit={0.9} reason="needs Av" lines={[]} />);
    expect(screen.getByText(/needs Av/)).toBeInTheDocument();
  });

  it('parts a section’s name from its first property, and never breaks a property from its figure', () => {
    const lines = [
      {
        what: 'section',
        parts: [
          { kind: 'text', text: 'HE 200 A' },
          { kind: 'symbol', symbol: 'A' },
          { kind: 'text', text: '=' },
          { kind: 'number', text: '53.8', unit: 'cm²' },
        ],
      },
      {
        what: 'reference',
        parts: [{ kind: 'text', text: 'elastic stress, σ_v ≤ f·fy' }],
      },
      {
        what: 'limit',
        parts: [
          { kind: 'symbol', symbol: 'f' },
          { kind: 'symbol', symbol: 'f', sub: 'y' },
          { kind: 'text', text: '=' },
          { kind: 'number', text: '0.6000' },
          { kind: 'text', text: '·' },
          { kind: 'number', text: '275.0', unit: 'MPa' },
        ],
      },
      {
        what: 'equivalent stress',
        parts: [
          { kind: 'symbol', symbol: 'σ', sup: '2' },
          { kind: 'text', text: '+ 3' },
          { kind: 'symbol', symbol: 'τ', sup: '2' },
        ],
      },
    ] as const;
    render(<Working title="AB" lines={lines} ratio={0.5} verdict="within" nearLimit={0.9} />);
    expect(screen.getByText('HE 200 A,', { exact: false }).textContent).toBe('HE 200 A, A = 53.8 cm²');
    expect(document.querySelector('.w-whole')?.textContent).toBe('A = 53.8 cm²');
    expect(document.querySelectorAll('.w-whole')).toHaveLength(1);
    expect(screen.getByText('v').tagName).toBe('SUB');
    expect(screen.getByText('equivalent stress').nextSibling?.textContent).toBe('σ2 + 3 τ2');
  });
});
