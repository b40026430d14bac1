import type { OfficeRule } from '@/lib/combinations/office-set';

/** The rules of a set: what each holds, for what, and where it is from. */
export function RuleTable({ rules }: { readonly rules: readonly OfficeRule[] }) {
  return (
    <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Rules">
      <table className="tbl tbl-tight">
        <caption className="sr-only">Rules of the set</caption>
        <thead>
          <tr>
            <th scope="col">From</th>
            <th scope="col">Purpose</th>
            <th scope="col">Rule</th>
            <th scope="col">Name ends in</th>
          </tr>
        </thead>
        <tbody>
          {rules.map(({ from, purpose, rule, suffix }, i) => (
            <tr key={`${i} ${rule}`}>
              <th scope="row">{from}</th>
              <td>{purpose}</td>
              <td>{rule}</td>
              <td>{suffix === '' ? '–' : `(${suffix})`}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
