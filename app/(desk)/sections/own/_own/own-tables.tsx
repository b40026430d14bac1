import Link from 'next/link';
import type { OwnPart } from '@/db/queries/own-parts';
import { pages } from '@/lib/api/addresses';
import { libraryColumn, libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import { outlineOfSection } from '@/lib/library/own-outline';
import { formatNumber } from '@/lib/units/format';
import { figuresLine } from './own-figures';

const columns = ['mass', 'depth', 'A', 'I', 'W'].flatMap((key) => libraryColumn(key) ?? []);

const versionText = ({ version, retiredAt }: OwnPart): string =>
  retiredAt === null ? `v${version}` : `v${version}, no longer offered`;

/** Sections by name, each by its latest version, in metric units. */
export function OwnSectionTable({ parts }: { readonly parts: readonly OwnPart[] }) {
  if (parts.length === 0) return <p>The office keeps no section of its own.</p>;
  return (
    <div className="tbl-scroll section-list" role="region" tabIndex={0} aria-label="The office’s own sections, scrolls">
      <table className="tbl">
        <caption className="sr-only">The office’s own sections</caption>
        <thead>
          <tr>
            <th scope="col">
              <span className="sr-only">Picture</span>
            </th>
            <th scope="col">Name</th>
            <th scope="col">Version</th>
            {columns.map(({ key, label, quantity }) => (
              <th key={key} scope="col" className="num">
                {label}
                <span className="unit">{libraryUnit(quantity, 'metric')}</span>
              </th>
            ))}
            <th scope="col">Source</th>
          </tr>
        </thead>
        <tbody>
          {parts.map((part) => {
            const outline = part.section && outlineOfSection(part.section);
            const size = outline ? Math.max(outline.width, outline.depth) : 1;
            return (
              <tr key={part.id}>
                <td>
                  {outline && (
                    <svg className="section-mini" viewBox={[-size / 2, -size / 2, size, size].join(' ')} aria-hidden="true">
                      <path d={outline.path} fillRule="evenodd" fill="currentColor" />
                    </svg>
                  )}
                </td>
                <th scope="row">
                  <Link href={pages.ownPart('section', part.id)}>{part.name}</Link>
                </th>
                <td>{versionText(part)}</td>
                {columns.map(({ key, quantity, value }) => {
                  const si = part.section && value(part.section);
                  return (
                    <td key={key} className="num">
                      {si === null ? '–' : formatNumber(libraryNumber(si, quantity, 'metric'), { significant: 4 })}
                    </td>
                  );
                })}
                <td className="tc-wordy">{part.note === '' ? 'nothing said' : part.note}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

/** Grades by name, each by its latest version, with its figures as they were typed. */
export function GradeTable({ parts }: { readonly parts: readonly OwnPart[] }) {
  if (parts.length === 0) return <p>The office keeps no steel grade of its own.</p>;
  return (
    <div className="tbl-scroll section-list" role="region" tabIndex={0} aria-label="The office’s own steel grades, scrolls">
      <table className="tbl">
        <caption className="sr-only">The office’s own steel grades</caption>
        <thead>
          <tr>
            <th scope="col">Name</th>
            <th scope="col">Version</th>
            <th scope="col">Figures</th>
            <th scope="col">Source</th>
          </tr>
        </thead>
        <tbody>
          {parts.map((part) => (
            <tr key={part.id}>
              <th scope="row">
                <Link href={pages.ownPart('material', part.id)}>{part.name}</Link>
              </th>
              <td>{versionText(part)}</td>
              <td className="tc-wordy">{figuresLine('material', part)}</td>
              <td className="tc-wordy">{part.note === '' ? 'nothing said' : part.note}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
