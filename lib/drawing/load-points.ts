import type { DrawingData, DrawingResult } from './drawing-data';
import { direction } from './load-blocks';
import { imperfection, words } from './load-words';
import { along, type MemberAxis } from './member-axis';
import { plus, type Point } from './paper';

interface Pointed {
  readonly at: Point;
  readonly force: Point;
  readonly text: string;
  /** It stands for an imperfection. */
  readonly standsFor?: boolean;
}

export function pointed(
  data: DrawingData,
  result: DrawingResult,
  axes: readonly MemberAxis[],
  at: (x: number, y: number) => Point,
): Pointed[] {
  return result.loads.flatMap((load): Pointed[] => {
    if (load.kind === 'point') {
      const axis = axes[load.member];
      if (!axis || load.P === 0) return [];
      const unit = direction(load.axes, load.direction, axis);
      const sign = Math.sign(load.P);
      return [
        {
          at: along(axis, load.at),
          force: { x: unit.x * sign, y: unit.y * sign },
          text: `${load.case} ${words(Math.abs(load.P), 'force', data)}`,
        },
      ];
    }
    if (load.kind !== 'node') return [];
    const node = data.nodes[load.node];
    if (!node) return [];
    const p = at(node.x, node.y);
    const one = (value: number, unit: Point): Pointed[] =>
      value === 0
        ? []
        : [
            {
              at: p,
              force: { x: unit.x * Math.sign(value), y: unit.y * Math.sign(value) },
              text: `${load.case} ${words(Math.abs(value), 'force', data)}`,
              standsFor: load.case === imperfection,
            },
          ];
    return [...one(load.Fx, { x: 1, y: 0 }), ...one(load.Fy, { x: 0, y: -1 })];
  });
}

export function heads(axes: readonly MemberAxis[], data: DrawingData, result: DrawingResult, length: number): Point[] {
  const at = (x: number, y: number) => {
    const index = data.nodes.findIndex((node) => node.x === x && node.y === y);
    const axis = axes.find((one) => data.members[one.index]?.start === index || data.members[one.index]?.end === index);
    return axis ? (data.members[axis.index]?.start === index ? axis.a : axis.b) : { x: 0, y: 0 };
  };
  return pointed(data, result, axes, at).map((one) => plus(one.at, one.force, -length - 8));
}

export function turning(
  data: DrawingData,
  result: DrawingResult,
  axes: readonly MemberAxis[],
  at: (x: number, y: number) => Point,
) {
  return result.loads.flatMap((load) => {
    if (load.kind === 'moment' && load.M !== 0) {
      const axis = axes[load.member];
      return axis
        ? [{ at: along(axis, load.at), value: load.M, text: `${load.case} ${words(Math.abs(load.M), 'moment', data)}` }]
        : [];
    }
    if (load.kind !== 'node' || load.Mz === 0) return [];
    const node = data.nodes[load.node];
    return node
      ? [{ at: at(node.x, node.y), value: load.Mz, text: `${load.case} ${words(Math.abs(load.Mz), 'moment', data)}` }]
      : [];
  });
}
