/** Members and nodes of a frame as tables. */
import { lengthText } from '@/lib/drawing/dimensions';
import type { DrawingData } from '@/lib/drawing/drawing-data';
import type { Frame, Joint, Restraint } from '@/lib/model/frame';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity, formatRatio } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';
import type { Flow } from './flow';
import { verdictInk } from './ink';
import { table, type Row } from './table';

export function membersTable(flow: Flow, frame: Frame, data: DrawingData): void {
  const { units, nearLimit } = data;
  flow.heading('Members', 'ratio and verdict are the member’s governing check');
  const length = unitLabel('length', units);
  table(
    flow,
    [
      { head: 'Member', face: 'condensedMedium' },
      { head: 'From–to' },
      { head: 'Length', unit: length, align: 'right' },
      { head: 'Role' },
      { head: 'Section' },
      { head: 'Material' },
      { head: 'Ends' },
      { head: 'Remarks', soft: true },
      { head: 'Ratio', align: 'right' },
      { head: 'Verdict' },
    ],
    frame.members.map((member, i): Row => {
      const [a, b] = [frame.nodes[member.start]!, frame.nodes[member.end]!];
      const drawn = data.members[i]!;
      return {
        cells: [
          member.id,
          `${a.id}–${b.id}`,
          lengthText(Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m), units, false),
          member.role ?? '–',
          `${frame.sections[member.section]?.name ?? ''}${member.turned ? ', turned' : ''}`,
          frame.materials[member.material]?.name ?? '',
          ends(member.startJoint, member.endJoint, units),
          remarks(frame, i, units),
          { text: formatRatio(drawn.ratio, nearLimit), face: 'condensedBold', colour: verdictInk[drawn.verdict] },
          { text: drawn.verdict, mark: drawn.verdict, colour: verdictInk[drawn.verdict] },
        ],
      };
    }),
  );
}

function ends(start: Joint, end: Joint, units: System): string {
  const one = (joint: Joint): string => (typeof joint === 'number' ? `spring ${formatQuantity(joint, 'springRotation', units)} ${unitLabel('springRotation', units)}` : joint); // prettier-ignore
  return start === end ? one(start) : `${one(start)} / ${one(end)}`;
}

/** Span, tension only, lengths for buckling as given. */
function remarks(frame: Frame, index: number, units: System): string {
  const { span, axialOnly, tensionOnly, lengthMajor_m, lengthMinor_m, lengthLtbTop_m, lengthLtbBottom_m } = frame.members[index]!;
  const given = (name: string, value: number | null): string | null =>
    value === null ? null : `${name} ${lengthText(value, units)}`;
  return (
    [
      span === null ? null : `span ${span}`,
      tensionOnly ? 'tension only' : axialOnly ? 'axial only' : null,
      given('L major', lengthMajor_m),
      given('L minor', lengthMinor_m),
      ...(lengthLtbTop_m === lengthLtbBottom_m
        ? [given('faces held each', lengthLtbTop_m)]
        : [given('top held each', lengthLtbTop_m), given('bottom held each', lengthLtbBottom_m)]),
    ]
      .filter((one) => one !== null)
      .join(', ')
      // a length and its unit stay in one line
      .replace(/(\d) (?=m|ft)/g, '$1\u00a0')
  );
}

export function nodesTable(flow: Flow, frame: Frame, units: System): void {
  flow.heading('Nodes and supports');
  const length = unitLabel('length', units);
  const row = (i: number): string[] => {
    const { id, x_m, y_m, place } = frame.nodes[i]!;
    const support = frame.supports.find((one) => one.node === i);
    const held = support
      ? [restraint('x', support.ux, 'springTranslation', units), restraint('y', support.uy, 'springTranslation', units), restraint('rotation', support.rz, 'springRotation', units), support.angle_rad === 0 ? null : `turned ${formatQuantity(support.angle_rad, 'angle', units)}°`].filter((one) => one !== null).join(', ') || 'free' // prettier-ignore
      : '';
    return [id, lengthText(x_m, units, false), lengthText(y_m, units, false), [place, held].filter(Boolean).join(': ')];
  };
  // two nodes a row where nothing long is said of them
  const all = frame.nodes.map((_, i) => row(i));
  const half = Math.ceil(all.length / 2);
  const twice = all.length > 3;
  const columns = [
    { head: 'Node', face: 'condensedMedium' as const },
    { head: 'x', unit: length, align: 'right' as const },
    { head: 'y', unit: length, align: 'right' as const },
    { head: 'Place: held', soft: true },
  ];
  if (!twice)
    table(
      flow,
      columns,
      all.map((cells) => ({ cells })),
    );
  else
    table(
      flow,
      [...columns, ...columns],
      all.slice(0, half).map((cells, i) => ({ cells: [...cells, ...(all[half + i] ?? [])] })),
    );
}

function restraint(
  name: string,
  state: Restraint,
  quantity: 'springTranslation' | 'springRotation',
  units: System,
): string | null {
  if (state === 'free') return null;
  if (state === 'fixed') return `${name} fixed`;
  return `${name} spring ${formatQuantity(state, quantity, units)} ${unitLabel(quantity, units)}`;
}
