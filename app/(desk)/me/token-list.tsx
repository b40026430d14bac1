import { ActButton } from '@/app/_client/act-button';
import { api } from '@/lib/api/addresses';

interface TokenListProps {
  readonly tokens: readonly {
    readonly id: number;
    readonly name: string;
    readonly scope: string;
    readonly made: string;
    readonly until: string;
    readonly used: string;
  }[];
}

/** One’s own tokens that work. */
export function TokenList({ tokens }: TokenListProps) {
  return (
    <div className="tbl-wrap mb-4">
      <table className="tbl">
        <caption className="sr-only">Your tokens</caption>
        <thead>
          <tr>
            <th scope="col">For</th>
            <th scope="col">May</th>
            <th scope="col">Made</th>
            <th scope="col">Until</th>
            <th scope="col">Last used</th>
            <th scope="col">
              <span className="sr-only">Acts</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {tokens.map(({ id, name, scope, made, until, used }) => (
            <tr key={id}>
              <th scope="row">{name}</th>
              <td>{scope}</td>
              <td>{made}</td>
              <td>{until}</td>
              <td>{used}</td>
              <td>
                <ActButton
                  quiet
                  label="Revoke"
                  address={api.token(id)}
                  method="DELETE"
                  question={`Scripts that use ${name} stop working.`}
                />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
