import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { simpleBeam } from './drawing-sample';
import { FrameDrawing } from './frame-drawing';

const large = () => document.querySelector<SVGSVGElement>('.d-view-large')!;
const texts = (view: Element) => [...view.querySelectorAll('text')].map((text) => text.textContent);

describe('the drawing of a frame', () => {
  it('shows four numbered views at once, the bending moment large', () => {
    render(<FrameDrawing data={simpleBeam()} />);
    expect(large().dataset.view).toBe('diagram');
    expect([...document.querySelectorAll('.d-small svg')].map((view) => view.getAttribute('data-view'))).toEqual([
      'loads',
      'deflected',
      'ratio',
    ]);
    expect(screen.getByRole('heading', { name: /^1 Bending moment/ })).toBeInTheDocument();
    expect(texts(large())).toContain('54.0');
    expect(texts(large())).toContain('6 m');
  });

  it('swaps a small view with the large one, by a press or by its number', async () => {
    const user = userEvent.setup();
    render(<FrameDrawing data={simpleBeam()} />);
    await user.click(screen.getByRole('button', { name: /^Make view 4 large: Ratio/ }));
    expect(large().dataset.view).toBe('ratio');
    expect(document.querySelector('.d-small [data-view="diagram"]')).not.toBeNull();
    await user.keyboard('2');
    expect(large().dataset.view).toBe('loads');
    expect(texts(large())).toContain('live 8.00 kN/m on plan, dead 4.00 kN/m');
  });

  it('chooses N, V or M, and another result', async () => {
    const user = userEvent.setup();
    const chosen = vi.fn();
    render(<FrameDrawing data={simpleBeam()} onChoose={chosen} />);
    await user.click(within(screen.getByRole('radiogroup', { name: 'Diagram' })).getByRole('radio', { name: 'V' }));
    expect(screen.getByRole('heading', { name: /Shear force/ })).toBeInTheDocument();
    expect(texts(large())).toEqual(expect.arrayContaining(['36.0', '−36.0']));
    await user.click(
      within(screen.getByRole('radiogroup', { name: 'Load case or combination' })).getByRole('radio', { name: 'dead' }),
    );
    expect(chosen).toHaveBeenCalledWith('dead');
  });

  it('offers many combinations in a list that opens', async () => {
    const user = userEvent.setup();
    const chosen = vi.fn();
    const results = Array.from({ length: 30 }, (_, i) => ({
      name: `C${i + 1}`,
      kind: 'combination' as const,
      purpose: 'strength' as const,
    }));
    render(<FrameDrawing data={{ ...simpleBeam(), results }} onChoose={chosen} />);
    await user.click(screen.getByRole('button', { name: 'Load case or combination: C1' }));
    await user.click(screen.getByRole('option', { name: 'C30' }));
    expect(chosen).toHaveBeenCalledWith('C30');
  });

  it('reads x, N, V, M and v along a member by keyboard', async () => {
    const user = userEvent.setup();
    render(<FrameDrawing data={simpleBeam()} />);
    expect(screen.getByText(/Point at a member/)).toBeInTheDocument();
    large().focus();
    await user.keyboard('{ArrowRight}'.repeat(11));
    const readout = document.querySelector('.d-readout')!;
    expect(readout).toHaveTextContent('AB');
    expect(readout).toHaveTextContent('x 3.00 m');
    expect(readout).toHaveTextContent('M 54.0 kN·m');
    expect(readout).toHaveTextContent('v −10.0 mm');
  });

  it('prints a ratio that never crosses a boundary', async () => {
    render(<FrameDrawing data={simpleBeam()} initialView="ratio" />);
    expect(texts(large())).toContain('AB 1.01');
  });

  it('draws geometry and says why there is nothing else where a frame is not solved', () => {
    render(<FrameDrawing data={{ ...simpleBeam(), chosen: null }} />);
    expect(large().dataset.view).toBe('ratio');
    expect(large().querySelectorAll('path[data-member]')).toHaveLength(1);
    const diagram = document.querySelector('.d-small [data-view="diagram"]')!;
    expect(texts(diagram)).toContain('not solved, so there is nothing to draw here');
  });
});
