'use client';
import { Segments } from '@/components/ui/segments';
import { personRoles, type PersonRole } from '@/lib/access/may';

/** What each role comes to do, as the lead chooses it. */
const does: Readonly<Record<PersonRole, string>> = {
  lead: 'runs the office’s work: everything, people too',
  analyst: 'prepares batches: brings sheets in, mends, runs',
  checker: 'second engineer: reads everything, marks, returns or passes; changes nothing',
  client: 'builds from the results: sees only what is issued to their projects',
};

/** One of the four roles, with what it comes to do. */
export function RoleChoice({ value, onChange }: { readonly value: PersonRole; readonly onChange: (role: PersonRole) => void }) {
  return (
    <div>
      <div className="field-head">What they come to do</div>
      <Segments
        label="What they come to do"
        options={personRoles.map((role) => ({ value: role, label: role }))}
        value={value}
        onChange={(role) => onChange(role as PersonRole)}
      />
      <p className="field-hint">{does[value]}</p>
    </div>
  );
}
