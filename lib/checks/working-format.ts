import { fromSI, unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity, formatRatio } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';
import type { WorkingFormat } from './working-parts';

/** Numbers of a working in a batch's units: four figures, so that a reader can follow the sum with a calculator. */
export function workingFormat(system: System, nearLimit: number): WorkingFormat {
  return {
    quantity: (si, quantity) => ({
      // what cancelling left over of a force or a stress is none
      text: formatQuantity(quantity !== 'number' && Math.abs(fromSI(si, quantity, system)) < 1e-9 ? 0 : si, quantity, system, {
        significant: 4,
      }),
      unit: quantity === 'number' ? '' : unitLabel(quantity, system),
    }),
    ratio: (ratio) => formatRatio(ratio, nearLimit),
  };
}
