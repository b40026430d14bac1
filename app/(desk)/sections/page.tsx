import type { Metadata } from 'next';
import Link from 'next/link';
import { requirePagePerson } from '@/app/_server/page-person';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { Empty, Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { columnsOfLibrary } from '@/lib/library/columns-of-library';
import { libraryRow, libraryRows, libraryViewFrom } from '@/lib/library/library-view';
import { LibraryFilter } from './library-filter';
import { LibraryTable } from './library-table';
import { SectionSheet } from './section-sheet';

export const metadata: Metadata = { title: 'Sections' };

const rowsAtOnce = 100;

/** The section library: standard ranges, filtered and sorted as the address says, and one section in full. */
export default async function SectionsPage({ searchParams }: { readonly searchParams: Promise<SearchParams> }) {
  await requirePagePerson('read sections', pages.sections);
  const params = toParams(await searchParams);
  const { view, wrong } = libraryViewFrom(params);
  const { rows, note, suggestion } = libraryRows(view);
  const asked = Math.floor(Number(params.get('page') ?? '1'));
  const last = Math.max(1, Math.ceil(rows.length / rowsAtOnce));
  const page = Math.min(last, Math.max(1, Number.isFinite(asked) ? asked : 1));
  const shown = rows.slice((page - 1) * rowsAtOnce, page * rowsAtOnce);
  const chosen = libraryRow(params.get('section') ?? '') ?? shown[0] ?? null;
  const at = (changes: Readonly<Record<string, string | null>>): string => {
    const to = new URLSearchParams(params);
    for (const [key, value] of Object.entries(changes)) {
      if (value === null || value === '') to.delete(key);
      else to.set(key, value);
    }
    const text = to.toString();
    return `${pages.sections}${text === '' ? '' : `?${text}`}`;
  };
  const exported = (format: string): string => {
    const to = new URLSearchParams(params);
    for (const key of ['section', 'page']) to.delete(key);
    to.set('format', format);
    return `${api.sections}?${to.toString()}`;
  };
  const list = (
    <Zone
      title="Section library"
      level={1}
      note="standard ranges: nominal dimensions of the standard, properties derived from them"
      aside={
        <>
          <Link className="link" href={pages.own}>
            The office’s own
          </Link>{' '}
          <a className="link" href={exported('csv')} download>
            CSV
          </a>{' '}
          <a className="link" href={exported('xlsx')} download>
            XLSX
          </a>
        </>
      }
    >
      <LibraryFilter view={view} params={params} />
      {Object.values(wrong).map((says) => (
        <Notice key={says} kind="near">
          {says}
        </Notice>
      ))}
      {note && <Notice>Understood as {note}.</Notice>}
      {suggestion !== null && (
        <Notice kind="near">
          No section {view.range === null ? '' : `of ${view.range} `}is called “{view.search}”. Did you mean{' '}
          <Link className="link" href={at({ q: suggestion, range: null, page: null, section: suggestion })}>
            {suggestion}
          </Link>
          ?
        </Notice>
      )}
      {rows.length === 0 ? (
        <Empty>
          <p>No section fits. </p>
          <p>
            <Link className="link" href={pages.sections}>
              Show every section
            </Link>
          </p>
        </Empty>
      ) : (
        <LibraryTable rows={shown} view={view} chosen={chosen?.section.designation ?? null} at={at} />
      )}
      <div className="section-foot">
        <span>
          {rows.length === 1 ? '1 section' : `${rows.length.toLocaleString('en-GB')} sections`}
          {last > 1 && `, ${(page - 1) * rowsAtOnce + 1}–${Math.min(rows.length, page * rowsAtOnce)} shown`}.{' '}
          {columnsOfLibrary.length} properties each are exported.
        </span>
        {last > 1 && (
          <nav aria-label="Pages of sections">
            {page > 1 && (
              <Link className="link" href={at({ page: String(page - 1) })}>
                Previous
              </Link>
            )}{' '}
            page {page} of {last}{' '}
            {page < last && (
              <Link className="link" href={at({ page: String(page + 1) })}>
                Next
              </Link>
            )}
          </nav>
        )}
      </div>
    </Zone>
  );
  return (
    <Sheet>
      <Columns main={list} side={chosen && <SectionSheet chosen={chosen} units={view.units} />} />
    </Sheet>
  );
}
