'use client';
import { useRef, type KeyboardEvent } from 'react';
import { SeverityMark } from '../ui/severity-mark';
import type { ProblemLine } from './intake-data';

interface ProblemListProps {
  readonly problems: readonly ProblemLine[];
  readonly selected: string | null;
  readonly onSelect: (id: string) => void;
}

/** Problems by cell: what was found, what it means, what to do, and the frames it touches. Arrow keys choose one. */
export function ProblemList({ problems, selected, onSelect }: ProblemListProps) {
  const body = useRef<HTMLTableSectionElement>(null);
  const several = new Set(problems.map((problem) => problem.file)).size > 1;
  const onKeyDown = (event: KeyboardEvent) => {
    const at = problems.findIndex((problem) => problem.id === selected);
    const steps: Record<string, number> = { ArrowDown: at + 1, ArrowUp: Math.max(at - 1, 0), Home: 0, End: problems.length - 1 };
    const to = steps[event.key];
    if (to === undefined) return;
    event.preventDefault();
    const index = Math.min(to, problems.length - 1);
    const next = problems[index];
    if (!next) return;
    onSelect(next.id);
    body.current?.rows[index]?.scrollIntoView?.({ block: 'nearest' });
  };
  return (
    <div
      className="problems"
      role="region"
      aria-label="Problems by cell; arrow keys choose one"
      tabIndex={0}
      onKeyDown={onKeyDown}
    >
      <table className="tbl">
        <caption className="sr-only">Problems by cell</caption>
        <thead>
          <tr>
            <th scope="col">Kind</th>
            <th scope="col">Sheet</th>
            <th scope="col">Cell</th>
            <th scope="col">Found</th>
            <th scope="col">What it means, what to do</th>
            <th scope="col">Frames</th>
          </tr>
        </thead>
        <tbody ref={body}>
          {problems.map((problem) => (
            <tr
              key={problem.id}
              className={problem.id === selected ? 'tbl-selected' : undefined}
              aria-selected={problem.id === selected}
              data-code={problem.code}
              data-cell={problem.cell ?? undefined}
              onClick={() => onSelect(problem.id)}
            >
              <td>
                <SeverityMark severity={problem.severity} />
              </td>
              <th scope="row">
                {problem.sheet ?? problem.file ?? 'the file'}
                {several && problem.sheet && problem.file && <span className="unit block">{problem.file}</span>}
              </th>
              <td className="mono">{problem.cell ?? ''}</td>
              <td className="mono problem-found">
                {problem.found ?? (problem.cell !== null && <span className="text-ink3">(blank)</span>)}
              </td>
              <td className="tc-wordy problem-message">{problem.message}</td>
              <td className="tc-wordy problem-frames">{frameWords(problem)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** "D06-03", "D11-06, D11-07 and 3 more", "all", "none". */
function frameWords(problem: ProblemLine): string {
  if (problem.stopsAll) return 'all';
  const count = problem.frameCount ?? problem.frames.length;
  if (count === 0) return 'none';
  const named = problem.frames.slice(0, count > 3 ? 2 : 3);
  return count > named.length
    ? `${named.join(', ')} and ${(count - named.length).toLocaleString('en-GB')} more`
    : named.join(', ');
}
