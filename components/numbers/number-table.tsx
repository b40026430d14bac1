import { CopyButton } from '../ui/copy-button';
import { columnText, tableText } from './number-text';
import type { NumberTable as NumberTableData } from './numbers-data';

/** A matrix or a table of figures with its units; copied whole as text for a spreadsheet. */
export function NumberTable({ table }: { readonly table: NumberTableData }) {
  const { id, title, corner, columns, rows, long } = table;
  const text = columnText(table);
  const units = columns.some(({ unit }) => unit);
  return (
    <div className="numbers-table" id={id}>
      <div className="numbers-head">
        <h3>{title}</h3>
        <CopyButton text={tableText(table)} what={title} />
      </div>
      <div className={`tbl-wrap numbers-wrap ${long ? 'numbers-long' : ''}`} role="region" tabIndex={0} aria-label={title}>
        <table className="tbl tbl-side">
          <caption className="sr-only">{title}</caption>
          <thead>
            <tr>
              <th scope="col">{corner}</th>
              {columns.map(({ label, unit, words }, i) => (
                <th key={`${label}${i}`} scope="col" className={words ? undefined : 'num'}>
                  {label}
                  {units && <span className="unit">{unit ?? ''}</span>}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map(({ label, unit, cells, own }, row) => (
              <tr key={`${label}${row}`} className={own ? 'numbers-own' : long ? 'numbers-other' : undefined}>
                <th scope="row">
                  {label} {unit && <span className="unit-beside">{unit}</span>}
                </th>
                {cells.map((cell, i) => (
                  <td key={i} className={columns[i]?.words ? 'tbl-wraps' : 'num'}>
                    {text[i]?.(cell)}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}
