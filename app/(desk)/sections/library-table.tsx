import Link from 'next/link';
import { columnsOfLibrary, libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import type { LibraryRow, LibraryView } from '@/lib/library/library-view';
import { sectionOutline } from '@/lib/library/section-outline';
import { formatNumber } from '@/lib/units/format';

interface LibraryTableProps {
  readonly rows: readonly LibraryRow[];
  readonly view: LibraryView;
  readonly chosen: string | null;
  /** The page's address with some of it changed. */
  readonly at: (changes: Readonly<Record<string, string | null>>) => string;
}

/** Shown in the list; the others stand with the section itself. */
const shown = columnsOfLibrary.filter(({ key }) =>
  ['mass', 'depth', 'width', 'A', 'I', 'W', 'Wpl', 'Iminor', 'It', 'Iw'].includes(key),
);

/** Sections, a row each: a heading sorts by its column, a name shows the section beside the list. */
export function LibraryTable({ rows, view, chosen, at }: LibraryTableProps) {
  const { units, sort } = view;
  return (
    <div className="tbl-scroll" role="region" tabIndex={0} aria-label="Sections of the library">
      <table className="tbl">
        <caption className="sr-only">Sections of the library, properties derived from nominal dimensions</caption>
        <thead>
          <tr>
            <th scope="col">
              <span className="sr-only">Picture</span>
            </th>
            <th scope="col">Designation</th>
            {shown.map(({ key, label, quantity, what }) => {
              const by = sort?.column === key ? sort : null;
              const next = by === null ? key : by.descending ? null : `-${key}`;
              return (
                <th
                  key={key}
                  scope="col"
                  className="num"
                  aria-sort={by === null ? undefined : by.descending ? 'descending' : 'ascending'}
                >
                  <Link className="link" href={at({ sort: next, page: null })} title={`Sort by ${what}`}>
                    {label}
                    {by !== null && (by.descending ? ' ↓' : ' ↑')}
                  </Link>
                  <span className="unit">{libraryUnit(quantity, units)}</span>
                </th>
              );
            })}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ section, row }) => {
            const designation = section.designation ?? section.name;
            const { path, width, depth } = sectionOutline(row.dimensions);
            const size = Math.max(width, depth);
            return (
              <tr key={designation} className={designation === chosen ? 'tbl-selected' : undefined}>
                <td>
                  <svg className="section-mini" viewBox={[-size / 2, -size / 2, size, size].join(' ')} aria-hidden="true">
                    <path d={path} fillRule="evenodd" fill="currentColor" />
                  </svg>
                </td>
                <th scope="row">
                  <Link href={at({ section: designation })} scroll={false}>
                    {designation}
                  </Link>
                </th>
                {shown.map(({ key, quantity, value }) => {
                  const si = value(section);
                  return si === null ? (
                    <td key={key} className="num section-none">
                      not available
                    </td>
                  ) : (
                    <td key={key} className="num">
                      {formatNumber(libraryNumber(si, quantity, units), { significant: 4 })}
                    </td>
                  );
                })}
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
