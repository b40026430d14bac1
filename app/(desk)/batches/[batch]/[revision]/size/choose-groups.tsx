'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { batchRange, mostGroups, officeRange, type SizedBy, type SizingGroup } from '@/lib/sizing/sizing';
import type { System } from '@/lib/units/quantity';
import type { GroupListed } from '@/worker/threads/list-groups';

interface ChooseGroupsProps {
  readonly offered: readonly GroupListed[];
  /** Names of the standard ranges. */
  readonly ranges: readonly string[];
  readonly units: System;
  readonly busy: boolean;
  /** As asked the last time. */
  readonly first: readonly SizingGroup[];
  readonly onSize: (groups: readonly SizingGroup[]) => void;
}

interface Line {
  readonly key: number;
  readonly of: string;
  readonly range: string;
  readonly min: string;
  readonly max: string;
}

const keyOf = ({ by, name }: { readonly by: SizedBy; readonly name: string }): string => `${by} ${name}`;

/** Which members are sized, and from which range: one line a group. */
export function ChooseGroups({ offered, ranges, units, busy, first, onSize }: ChooseGroupsProps) {
  const perUnit = units === 'metric' ? 0.001 : 0.0254;
  const typed = (depth_m: number | null): string => (depth_m === null ? '' : `${Number((depth_m / perUnit).toPrecision(6))}`);
  const free = (lines: readonly Line[]): string => keyOf(offered.find((one) => !lines.some((line) => line.of === keyOf(one))) ?? offered[0] ?? { by: 'role', name: '' }); // prettier-ignore
  const range = units === 'metric' ? 'IPE' : 'W';
  const [lines, setLines] = useState<readonly Line[]>(() =>
    first.length > 0
      ? first.map((group, key) => ({ key, of: keyOf(group), range: group.range, min: typed(group.minDepth_m), max: typed(group.maxDepth_m) }))
      : [{ key: 0, of: free([]), range, min: '', max: '' }],
  ); // prettier-ignore
  const [wrong, setWrong] = useState<string | null>(null);
  const set = (key: number, part: Partial<Line>) => setLines(lines.map((line) => (line.key === key ? { ...line, ...part } : line))); // prettier-ignore
  const depth = (text: string): number | null => (text.trim() === '' ? null : Number(text.replace(',', '.')) * perUnit);
  const size = () => {
    const groups = lines.flatMap(({ of, range: from, min, max }): SizingGroup[] => {
      const group = offered.find((one) => keyOf(one) === of);
      return group ? [{ by: group.by, name: group.name, range: from, minDepth_m: depth(min), maxDepth_m: depth(max) }] : [];
    });
    const bad = groups.some(({ minDepth_m, maxDepth_m }) => Number.isNaN(minDepth_m) || Number.isNaN(maxDepth_m));
    const twice = new Set(groups.map(keyOf)).size < groups.length;
    const sentence = bad ? 'Give depths as numbers, or leave them empty.' : twice ? 'Size each group once.' : null;
    setWrong(sentence);
    if (sentence === null) onSize(groups);
  };
  return (
    <form onSubmit={(event) => event.preventDefault()} aria-label="Members to size">
      <div className="sizing-groups">
        {lines.map(({ key, of, range: from, min, max }, i) => (
          <div key={key} className="sizing-group" role="group" aria-label={`Group ${i + 1}`}>
            <label className="section-pick">
              Members
              <select value={of} onChange={(event) => set(key, { of: event.target.value })}>
                {offered.map((one) => (
                  <option key={keyOf(one)} value={keyOf(one)}>
                    {keyOf(one)} ({one.members.toLocaleString('en-GB')})
                  </option>
                ))}
              </select>
            </label>
            <label className="section-pick">
              Range
              <select value={from} onChange={(event) => set(key, { range: event.target.value })}>
                {[batchRange, officeRange, ...ranges].map((name) => (
                  <option key={name} value={name}>
                    {name}
                  </option>
                ))}
              </select>
            </label>
            <Field
              label="Depth from"
              unit={units === 'metric' ? 'mm' : 'in'}
              inputMode="decimal"
              placeholder="any"
              value={min}
              onChange={(event) => set(key, { min: event.target.value })}
            />{' '}
            {/* prettier-ignore */}
            <Field label="to" unit={units === 'metric' ? 'mm' : 'in'} inputMode="decimal" placeholder="any" value={max} onChange={(event) => set(key, { max: event.target.value })} />{' '}
            {/* prettier-ignore */}
            {lines.length > 1 && (
              <button type="button" className="link" onClick={() => setLines(lines.filter((line) => line.key !== key))}>
                Leave out<span className="sr-only"> group {i + 1}</span>
              </button>
            )}
          </div>
        ))}
      </div>
      {wrong && (
        <p className="field-error" role="alert">
          {wrong}
        </p>
      )}
      <div className="sizing-acts">
        <Button look={first.length > 0 ? 'outline' : 'filled'} disabled={busy || offered.length === 0} onClick={size}>
          Find the lightest
        </Button>
        {lines.length < Math.min(mostGroups, offered.length) && (
          <Button
            disabled={busy}
            onClick={() =>
              setLines([
                ...lines,
                { key: Math.max(...lines.map(({ key }) => key)) + 1, of: free(lines), range, min: '', max: '' },
              ])
            }
          >
            Another group
          </Button>
        )}{' '}
        {/* prettier-ignore */}
      </div>
    </form>
  );
}
