'use client';
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { formatNumber, formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import { quantities, type Quantity } from '@/lib/units/quantity';
import type { FrameChecking } from '@/app/_server/checking-detail';
import type { FrameCheckingActs } from './use-frame-checking';

const kinds = ['reaction', 'force', 'deflection', 'movement', 'ratio'] as const;
type Kind = (typeof kinds)[number];
const kindWords: Readonly<Record<Kind, string>> = {
  reaction: 'a reaction',
  force: 'N, V or M in a member',
  deflection: 'a member’s largest deflection',
  movement: 'a node’s movement',
  ratio: 'a check’s ratio',
};
const parts: Readonly<Record<Kind, readonly string[]>> = {
  reaction: ['Fx', 'Fy', 'Mz'],
  force: ['N', 'V', 'M'],
  movement: ['ux', 'uy', 'rz'],
  deflection: [],
  ratio: [],
};

/** A checker's own figures beside ours, with the difference; and the field for another. */
export function OwnValues({ marks, acts }: { readonly marks: FrameChecking; readonly acts: FrameCheckingActs }) {
  return (
    <>
      {marks.ownValues.length > 0 && (
        <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Own values">
          <table className="tbl tbl-side">
            <caption className="sr-only">Own values beside ours</caption>
            <thead>
              <tr>
                <th scope="col">Figure</th>
                <th scope="col" className="num">
                  Ours
                </th>
                <th scope="col" className="num">
                  Theirs
                </th>
                <th scope="col" className="num">
                  Difference
                </th>
              </tr>
            </thead>
            <tbody>
              {marks.ownValues.map((one) => {
                const quantity = quantities.find((name) => name === one.quantity) ?? 'number';
                return (
                  <tr key={one.id}>
                    <th scope="row" className="tbl-wraps" title={`${one.by}, ${one.when}, typed ${one.typed}`}>
                      {one.label}
                      <span className="ck-none">
                        {' '}
                        {one.by}, {one.when}
                        {one.note !== '' && `: ${one.note}`}
                      </span>
                    </th>
                    <td className="num">{shown(one.ours, quantity, marks.units)}</td>
                    <td className="num">{shown(one.theirs, quantity, marks.units)}</td>
                    <td className="num">{difference(one.ours, one.theirs)}</td>
                  </tr>
                );
              })}
            </tbody>
          </table>
        </div>
      )}
      {marks.mayMark && <AddOwnValue marks={marks} acts={acts} />}
    </>
  );
}

const shown = (si: number, quantity: Quantity, units: 'metric' | 'us'): string =>
  `${formatQuantity(si, quantity, units, { significant: 4 })} ${unitLabel(quantity, units)}`.trim();

/** Theirs against ours: "−1.2 %". */
function difference(ours: number, theirs: number): string {
  if (ours === 0) return theirs === 0 ? 'none' : 'ours is 0';
  return `${formatNumber((100 * (theirs - ours)) / Math.abs(ours), { decimals: 1 })} %`;
}

function AddOwnValue({ marks, acts }: { readonly marks: FrameChecking; readonly acts: FrameCheckingActs }) {
  const id = useId();
  const { figures, units } = marks;
  const [kind, setKind] = useState<Kind>('reaction');
  const [part, setPart] = useState('Fy');
  const [place, setPlace] = useState('');
  const [result, setResult] = useState(figures.results[0] ?? '');
  const [at, setAt] = useState('0');
  const [value, setValue] = useState('');
  const [note, setNote] = useState('');
  const places =
    kind === 'reaction'
      ? figures.supports.map((node) => ({ value: node, label: node }))
      : kind === 'movement'
        ? figures.nodes.map((node) => ({ value: node, label: node }))
        : kind === 'ratio'
          ? figures.checks.map(({ check, label }) => ({ value: String(check), label }))
          : figures.members.map((member) => ({ value: member, label: member }));
  const chosen = places.some((one) => one.value === place) ? place : (places[0]?.value ?? '');
  const figure = () => {
    if (kind === 'ratio') return { kind, check: Number(chosen) };
    if (kind === 'deflection') return { kind, member: chosen, result };
    if (kind === 'force') return { kind, member: chosen, part, at_m: Number(at.replace(',', '.')) || 0, result };
    return { kind, node: chosen, part, result };
  };
  const keep = () => {
    if (value.trim() === '' || acts.busy) return;
    acts.ownValue({ figure: figure(), value: value.trim(), note: note.trim() }).then(
      () => {
        setValue('');
        setNote('');
      },
      () => undefined, // said above; the figure stays in the field
    );
  };
  const select = (
    label: string,
    name: string,
    options: readonly { value: string; label: string }[],
    now: string,
    set: (to: string) => void,
  ) => (
    <div>
      <label htmlFor={`${id} ${name}`}>{label}</label>
      <select id={`${id} ${name}`} value={now} onChange={(event) => set(event.target.value)}>
        {options.map((one) => (
          <option key={one.value} value={one.value}>
            {one.label}
          </option>
        ))}
      </select>
    </div>
  );
  const field = (label: string, name: string, now: string, set: (to: string) => void) => (
    <div>
      <label htmlFor={`${id} ${name}`}>{label}</label>
      <input
        id={`${id} ${name}`}
        type="text"
        value={now}
        maxLength={name === 'note' ? 500 : 60}
        onChange={(event) => set(event.target.value)}
      />
    </div>
  );
  return (
    <details className="ck-details">
      <summary>Set your own value beside ours</summary>
      <form
        className="ck-form"
        onSubmit={(event) => {
          event.preventDefault();
          keep();
        }}
      >
        <div className="ck-pair">
          {select(
            'Figure',
            'kind',
            kinds.map((one) => ({ value: one, label: kindWords[one] })),
            kind,
            (to) => {
              const next = kinds.find((one) => one === to) ?? 'reaction';
              setKind(next);
              setPart(parts[next][1] ?? '');
            },
          )}
          {select(kind === 'ratio' ? 'Check' : 'Place', 'place', places, chosen, setPlace)}
          {parts[kind].length > 0 &&
            select(
              'Part',
              'part',
              parts[kind].map((one) => ({ value: one, label: one })),
              part,
              setPart,
            )}
          {kind === 'force' && field('Distance from its start, m', 'at', at, setAt)}
          {kind !== 'ratio' &&
            select(
              'Result',
              'result',
              figures.results.map((one) => ({ value: one, label: one })),
              result,
              setResult,
            )}
          {field(`Your value${unitOf(kind, part, units)}`, 'value', value, setValue)}
          {field('Note', 'note', note, setNote)}
        </div>
        <div className="ck-buttons">
          <Button type="submit" look="checker" disabled={acts.busy || value.trim() === ''}>
            Keep my value
          </Button>
        </div>
      </form>
    </details>
  );
}

function unitOf(kind: Kind, part: string, units: 'metric' | 'us'): string {
  const quantity: Quantity =
    kind === 'ratio'
      ? 'number'
      : part === 'rz'
        ? 'rotation'
        : kind === 'movement' || kind === 'deflection'
          ? 'displacement'
          : part === 'M' || part === 'Mz'
            ? 'moment'
            : 'force';
  const unit = unitLabel(quantity, units);
  return unit === '' ? '' : `, ${unit}`;
}
