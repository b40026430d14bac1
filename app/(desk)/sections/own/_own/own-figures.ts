import { ownDefinition } from '@/lib/intake/own/own-sheets';
import type { OwnKind, OwnRecord } from '@/lib/intake/own/own-thing';
import { unitLabel } from '@/lib/units/batch-unit';

/** A version's figures on one line: "shape I, h 600 mm, b 250 mm". */
export function figuresLine(kind: OwnKind, { cells, units }: Pick<OwnRecord, 'cells' | 'units'>): string {
  const { columns } = ownDefinition(kind);
  return Object.entries(cells)
    .filter(([column]) => column !== 'published')
    .map(([column, text]) => {
      const quantity = columns.get(column) ?? null;
      const unit = quantity === null || quantity === 'load' ? '' : unitLabel(quantity, units);
      return [column, text, unit].filter((word) => word !== '').join(' ');
    })
    .join(', ');
}
