import { describe, expect, it } from 'vitest';
import { planDeflected } from './deflected-plan';
import { planDiagram } from './diagram-plan';
import { dimensionChains, lengthText } from './dimensions';
import type { DrawingData, DrawingResult } from './drawing-data';
import { simpleBeam } from './drawing-sample';
import { textHeight, textWidth, type PlacedLabel } from './labels';
import { planLoads } from './loads-plan';
import { planRatio } from './ratio-plan';

const numbers = (d: string) => d.match(/-?[\d.]+/g)!.map(Number);
const ys = (d: string) => numbers(d).filter((_, i) => i % 2 === 1);
const chosen = (data: DrawingData): DrawingResult => data.chosen!;

/** The same beam as a column, drawn from its foot upwards. */
function column(): DrawingData {
  const beam = simpleBeam();
  return { ...beam, nodes: beam.nodes.map((node) => ({ ...node, x: 0, y: node.x })) };
}

function overlaps(labels: readonly PlacedLabel[]): string[] {
  const boxes = labels
    .filter((label) => label.turn === 0)
    .map((label) => ({ ...label, w: textWidth(label.text, label.size) / 2 - 2, h: textHeight(label.text, label.size) / 2 - 2 }));
  return boxes.flatMap((a, i) =>
    boxes
      .slice(i + 1)
      .flatMap((b) =>
        Math.abs(a.at.x - b.at.x) < a.w + b.w && Math.abs(a.at.y - b.at.y) < a.h + b.h ? [`${a.text} on ${b.text}`] : [],
      ),
  );
}

describe('diagrams', () => {
  it('draw a sagging moment below the beam, on the side in tension', () => {
    const data = simpleBeam();
    const plan = planDiagram(data, chosen(data), 'M', 900, 360, true);
    const beam = plan.scene.axes[0]!.a.y;
    expect(Math.max(...ys(plan.shapes[0]!.outline))).toBeGreaterThan(beam + 10);
    expect(Math.min(...ys(plan.shapes[0]!.outline))).toBeGreaterThanOrEqual(beam - 0.01);
  });

  it('draw a positive moment of a column drawn upwards to the right of it, its local −y side', () => {
    const data = column();
    const plan = planDiagram(data, chosen(data), 'M', 900, 360, true);
    const xs = numbers(plan.shapes[0]!.outline).filter((_, i) => i % 2 === 0);
    expect(Math.max(...xs)).toBeGreaterThan(plan.scene.axes[0]!.a.x + 10);
    expect(Math.min(...xs)).toBeGreaterThanOrEqual(plan.scene.axes[0]!.a.x - 0.01);
  });

  it('draw a positive shear force above a beam, on its local +y side', () => {
    const data = simpleBeam();
    const plan = planDiagram(data, chosen(data), 'V', 900, 360, true);
    expect(Math.min(...ys(plan.shapes[0]!.outline))).toBeLessThan(plan.scene.axes[0]!.a.y - 10);
  });

  it('keep ordinates in proportion, and give the value of a length of paper', () => {
    const data = simpleBeam();
    const plan = planDiagram(data, chosen(data), 'M', 900, 360, true);
    const deepest = Math.max(...ys(plan.shapes[0]!.outline)) - plan.scene.axes[0]!.a.y;
    const value = Number(plan.bar!.text.split(' ')[0]);
    expect(plan.bar!.text).toMatch(/kN·m$/);
    expect(plan.bar!.length / deepest).toBeCloseTo(value / 54, 2);
  });

  it('say so where everything is zero', () => {
    const data = simpleBeam();
    expect(planDiagram(data, chosen(data), 'N', 900, 360, true)).toMatchObject({ bar: null, shapes: [] });
  });

  it('stay on the paper, whatever its size', () => {
    for (const [width, height, big] of [
      [900, 360, true],
      [300, 180, false],
      [390, 280, true],
    ] as const) {
      for (const data of [simpleBeam(), column()]) {
        const plan = planDiagram(data, chosen(data), 'M', width, height, big);
        const d = numbers(plan.shapes[0]!.outline);
        expect(Math.min(...d)).toBeGreaterThanOrEqual(0);
        expect(Math.max(...d.filter((_, i) => i % 2 === 0))).toBeLessThanOrEqual(width);
        expect(Math.max(...ys(plan.shapes[0]!.outline))).toBeLessThanOrEqual(height);
      }
    }
  });
});

describe('labels', () => {
  it('never stand on one another, on any view of a rack of 20 bays', () => {
    const data = rack(5, 4);
    for (const plan of [
      planDiagram(data, chosen(data), 'M', 900, 460, true),
      planLoads(data, chosen(data), 900, 460, true),
      planDeflected(data, chosen(data), 900, 460, true),
      planRatio(data, 900, 460, true),
    ])
      expect(overlaps(plan.labels)).toEqual([]);
  });

  it('always give the governing extreme', () => {
    const data = rack(8, 6);
    const plan = planDiagram(data, chosen(data), 'M', 900, 460, true);
    expect(plan.labels.some((label) => label.className.includes('d-governing'))).toBe(true);
  });
});

describe('loads, movements and dimensions', () => {
  it('stack dead load nearest the member and name a projected load as on plan', () => {
    const data = simpleBeam();
    const plan = planLoads(data, chosen(data), 900, 360, true);
    const [dead, live] = plan.arrows;
    expect(Math.min(...ys(live!.d))).toBeLessThan(Math.min(...ys(dead!.d)));
    expect(plan.labels.map((label) => label.text)).toContain('36.0 kN ↑');
  });

  it('say settlements, temperature and self-weight in words', () => {
    const data = simpleBeam();
    const result: DrawingResult = {
      ...chosen(data),
      loads: [
        {
          case: 'dead',
          kind: 'distributed',
          member: 0,
          axes: 'global',
          direction: 'y',
          q1: -400,
          q2: -400,
          from: 0,
          to: 6,
          selfWeight: true,
        },
        { case: 'warm', kind: 'temperature', member: 0, dT: 20, dTAcross: 0 },
        { case: 'sunk', kind: 'settlement', node: 1, dx: null, dy: -0.012, rz: null },
      ],
    };
    expect(planLoads(data, result, 900, 360, true).besides).toEqual([
      'self-weight acts too',
      'temperature 20.0 °C on 1 member',
      'settlement at B: −12.0 mm in y',
    ]);
  });

  it('enlarge movements by a round factor and return to the frame at zero', () => {
    const data = simpleBeam();
    const plan = planDeflected(data, chosen(data), 900, 360, true);
    expect([1, 2, 5]).toContain(Number(String(plan.times).replace(/[0.]/g, '')));
    expect(new Set(ys(plan.lines(0)[0]!)).size).toBe(1);
    expect(Math.max(...ys(plan.lines(1)[0]!))).toBeGreaterThan(plan.scene.axes[0]!.a.y + 5);
  });

  it('dimension bays between supports and levels of nodes', () => {
    const chains = dimensionChains(rack(3, 2));
    expect(chains.find((chain) => chain.direction === 'x')?.texts).toEqual(['6 m', '6 m', '6 m']);
    expect(chains.find((chain) => chain.direction === 'y')?.texts).toEqual(['3 m', '3 m']);
    expect(lengthText(1.67, 'metric')).toBe('1.67 m');
    expect(lengthText(6.096, 'us')).toBe('20 ft');
  });
});

/** A rack of rigid bays; every member bends as the simple beam does. */
function rack(bays: number, storeys: number): DrawingData {
  const beam = simpleBeam();
  const result = chosen(beam);
  const nodes = Array.from({ length: (bays + 1) * (storeys + 1) }, (_, i) => ({
    id: `N${i}`,
    x: (i % (bays + 1)) * 6,
    y: Math.floor(i / (bays + 1)) * 3,
    place: null,
  }));
  const at = (bay: number, level: number) => level * (bays + 1) + bay;
  const ends: [number, number][] = [];
  for (let level = 0; level < storeys; level++)
    for (let bay = 0; bay <= bays; bay++) ends.push([at(bay, level), at(bay, level + 1)]);
  for (let level = 1; level <= storeys; level++)
    for (let bay = 0; bay < bays; bay++) ends.push([at(bay, level), at(bay + 1, level)]);
  const members = ends.map(([start, end], i) => ({ ...beam.members[0]!, id: `M${i}`, start, end, ratio: 0.4 + (i % 9) * 0.08 }));
  return {
    ...beam,
    nodes,
    members,
    supports: Array.from({ length: bays + 1 }, (_, node) => ({ ...beam.supports[0]!, node })),
    chosen: {
      ...result,
      loads: members.flatMap((_, member) =>
        member >= storeys * (bays + 1) ? result.loads.map((load) => ({ ...load, member })) : [],
      ),
      reactions: Array.from({ length: bays + 1 }, () => ({ Fx: 1200, Fy: 36_000, Mz: 0 })),
      displacements: nodes.map((node) => ({ ux: node.y * 0.001, uy: -0.0005, rz: 0 })),
      lines: members.map((_, i) => {
        const length = i < storeys * (bays + 1) ? 3 : 6;
        const line = result.lines[0]!;
        const k = (length / 6) * (1 + (i % 7) * 0.01);
        const { N, V, M, deflection } = line.extremes;
        return {
          ...line,
          x: line.x.map((x) => (x * length) / 6),
          M: line.M.map((value) => value * k),
          extremes: { N, V, M: { ...M, max: M.max * k, maxAt: length / 2 }, deflection: { ...deflection, at: length / 2 } },
        };
      }),
    },
  };
}
