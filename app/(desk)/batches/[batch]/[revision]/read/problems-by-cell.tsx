'use client';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { CellFragment } from '@/components/intake/cell-fragment';
import type { CellFragment as Fragment, ProblemLine } from '@/components/intake/intake-data';
import { ProblemList } from '@/components/intake/problem-list';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface ProblemsByCellProps {
  readonly batch: number;
  readonly letter: string;
  readonly problems: readonly ProblemLine[];
}

/** The problems, and the very cell of the chosen one in a piece of the sender's sheet. */
export function ProblemsByCell({ batch, letter, problems }: ProblemsByCellProps) {
  const [selected, setSelected] = useState(problems.find((problem) => placeOf(problem) !== null)?.id ?? null);
  const problem = problems.find((one) => one.id === selected) ?? null;
  const place = problem === null ? null : placeOf(problem);
  const fragment = useQuery({
    queryKey: ['cell', batch, letter, place],
    queryFn: ({ signal }) => request<{ fragment: Fragment }>(`${api.part(batch, letter, 'cell')}?${place ?? ''}`, { signal }),
    enabled: place !== null,
    placeholderData: keepPreviousData,
  });
  return (
    <>
      <ProblemList problems={problems} selected={selected} onSelect={setSelected} />
      {problem && place !== null && fragment.data && !fragment.isPlaceholderData && (
        <div className="mt-3">
          <div className="zone-head">
            <h3>The cell in your sheet</h3>
            <span className="zone-note">{problem.sheet}, as the marked copy shows it</span>
          </div>
          <CellFragment fragment={fragment.data.fragment} note={problem.message} severity={problem.severity} />
        </div>
      )}
    </>
  );
}

/** The query that finds a problem's cell or row; null where it stands at neither. */
function placeOf({ sheet, cell }: ProblemLine): string | null {
  if (sheet === null || cell === null) return null;
  const row = /^row (\d+)$/.exec(cell)?.[1];
  return new URLSearchParams(row === undefined ? { sheet, cell } : { sheet, row }).toString();
}
