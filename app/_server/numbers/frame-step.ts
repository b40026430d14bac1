import type { NumberRow, NumberStep } from '@/components/numbers/numbers-data';
import type { BehindFrame, Direction } from '@/lib/analysis/behind/behind-frame';
import type { Frame } from '@/lib/model/frame';
import { asForce, asMove, forceUnit, moveUnit } from './step-matrices';
import type { NumberUnits } from './number-units';

const kindWords: Readonly<Record<Direction['kind'], string>> = {
  unknown: 'unknown',
  sprung: 'unknown, on a spring',
  held: 'held',
  none: 'no rotation of its own',
};

/** "B x, row 4": a direction by its node's name. */
export const directionName = (frame: Frame, { node, direction }: Direction): string =>
  `${frame.nodes[node]!.id} ${direction === 'rotation' ? 'rot.' : direction}`;

/** Rows of the table of unknowns; those of the member's ends stand out. */
export function directionRows(
  frame: Frame,
  directions: readonly Direction[],
  own: readonly number[],
  units: NumberUnits,
): NumberRow[] {
  return directions.map((one) => {
    const r = { x: 0, y: 1, rotation: 2 }[one.direction];
    return {
      label: directionName(frame, one),
      unit: `${forceUnit(r, units)}, ${moveUnit(r, units)}`,
      own: own.includes(one.node),
      cells: [
        one.row,
        kindWords[one.kind],
        one.load === null ? null : asForce(one.load, r, units),
        one.kind === 'none' ? null : asMove(one.displacement, r, units),
        one.left === null ? null : asForce(one.left, r, units),
      ],
    };
  });
}

export const directionColumns = [
  { label: 'row of K', apart: true },
  { label: 'is', words: true },
  { label: 'f', apart: true },
  { label: 'd', apart: true },
  { label: 'K d − f', power: true },
] as const;

/** The whole frame: every node's unknowns as the engine numbers them, the load vector and the displacements. */
export function frameStep(frame: Frame, behind: BehindFrame, own: readonly number[], units: NumberUnits): NumberStep {
  const turned = frame.nodes.flatMap(({ id }, node) => {
    const angle = behind.angles[node]!;
    return angle === 0 ? [] : [`${id} by ${((angle * 180) / Math.PI).toFixed(2)}°`];
  });
  return {
    title: 'The whole frame',
    words: [
      `${behind.unknowns} unknowns. A node has three rows of K, x, y and rotation; nodes are ordered so that neighbours stand near one another, which keeps K narrow. Held directions are no unknowns: their rows are left out.`,
      ...(turned.length > 0
        ? [`Directions of a node whose support is turned stand along the support’s own axes: ${turned.join(', ')}.`]
        : []),
      'f: loads on nodes, less what members ask for with their ends held (−Tᵀ q_F), less what settlements ask for. d: the solution; at held directions the settlement, or 0.',
    ],
    tables: [
      {
        id: 'all-unknowns',
        title: 'Unknowns, load vector f, displacements d',
        corner: 'direction',
        columns: directionColumns,
        rows: directionRows(frame, behind.directions, own, units),
        long: behind.directions.length > 90,
      },
    ],
  };
}
