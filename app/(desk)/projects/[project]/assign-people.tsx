'use client';
import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface AssignPeopleProps {
  readonly project: number;
  readonly people: readonly { readonly id: number; readonly name: string; readonly role: string }[];
  readonly assigned: readonly number[];
}

/** Who belongs to a project, ticked by the lead. */
export function AssignPeople({ project, people, assigned }: AssignPeopleProps) {
  const [chosen, setChosen] = useState<ReadonlySet<number>>(() => new Set(assigned));
  const save = useMutation({
    mutationFn: () => request(api.assigned(project), { method: 'PUT', json: { people: [...chosen] } }),
  });
  const toggle = (id: number) => {
    save.reset();
    const next = new Set(chosen);
    if (!next.delete(id)) next.add(id);
    setChosen(next);
  };
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="sr-only">People of this project</legend>
      {people.map(({ id, name, role }) => (
        <label key={id} className="flex items-center gap-2">
          <input type="checkbox" checked={chosen.has(id)} onChange={() => toggle(id)} />
          {name}
          <span className="text-ink2">{role}</span>
        </label>
      ))}
      <p className="flex items-center gap-3">
        <Button onClick={() => save.mutate()} disabled={save.isPending}>
          Assign {chosen.size === 1 ? '1 person' : `${chosen.size} people`}
        </Button>
        <span role="status">{save.isSuccess ? 'Assigned.' : (save.error?.message ?? '')}</span>
      </p>
    </fieldset>
  );
}
