import { SeverityMark } from '../ui/severity-mark';
import type { SheetLine } from './intake-data';

interface WhatWasReadProps {
  readonly sheets: readonly SheetLine[];
  /** "saltmere_frames_v7.xlsx, 1.9 MB, 10 sheets, read in 1.4 s" */
  readonly summary: string;
  readonly selected?: string | null;
  readonly onSelect?: (sheet: string) => void;
}

/** Each sheet as it was recognised: rows, headings matched, problems. */
export function WhatWasRead({ sheets, summary, selected, onSelect }: WhatWasReadProps) {
  const several = new Set(sheets.map((sheet) => sheet.file)).size > 1;
  return (
    <>
      <p className="intake-summary">{summary}</p>
      <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Sheets as read">
        <table className="tbl tbl-tight">
          <caption className="sr-only">Sheets as read</caption>
          <thead>
            <tr>
              <th scope="col">Sheet</th>
              <th scope="col" className="num">
                Rows
              </th>
              <th scope="col">Headings matched</th>
              <th scope="col" className="num">
                Problems
              </th>
            </tr>
          </thead>
          <tbody>
            {sheets.map((sheet) => (
              <tr key={`${sheet.file}:${sheet.name}`} className={selected === sheet.name ? 'tbl-selected' : undefined}>
                <th scope="row">
                  {onSelect && sheet.known ? (
                    <button type="button" className="tbl-sort" onClick={() => onSelect(sheet.name)}>
                      {sheet.name}
                    </button>
                  ) : (
                    sheet.name
                  )}
                  {several && sheet.file && <span className="unit block">{sheet.file}</span>}
                </th>
                <td className="num">{sheet.rows.toLocaleString('en-GB')}</td>
                <td>{headings(sheet)}</td>
                <td className="num">
                  <Counts sheet={sheet} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </>
  );
}

function headings(sheet: SheetLine) {
  if (!sheet.known) return <span className="text-ink2">not a sheet it knows</span>;
  if (sheet.headings === 0) return <span className="text-ink2">none found</span>;
  return sheet.headings === sheet.headingsKnown ? `all ${sheet.headings}` : `${sheet.headingsKnown} of ${sheet.headings}`;
}

function Counts({ sheet }: { readonly sheet: SheetLine }) {
  if (sheet.errors + sheet.warnings + sheet.notes === 0) return <span className="text-ink3">none</span>;
  const parts = [
    { n: sheet.errors, severity: 'error' },
    { n: sheet.warnings, severity: 'warning' },
    { n: sheet.notes, severity: 'note' },
  ] as const;
  return parts
    .filter((part) => part.n > 0)
    .map(({ n, severity }) => (
      <span key={severity} className={`sheet-count severity-${severity}`}>
        <SeverityMark severity={severity} word={false} /> {n.toLocaleString('en-GB')}
      </span>
    ));
}
