/** Loads of each case: drawn, and listed as typed. */
import type { DrawingData } from '@/lib/drawing/drawing-data';
import { lengthText } from '@/lib/drawing/dimensions';
import { drawingCase } from '@/lib/drawing/frame-drawing-data';
import { appliedTotals } from '@/lib/analysis/applied-totals';
import type { Frame, MemberLoad } from '@/lib/model/frame';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatNumber, formatQuantity } from '@/lib/units/format';
import type { Quantity, System } from '@/lib/units/quantity';
import type { Flow } from './flow';
import { table } from './table';
import { loadsBesides, loadsView, viewHeight, viewRow, type View } from './views';

export function loadsPart(flow: Flow, frame: Frame, data: DrawingData): void {
  if (frame.cases.length === 0) return;
  const { units } = data;
  const totals = appliedTotals(frame);
  const across = frame.cases.length > 2 && frame.cases.length !== 4 ? 3 : Math.min(2, frame.cases.length);
  const height = viewHeight(data, flow.width / across, 84, 140);
  flow.heading('Loads', 'as typed, without factors; Σ: their sum in global x and y');
  const force = (si: number | undefined): string => formatQuantity(si ?? null, 'force', units);
  const views = frame.cases.map(({ name, kind }, i): View => {
    const result = drawingCase(frame, i);
    const sum = `Σx ${force(totals[i]?.Fx_N)}, Σy ${force(totals[i]?.Fy_N)} ${unitLabel('force', units)}`;
    const note = [kind === name ? null : kind, sum, ...loadsBesides(data, result)].filter((one) => one !== null).join('; ');
    return { title: name, note, draw: loadsView(data, result) };
  });
  for (let i = 0; i < views.length; i += across) viewRow(flow, views.slice(i, i + across), height, across);
  flow.heading('Loads in figures');
  table(
    flow,
    [
      { head: 'Case', face: 'condensedMedium' },
      { head: 'On', soft: true },
      { head: 'Load' },
      { head: 'Value' },
      { head: 'From start' },
    ],
    listed(frame, units).map(({ on, cells: [name, ...rest] }) => ({ cells: [name ?? '', on.join(', '), ...rest] })),
  );
}

interface Listed {
  readonly cells: readonly string[];
  readonly on: string[];
}

/** Equal loads of a case stand in one row with everything that they act on. */
function listed(frame: Frame, units: System): Listed[] {
  const rows = new Map<string, Listed>();
  const add = (on: string, ...cells: string[]): void => {
    const key = cells.join('\n');
    const known = rows.get(key);
    if (known) known.on.push(on);
    else rows.set(key, { cells, on: [on] });
  };
  const say = (si: number, quantity: Quantity): string => `${formatQuantity(si, quantity, units)} ${unitLabel(quantity, units)}`;
  frame.cases.forEach(({ name, selfWeight }, index) => {
    if (selfWeight !== 0) add('every member', name, 'self-weight', `× ${formatNumber(selfWeight, { significant: 3 })}`, '');
    for (const load of frame.memberLoads)
      if (load.case === index)
        add(frame.members[load.member]?.id ?? '', name, ...memberLoad(load, units, say, lengthOf(frame, load.member)));
    for (const { case: of, node, Fx_N, Fy_N, Mz_Nm } of frame.nodeLoads) {
      if (of !== index) continue;
      const values = [Fx_N === 0 ? null : `Fx ${say(Fx_N, 'force')}`, Fy_N === 0 ? null : `Fy ${say(Fy_N, 'force')}`, Mz_Nm === 0 ? null : `Mz ${say(Mz_Nm, 'moment')}`]; // prettier-ignore
      add(`node ${frame.nodes[node]?.id ?? ''}`, name, 'at a node', values.filter(Boolean).join(', ') || '0', '');
    }
    for (const { case: of, node, dx_m, dy_m, rz_rad } of frame.settlements) {
      if (of !== index) continue;
      const values = [dx_m === null ? null : `x ${say(dx_m, 'displacement')}`, dy_m === null ? null : `y ${say(dy_m, 'displacement')}`, rz_rad === null ? null : `rotation ${say(rz_rad, 'rotation')}`]; // prettier-ignore
      add(`node ${frame.nodes[node]?.id ?? ''}`, name, 'support moved', values.filter(Boolean).join(', '), '');
    }
  });
  return [...rows.values()];
}

function lengthOf(frame: Frame, member: number): number {
  const { start, end } = frame.members[member]!;
  const [a, b] = [frame.nodes[start]!, frame.nodes[end]!];
  return Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
}

function memberLoad(load: MemberLoad, units: System, say: (si: number, quantity: Quantity) => string, length: number): string[] {
  switch (load.kind) {
    case 'distributed': {
      const { axes, direction, q1_N_m: q1, q2_N_m: q2, from_m: from, to_m: to } = load;
      const whole = from < 1e-9 && Math.abs(to - length) < 1e-9 * Math.max(1, length);
      const of =
        axes === 'projected'
          ? `along global ${direction}, ${direction === 'y' ? 'on plan' : 'on height'}`
          : `along ${axes} ${direction}`;
      const value = q1 === q2 ? say(q1, 'lineLoad') : `${formatQuantity(q1, 'lineLoad', units)} to ${say(q2, 'lineLoad')}`;
      return [of, value, whole ? 'whole length' : `${lengthText(from, units, false)} to ${lengthText(to, units)}`];
    }
    case 'point':
      return [`force along ${load.axes} ${load.direction}`, say(load.P_N, 'force'), lengthText(load.at_m, units)];
    case 'moment':
      return ['moment, anticlockwise', say(load.M_Nm, 'moment'), lengthText(load.at_m, units)];
    case 'temperature':
      return ['temperature', `${say(load.dT_K, 'temperature')}${load.dTAcross_K === 0 ? '' : `, ${say(load.dTAcross_K, 'temperature')} across`}`, 'whole length']; // prettier-ignore
  }
}
