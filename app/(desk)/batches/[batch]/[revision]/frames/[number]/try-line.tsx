import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import type { DrawingMember } from '@/lib/drawing/drawing-data';

interface TryLineProps {
  /** Where sections are tried. */
  readonly action: string;
  readonly members: readonly DrawingMember[];
}

/** Another section tried in one line: a form that is its address, so that nothing is brought before it is wanted. */
export function TryLine({ action, members }: TryLineProps) {
  const roles = [...new Set(members.flatMap(({ role }) => (role === null ? [] : [role])))];
  const options = [...roles.map((role) => `role ${role}`), ...members.map(({ id }) => `member ${id}`)];
  return (
    <form className="try-line zone no-print" action={action} aria-label="Try a section">
      <label className="section-pick">
        Try a section on
        <select name="of">
          {options.map((one) => (
            <option key={one} value={one}>
              {one}
            </option>
          ))}
        </select>
      </label>
      <Field label="Section to try" name="to" type="search" placeholder="IPE 330" required />
      <Button type="submit">Try it</Button>
      <p className="try-state">Nothing is stored by a try.</p>
    </form>
  );
}
