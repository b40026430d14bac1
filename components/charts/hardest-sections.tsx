import { RatioText } from '../ui/ratio-text';
import type { SectionWork } from './charts-data';

/** Sections working hardest: members, median and worst governing ratio. */
export function HardestSections({
  sections,
  nearLimit,
}: {
  readonly sections: readonly SectionWork[];
  readonly nearLimit: number;
}) {
  return (
    <table className="tbl tbl-side">
      <caption className="sr-only">Sections working hardest</caption>
      <thead>
        <tr>
          <th scope="col">Section</th>
          <th scope="col" className="num">
            members
          </th>
          <th scope="col" className="num">
            median
          </th>
          <th scope="col" className="num">
            worst
          </th>
        </tr>
      </thead>
      <tbody>
        {sections.map((row) => (
          <tr key={row.section}>
            <th scope="row">{row.section}</th>
            <td className="num">{row.members.toLocaleString('en-GB')}</td>
            <td className="num">
              <span className="font-normal">{row.median === null ? '–' : row.median.toFixed(2)}</span>
            </td>
            <td className="num">
              <RatioText ratio={row.worst} verdict={row.verdict} nearLimit={nearLimit} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
