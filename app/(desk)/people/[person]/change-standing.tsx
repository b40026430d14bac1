'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ProjectTicks, type ProjectTick } from '@/app/_client/project-ticks';
import { RoleChoice } from '@/app/_client/role-choice';
import { Button } from '@/components/ui/button';
import type { PersonRole } from '@/lib/access/may';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface ChangeStandingProps {
  readonly person: number;
  readonly role: PersonRole;
  readonly assigned: readonly number[];
  readonly projects: readonly ProjectTick[];
}

/** Role and projects of someone of the office. */
export function ChangeStanding({ person, role, assigned, projects }: ChangeStandingProps) {
  const router = useRouter();
  const [chosenRole, setRole] = useState(role);
  const [chosen, setChosen] = useState<ReadonlySet<number>>(() => new Set(assigned));
  const save = useMutation({
    mutationFn: () => request(api.person(person), { method: 'PUT', json: { role: chosenRole, projects: [...chosen] } }),
    onSuccess: () => router.refresh(),
  });
  return (
    <div className="flex flex-col gap-4">
      <RoleChoice
        value={chosenRole}
        onChange={(value) => {
          save.reset();
          setRole(value);
        }}
      />
      <ProjectTicks
        projects={projects}
        chosen={chosen}
        onChange={(value) => {
          save.reset();
          setChosen(value);
        }}
      />
      <p className="flex items-center gap-3">
        <Button look="filled" onClick={() => save.mutate()} disabled={save.isPending}>
          Save
        </Button>
        <span role="status">{save.isSuccess ? 'Saved.' : (save.error?.message ?? '')}</span>
      </p>
    </div>
  );
}
