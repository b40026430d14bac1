import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import type { SectionChange } from '@/lib/changes/change';
import type { MembersOffered } from './members-offered';

interface ChooseMembersProps {
  readonly action: string;
  readonly chosen: SectionChange['what'] | null;
  readonly offered: MembersOffered;
}

/** Which members: by section, role, group and frame; a form that is its address. */
export function ChooseMembers({ action, chosen, offered }: ChooseMembersProps) {
  return (
    <form className="section-filter" action={action} aria-label="Members to change">
      {(['section', 'role', 'group'] as const).map((name) => {
        const values = (offered[name] ?? []).filter(({ value }) => value !== '');
        if (name === 'group' && offered.group === null)
          return <Field key={name} label="Group" name="group" defaultValue={chosen?.group ?? ''} placeholder="any" />;
        if (values.length === 0) return null;
        return (
          <label key={name} className="section-pick">
            {name[0]?.toUpperCase() + name.slice(1)}
            <select name={name} defaultValue={chosen?.[name] ?? ''}>
              <option value="">any</option>
              {values.map(({ value, count }) => (
                <option key={value} value={value}>
                  {count === null ? value : `${value} (${count.toLocaleString('en-GB')})`}
                </option>
              ))}
            </select>
          </label>
        );
      })}
      <Field label="Frame" name="frame" defaultValue={chosen?.frame ?? ''} placeholder="any" />
      <Button type="submit">Choose these members</Button>
    </form>
  );
}
