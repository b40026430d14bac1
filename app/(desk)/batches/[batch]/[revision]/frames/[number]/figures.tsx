import Link from 'next/link';
import type { ReactNode } from 'react';
import type { DrawingData, DrawingResult } from '@/lib/drawing/drawing-data';
import { RatioText } from '@/components/ui/ratio-text';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { unitLabel } from '@/lib/units/batch-unit';
import { decimalsIn } from '@/lib/units/decimals';
import { formatQuantity } from '@/lib/units/format';
import type { Quantity, System } from '@/lib/units/quantity';

interface FiguresProps {
  readonly drawing: DrawingData;
  readonly result: DrawingResult;
}

interface Head {
  readonly label: string;
  readonly quantity?: Quantity;
  readonly num?: boolean;
}

/** N, V, M of each member under the chosen result, with the places of the extremes. */
interface MembersTableProps extends FiguresProps {
  readonly numbers: (member: string) => string;
  /** Where another section is chosen for a member; null for who may not. */
  readonly change: ((member: string) => string) | null;
}

export function MembersTable({ drawing, result, numbers, change }: MembersTableProps) {
  const { units, members, nodes, nearLimit } = drawing;
  const heads: Head[] = [
    { label: 'Member' },
    { label: 'Role' },
    { label: 'Section' },
    { label: 'Length', quantity: 'length' },
    { label: 'N max', quantity: 'force' },
    { label: 'N min', quantity: 'force' },
    { label: 'V max', quantity: 'force' },
    { label: 'V min', quantity: 'force' },
    { label: 'M max', quantity: 'moment' },
    { label: 'at', quantity: 'length' },
    { label: 'M min', quantity: 'moment' },
    { label: 'at', quantity: 'length' },
    { label: 'Deflection', quantity: 'displacement' },
    { label: 'Ratio', num: true },
    { label: 'Verdict' },
  ];
  return (
    <Figures caption={`Forces of members, ${result.name}`} heads={heads} units={units}>
      {members.map((member, index) => {
        const extremes = result.lines[index]?.extremes;
        const [a, b] = [nodes[member.start], nodes[member.end]];
        const length = a && b ? Math.hypot(b.x - a.x, b.y - a.y) : null;
        return (
          <tr key={member.id}>
            <th scope="row">
              <Link href={numbers(member.id)} prefetch={false} title={`The numbers behind ${member.id}`}>
                {member.id}
              </Link>
              {result.slack.includes(index) && <span className="unit"> slack</span>}
            </th>
            <td>{member.role ?? ''}</td>
            <td>
              {change === null ? (
                member.section
              ) : (
                <Link href={change(member.id)} prefetch={false} title={`Change the section of ${member.id}`}>
                  {member.section}
                </Link>
              )}
            </td>
            <Num value={length} quantity="length" units={units} decimals={2} />
            <Num value={extremes?.N.max} quantity="force" units={units} decimals={1} />
            <Num value={extremes?.N.min} quantity="force" units={units} decimals={1} />
            <Num value={extremes?.V.max} quantity="force" units={units} decimals={1} />
            <Num value={extremes?.V.min} quantity="force" units={units} decimals={1} />
            <Num value={extremes?.M.max} quantity="moment" units={units} decimals={1} />
            <Num value={extremes?.M.maxAt} quantity="length" units={units} decimals={2} />
            <Num value={extremes?.M.min} quantity="moment" units={units} decimals={1} />
            <Num value={extremes?.M.minAt} quantity="length" units={units} decimals={2} />
            <Num value={extremes?.deflection.value} quantity="displacement" units={units} decimals={1} />
            <td className="num">
              <RatioText ratio={member.ratio} verdict={member.verdict} nearLimit={nearLimit} />
            </td>
            <td>
              <VerdictMark verdict={member.verdict} word />
            </td>
          </tr>
        );
      })}
    </Figures>
  );
}

export function MovementsTable({ drawing, result }: FiguresProps) {
  const { units, nodes } = drawing;
  const heads: Head[] = [
    { label: 'Node' },
    { label: 'Place' },
    { label: 'ux', quantity: 'displacement' },
    { label: 'uy', quantity: 'displacement' },
    { label: 'rz', quantity: 'rotation' },
  ];
  return (
    <Figures caption={`Movements of nodes, ${result.name}`} heads={heads} units={units}>
      {nodes.map((node, index) => {
        const moved = result.displacements[index];
        return (
          <tr key={node.id}>
            <th scope="row">{node.id}</th>
            <td>{node.place ?? ''}</td>
            <Num value={moved?.ux} quantity="displacement" units={units} decimals={1} />
            <Num value={moved?.uy} quantity="displacement" units={units} decimals={1} />
            <Num value={moved?.rz} quantity="rotation" units={units} decimals={5} />
          </tr>
        );
      })}
    </Figures>
  );
}

export function ReactionsTable({ drawing, result }: FiguresProps) {
  const { units, nodes, supports } = drawing;
  const heads: Head[] = [
    { label: 'Support' },
    { label: 'Fx', quantity: 'force' },
    { label: 'Fy', quantity: 'force' },
    { label: 'Mz', quantity: 'moment' },
  ];
  return (
    <Figures caption={`Reactions, ${result.name}`} heads={heads} units={units}>
      {supports.map((support, index) => {
        const reaction = result.reactions[index];
        return (
          <tr key={support.node}>
            <th scope="row">{nodes[support.node]?.id ?? ''}</th>
            <Num value={reaction?.Fx} quantity="force" units={units} decimals={1} />
            <Num value={reaction?.Fy} quantity="force" units={units} decimals={1} />
            <Num value={reaction?.Mz} quantity="moment" units={units} decimals={1} />
          </tr>
        );
      })}
    </Figures>
  );
}

interface TableProps {
  readonly caption: string;
  readonly heads: readonly Head[];
  readonly units: System;
  readonly children: ReactNode;
}

function Figures({ caption, heads, units, children }: TableProps) {
  return (
    <div className="tbl-wrap overflow-x-auto" role="region" tabIndex={0} aria-label={caption}>
      <table className="tbl">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            {heads.map(({ label, quantity, num }, index) => (
              <th key={`${label}${index}`} scope="col" className={quantity || num ? 'num' : undefined}>
                {label}
                {quantity && <span className="unit">{unitLabel(quantity, units)}</span>}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>{children}</tbody>
      </table>
    </div>
  );
}

interface NumProps {
  readonly value: number | null | undefined;
  readonly quantity: Quantity;
  readonly units: System;
  readonly decimals: number;
}

const Num = ({ value, quantity, units, decimals }: NumProps) => (
  <td className="num">{formatQuantity(value ?? null, quantity, units, { decimals: decimalsIn(units, quantity, decimals) })}</td>
);
