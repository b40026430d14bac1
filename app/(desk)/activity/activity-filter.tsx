import type { ActivityInput } from '@/app/_server/activity';
import { Button } from '@/components/ui/button';

interface ActivityFilterProps {
  readonly action: string;
  readonly chosen: ActivityInput;
  readonly people: readonly { readonly id: number; readonly name: string }[];
  readonly whats: readonly string[];
}

/** By whom, what, and from which day to which; it stands in the address. */
export function ActivityFilter({ action, chosen, people, whats }: ActivityFilterProps) {
  return (
    <form action={action} method="get" className="row-form" role="search" aria-label="Activity">
      <label>
        Who{' '}
        <select name="person" defaultValue={chosen.person ?? ''}>
          <option value="">anyone</option>
          {people.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </select>
      </label>
      <label>
        What{' '}
        <select name="what" defaultValue={chosen.what ?? ''}>
          <option value="">anything</option>
          {whats.map((what) => (
            <option key={what}>{what}</option>
          ))}
        </select>
      </label>
      <label>
        From <input type="date" name="from" defaultValue={chosen.from ?? ''} />
      </label>
      <label>
        to <input type="date" name="to" defaultValue={chosen.to ?? ''} />
      </label>
      <Button type="submit">Show</Button>
    </form>
  );
}
