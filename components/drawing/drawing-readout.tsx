import { formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity } from '@/lib/units/quantity';
import type { DrawingData, DrawingResult } from '@/lib/drawing/drawing-data';
import { valueAt } from '@/lib/drawing/member-axis';
import type { ReadPoint } from '@/lib/drawing/read-step';

/** One line under the drawing: x, N, V, M and v at the point. Says how to read where nothing is pointed at. */
export function DrawingReadout({
  data,
  result,
  point,
}: {
  readonly data: DrawingData;
  readonly result: DrawingResult | null;
  readonly point: ReadPoint | null;
}) {
  const member = point ? data.members[point.member] : undefined;
  const line = point ? result?.lines[point.member] : undefined;
  if (!point || !member || !line || !result)
    return (
      <div className="readout d-readout readout-soft">Point at a member, or press the arrow keys, to read values along it.</div>
    );
  const value = (symbol: string, si: number, quantity: Quantity) => (
    <span key={symbol} className="d-value">
      <var>{symbol}</var> {formatQuantity(si, quantity, data.units)}{' '}
      <span className="unit">{unitLabel(quantity, data.units)}</span>
    </span>
  );
  return (
    <div className="readout d-readout" aria-live="polite">
      <b>{member.id}</b>
      <span>{member.section}</span>
      <span className="readout-soft">{result.name}</span>
      {value('x', point.x, 'length')}
      {value('N', valueAt(line, 'N', point.x), 'force')}
      {value('V', valueAt(line, 'V', point.x), 'force')}
      {value('M', valueAt(line, 'M', point.x), 'moment')}
      {value('v', valueAt(line, 'v', point.x), 'displacement')}
    </div>
  );
}
