'use client';
import { useLayoutEffect, useRef, useState } from 'react';
import type { CellFragment as Fragment, FragmentRow } from './intake-data';

interface CellFragmentProps {
  readonly fragment: Fragment;
  /** What the problem at the ringed cell means; written beside the ring in red pencil. */
  readonly note: string;
  readonly severity?: 'error' | 'warning' | 'note';
}

/** The very cell, in a piece of the sender's own sheet, ringed and noted in red pencil as in the marked copy. */
export function CellFragment({ fragment, note, severity = 'error' }: CellFragmentProps) {
  const ring = useRef<HTMLTableCellElement>(null);
  const said = useRef<HTMLParagraphElement>(null);
  const [under, setUnder] = useState(34);
  useLayoutEffect(() => {
    const [cell, text] = [ring.current, said.current];
    const wrap = cell?.closest('.tbl-wrap');
    if (!cell || !text || !wrap) return;
    const room = wrap.clientWidth;
    wrap.scrollLeft = Math.max(0, cell.offsetLeft + cell.offsetWidth - room + 24);
    setUnder(Math.max(0, Math.min(cell.offsetLeft - wrap.scrollLeft, room - Math.min(340, room))));
  }, [fragment]);
  const ringed = /^([A-Z]+)(\d+)$/.exec(fragment.cell ?? '');
  const column = ringed?.[1] ?? null;
  const row = ringed ? Number(ringed[2]) : fragment.row;
  const line = (one: FragmentRow) => (
    <tr key={one.row}>
      <th scope="row" className={one.row === row ? 'fragment-here' : undefined}>
        {one.row}
      </th>
      {fragment.columns.map((letter, i) => {
        const here = one.row === row && (column === null || letter === column);
        const text = one.cells[i] ?? '';
        return (
          <td
            key={letter}
            ref={here && (column !== null || i === 0) ? ring : undefined}
            className={here ? `fragment-ring fragment-ring-${severity}` : undefined}
          >
            {text}
            {here && text === '' && <span className="sr-only">(blank)</span>}
          </td>
        );
      })}
    </tr>
  );
  const first = fragment.rows[0]?.row ?? 0;
  return (
    <div className="fragment">
      <div className="tbl-wrap" role="region" tabIndex={0} aria-label={`Piece of ${fragment.sheet}`}>
        <table className="fragment-table">
          <caption className="sr-only">
            {fragment.sheet}, around {fragment.cell ?? `row ${fragment.row}`}
          </caption>
          <thead>
            <tr>
              <td />
              {fragment.columns.map((letter) => (
                <th key={letter} scope="col" className={letter === column ? 'fragment-here' : undefined}>
                  {letter}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {fragment.heading && fragment.heading.row < first && (
              <>
                <tr className="fragment-heading">
                  <th scope="row">{fragment.heading.row}</th>
                  {fragment.columns.map((letter, i) => (
                    <td key={letter}>{fragment.heading?.cells[i] ?? ''}</td>
                  ))}
                </tr>
                {fragment.heading.row < first - 1 && (
                  <tr className="fragment-tear" aria-hidden="true">
                    <td colSpan={fragment.columns.length + 1} />
                  </tr>
                )}
              </>
            )}
            {fragment.rows.map(line)}
          </tbody>
        </table>
      </div>
      <p ref={said} className={`pencil pencil-${severity}`} style={{ marginLeft: under }}>
        <svg width="38" height="34" viewBox="0 0 38 34" aria-hidden="true">
          <path d="M36 29C20 32 8 22 6 4M1 10 6 3 13 8" />
        </svg>
        <span>
          <b>{fragment.cell ?? `row ${fragment.row}`}:</b> {note}
        </span>
      </p>
    </div>
  );
}
