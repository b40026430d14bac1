import Link from 'next/link';
import type { IssuedFrame } from '@/app/_server/issued-view';
import { LevelBar } from '@/components/ui/level-bar';
import { RatioText } from '@/components/ui/ratio-text';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity } from '@/lib/units/format';
import { quantities, type Quantity, type System } from '@/lib/units/quantity';

interface FramesTableProps {
  readonly rows: readonly IssuedFrame[];
  readonly units: System;
  readonly nearLimit: number;
  readonly chosen: string | null;
  readonly hrefOf: (frame: string) => string;
  /** Questions of the reader's own, by frame. */
  readonly asked: ReadonlyMap<string, number>;
}

/** Parameters and roles that get a column of their own. */
const mostParameters = 2;
const mostRoles = 3;

/** Frames of an issue: what they are made of, their ratio and verdict, and what was accepted of them with its reason. */
export function FramesTable({ rows, units, nearLimit, chosen, hrefOf, asked }: FramesTableProps) {
  const parameters = varying(rows);
  const roles = [...new Set(rows.flatMap(({ sections }) => sections.map(({ role }) => role)))].slice(0, mostRoles);
  return (
    <div className="tbl-wrap" tabIndex={0} role="region" aria-label="Frames of this issue">
      <table className="tbl issue-list">
        <caption className="sr-only">Frames of this issue</caption>
        <thead>
          <tr>
            <th scope="col">Frame</th>
            {parameters.map(({ name, quantity }) => (
              <th key={name} scope="col" className="num issue-wide">
                {capital(name)} <span className="unit">{unitLabel(quantity, units)}</span>
              </th>
            ))}
            {roles.map((role) => (
              <th key={role} scope="col" className="issue-wide">
                {capital(role)}
              </th>
            ))}
            <th scope="col" className="num">
              Ratio
            </th>
            <th scope="col" className="issue-wide" aria-label="Level" />
            <th scope="col">Verdict</th>
            <th scope="col">Questions</th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.number} className={row.id === chosen ? 'is-here' : ''}>
              <th scope="row">
                <Link href={hrefOf(row.id)} scroll={false}>
                  {row.id}
                </Link>
              </th>
              {parameters.map(({ name, quantity }) => (
                <td key={name} className="num issue-wide">
                  {formatQuantity(row.parameters.find((one) => one.name === name)?.value ?? null, quantity, units)}
                </td>
              ))}
              {roles.map((role) => (
                <td key={role} className="issue-wide">
                  {row.sections
                    .filter((one) => one.role === role)
                    .map(({ section }) => section)
                    .join(', ')}
                </td>
              ))}
              <td className="num">
                <RatioText ratio={row.ratio} verdict={row.verdict} nearLimit={nearLimit} />
              </td>
              <td className="issue-wide">
                <LevelBar ratio={row.ratio} verdict={row.verdict} />
              </td>
              <td className="issue-wraps">
                <VerdictMark verdict={row.verdict} word />
                {acceptedLines(row).map((line) => (
                  <div key={line} className="text-ink2">
                    {line}
                  </div>
                ))}
              </td>
              <td>{questions(asked.get(row.id) ?? 0)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** "stability at CA1, CB1: not checked, accepted by B. Checker: the reason", a line for each check and reason. */
function acceptedLines({ id, accepted }: IssuedFrame): string[] {
  const lines = new Map<string, { before: string; where: string[]; after: string }>();
  for (const { check, subject, verdict, reason, by } of accepted) {
    const after = `: ${verdict}, accepted by ${by.name}: ${reason}`;
    const line = lines.get(check + after) ?? { before: check, where: [], after };
    if (subject !== null && subject !== id) line.where.push(subject);
    lines.set(check + after, line);
  }
  return [...lines.values()].map(
    ({ before, where, after }) => `${before}${where.length > 0 ? ` at ${where.join(', ')}` : ''}${after}`,
  );
}

const capital = (word: string): string => word[0]!.toUpperCase() + word.slice(1);
const questions = (n: number): string => (n === 0 ? '' : n === 1 ? '1 question' : `${n} questions`);

/** Parameters that differ between the frames, a span before all others. */
function varying(rows: readonly IssuedFrame[]): { name: string; quantity: Quantity }[] {
  const values = new Map<string, { quantity: Quantity; seen: Set<number> }>();
  for (const { parameters } of rows)
    for (const { name, value, quantity } of parameters) {
      const known = quantities.find((one) => one === quantity);
      if (known === undefined) continue;
      const one = values.get(name) ?? { quantity: known, seen: new Set() };
      one.seen.add(value);
      values.set(name, one);
    }
  const first = (name: string): number => (/^(span|reach)$/i.test(name) ? 0 : /^(eaves|height)/i.test(name) ? 1 : 2);
  return [...values]
    .filter(([, { seen }]) => seen.size > 1)
    .sort(([a], [b]) => first(a) - first(b))
    .slice(0, mostParameters)
    .map(([name, { quantity }]) => ({ name, quantity }));
}
