import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import type { DrawingBuckled, DrawingData, DrawingMethod, DrawingResult } from '@/lib/drawing/drawing-data';
import { simpleBeam } from '@/lib/drawing/drawing-sample';
import { plainMethod } from '@/lib/drawing/plain-method';
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
      criticalLoadFactor: null,
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

  it('draws the buckled shape where the result has a critical load factor, and says what it is', async () => {
    const user = userEvent.setup();
    const looked = vi.fn();
    const data = withResult({ name: 'C3 →', method: { ...plainMethod, criticalLoadFactor: 4.213 } });
    const { rerender } = render(<FrameDrawing data={data} onDiagram={looked} />);
    await user.click(screen.getByRole('radio', { name: 'Buckled' }));
    expect(looked).toHaveBeenCalledExactlyOnceWith('B');
    expect(texts(large())).toContain('working out the shape');
    rerender(<FrameDrawing data={data} buckled={swayed} />);
    expect(screen.getByRole('heading', { name: /^1 Buckled shape/ })).toHaveTextContent(
      'at 4.21 times the loads of C3 → the frame would sway so; in its plane, elastic, out of plane not looked at',
    );
    expect(texts(large())).toEqual(expect.arrayContaining(['αcr 4.21 for C3 →', 'a shape, of no size']));
    expect(large().querySelector('.d-buckled')?.getAttribute('d')).toMatch(/^M/);
    // no movement is named: there is none to name
    expect(texts(large()).filter((text) => /mm/.test(text ?? ''))).toEqual([]);
    rerender(<FrameDrawing data={withResult({ name: 'S1' })} />);
    expect(screen.queryByRole('radio', { name: 'Buckled' })).toBeNull();
    expect(screen.getByRole('heading', { name: /^1 Bending moment/ })).toBeInTheDocument();
  });

  it('draws a slack member dashed and named, whatever is looked at', () => {
    render(<FrameDrawing data={withResult({ slack: [0] })} />);
    for (const view of ['diagram', 'loads', 'deflected']) {
      const drawn = document.querySelector(`[data-view="${view}"]`)!;
      expect(drawn.querySelector('path[data-member="AB"]')).toHaveClass('d-member-slack');
      expect(texts(drawn)).toContain('AB slack');
    }
    expect(screen.getByRole('note')).toHaveTextContent('slack, drawn dashed: AB');
  });

  it('says how a result was found', () => {
    const method: DrawingMethod = {
      ...plainMethod, order: 2, imperfection: 'left', reducedStiffness: true, loadScale: 1.6, iterations: 5, change: 3.1e-11,
    }; // prettier-ignore
    render(<FrameDrawing data={{ ...withResult({ name: 'C1 ←', method }), noCasesAlone: 'load cases alone: not applicable' }} />);
    const note = screen.getByRole('note');
    expect(note).toHaveTextContent(
      'C1 ← second order: equilibrium on the deformed shape, settled in 5 passes, last change 3.1 · 10⁻¹¹',
    );
    expect(note).toHaveTextContent('imperfection to the left ←');
    expect(note).toHaveTextContent('analysed under 1.6 times the loads, results divided by 1.6');
    expect(note).toHaveTextContent('load cases alone: not applicable');
  });

  it('draws the forces that stand for an imperfection among the loads', () => {
    const loads = [{ case: 'imperfection', kind: 'node' as const, node: 1, Fx: 2300, Fy: 0, Mz: 0 }];
    render(<FrameDrawing data={withResult({ loads })} initialView="loads" />);
    expect(texts(large())).toEqual(expect.arrayContaining(['imperfection 2.30 kN', 'imperfection up to 2.30 kN']));
  });
});

/** The simple beam with something else said of its result. */
function withResult(other: Partial<DrawingResult>): DrawingData {
  const data = simpleBeam();
  return { ...data, chosen: { ...data.chosen!, ...other } };
}

const swayed: DrawingBuckled = { factor: 4.213, kind: 'sway', members: [[0, 0, 0, 0, 3, 0, 0.5, 1, 6, 0, 0, 0]] };
