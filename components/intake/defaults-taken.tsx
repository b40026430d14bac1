import type { DefaultLine } from './intake-data';

/** Settings the Setup sheet is silent about, and what was taken instead. */
export function DefaultsTaken({ defaults }: { readonly defaults: readonly DefaultLine[] }) {
  return (
    <table className="tbl">
      <caption className="sr-only">Taken as default</caption>
      <tbody>
        {defaults.map((line) => (
          <tr key={line.setting}>
            <td>{line.setting}</td>
            <td className="num">
              {line.value}
              {line.source !== 'default' && <span className="unit"> from the {line.source}</span>}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
