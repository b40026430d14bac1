import { formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity } from '@/lib/units/quantity';
import type { DrawingData, DrawingResult } from './drawing-data';
import type { Distributed } from './load-blocks';

/** The name under which forces that stand for imperfections are drawn. */
export const imperfection = 'imperfection';

/** An SI value with its unit, three figures. */
export const words = (si: number, quantity: Quantity, data: DrawingData): string => {
  const unit = unitLabel(quantity, data.units);
  return `${formatQuantity(si, quantity, data.units)}${unit ? ` ${unit}` : ''}`;
};

export function blockText(load: Distributed, data: DrawingData): string {
  const [q1, q2] = [Math.abs(load.q1), Math.abs(load.q2)];
  const even = Math.abs(q1 - q2) < 1e-6 * Math.max(q1, q2);
  const value = even
    ? words(q1, 'lineLoad', data)
    : `${formatQuantity(q1, 'lineLoad', data.units)} to ${words(q2, 'lineLoad', data)}`;
  return `${load.case} ${value}${load.axes === 'projected' ? (load.direction === 'y' ? ' on plan' : ' on height') : ''}`;
}

/** What is said in the caption rather than drawn: self-weight, temperature, settlements. */
export function besides(data: DrawingData, result: DrawingResult): string[] {
  const out: string[] = [];
  if (result.loads.some((one) => one.kind === 'distributed' && one.selfWeight)) out.push('self-weight acts too');
  const stand = result.loads.flatMap((one) => (one.kind === 'node' && one.case === imperfection ? [one.Fx, one.Fy] : []));
  const most = Math.max(0, ...stand.map(Math.abs));
  if (most > 0) out.push(`imperfection up to ${words(most, 'force', data)}`);
  const warm = result.loads.filter((one) => one.kind === 'temperature');
  const sizes = new Set(
    warm.map((one) =>
      one.kind === 'temperature'
        ? `${words(one.dT, 'temperature', data)}${one.dTAcross !== 0 ? `, ${words(one.dTAcross, 'temperature', data)} across` : ''}`
        : '',
    ),
  );
  if (warm.length > 0)
    out.push(`temperature ${[...sizes].slice(0, 3).join('; ')} on ${warm.length} ${warm.length === 1 ? 'member' : 'members'}`);
  for (const load of result.loads) {
    if (load.kind !== 'settlement') continue;
    const parts = [
      load.dx !== null ? `${words(load.dx, 'displacement', data)} in x` : null,
      load.dy !== null ? `${words(load.dy, 'displacement', data)} in y` : null,
      load.rz !== null ? `${words(load.rz, 'rotation', data)}` : null,
    ].filter(Boolean);
    out.push(`settlement at ${data.nodes[load.node]?.id ?? '?'}: ${parts.join(', ')}`);
  }
  return out;
}
