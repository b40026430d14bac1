import { libraryColumn, libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import { formatNumber } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';

export interface SectionOffered {
  readonly designation: string | null;
  /** Null of the office's own. */
  readonly range: string | null;
  readonly standard: string;
  /** SI by the library's column. */
  readonly properties: Readonly<Record<string, number | null>>;
}

interface SectionOffersProps {
  readonly offered: readonly SectionOffered[];
  readonly suggestion: string | null;
  readonly typed: string;
  readonly chosen: string | null;
  readonly units: System;
  readonly onChoose: (section: string) => void;
}

const mostShown = 40;
const columns = ['mass', 'A', 'I', 'W'].flatMap((key) => libraryColumn(key) ?? []);

/** Sections that fit what is typed, side by side; a button takes one. */
export function SectionOffers({ offered, suggestion, typed, chosen, units, onChoose }: SectionOffersProps) {
  const shown = offered.slice(0, mostShown);
  return (
    <>
      {suggestion !== null && (
        <p role="status">
          No section of the library is called so. Did you mean{' '}
          <button type="button" className="link" onClick={() => onChoose(suggestion)}>
            {suggestion}
          </button>
          ?
        </p>
      )}
      {shown.length === 0 && (
        <p>
          <button type="button" className="link" onClick={() => onChoose(typed)}>
            Take “{typed}” of the Sections sheet
          </button>
        </p>
      )}
      {shown.length > 0 && (
        <div className="tbl-scroll section-members" role="region" tabIndex={0} aria-label="Sections that fit">
          <table className="tbl">
            <caption className="sr-only">Sections that fit, properties derived</caption>
            <thead>
              <tr>
                <th scope="col">Section</th>
                <th scope="col">Standard</th>
                {columns.map(({ key, label, quantity }) => (
                  <th key={key} scope="col" className="num">
                    {label}
                    <span className="unit">{libraryUnit(quantity, units)}</span>
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {shown.map(({ designation, standard, properties }) => (
                <tr key={designation} className={designation === chosen ? 'tbl-selected' : undefined}>
                  <th scope="row">
                    <button
                      type="button"
                      className="link"
                      aria-pressed={designation === chosen}
                      onClick={() => onChoose(designation ?? '')}
                    >
                      {designation}
                    </button>
                  </th>
                  <td>{standard}</td>
                  {columns.map(({ key, quantity }) => {
                    const si = properties[key] ?? null;
                    return (
                      <td key={key} className="num">
                        {si === null ? 'not available' : formatNumber(libraryNumber(si, quantity, units), { significant: 4 })}
                      </td>
                    );
                  })}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      {offered.length > mostShown && <p>{offered.length - mostShown} more fit. Type more of the designation.</p>}
    </>
  );
}
