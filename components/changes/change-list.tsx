export interface ChangeShown {
  readonly what: string;
  readonly from: string;
  readonly to: string;
}

/** Changes, a line each: what, its value before and after. */
export function ChangeList({ changes }: { readonly changes: readonly ChangeShown[] }) {
  return (
    <ul className="change-list">
      {changes.map(({ what, from, to }) => (
        <li key={what}>
          {what}: <s className="change-from">{from}</s> <span aria-hidden="true">→</span>
          <span className="sr-only"> becomes </span> <b>{to}</b>
        </li>
      ))}
    </ul>
  );
}
