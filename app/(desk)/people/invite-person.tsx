'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { ProjectTicks, type ProjectTick } from '@/app/_client/project-ticks';
import { RoleChoice } from '@/app/_client/role-choice';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import type { PersonRole } from '@/lib/access/may';
import { api } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

interface Invited {
  readonly invitation: { readonly email: string };
}

/** The lead invites someone by e-mail: role and projects are settled now, name and password by whoever follows the link. */
export function InvitePerson({ projects }: { readonly projects: readonly ProjectTick[] }) {
  const router = useRouter();
  const form = useRef<HTMLFormElement>(null);
  const [role, setRole] = useState<PersonRole>('analyst');
  const [chosen, setChosen] = useState<ReadonlySet<number>>(new Set());
  const invite = useMutation({
    mutationFn: (json: unknown) => request<Invited>(api.invitations, { method: 'POST', json }),
    onSuccess: () => {
      form.current?.reset();
      setChosen(new Set());
      router.refresh();
    },
  });
  const fields = invite.error instanceof RequestError ? (invite.error.body.fields ?? {}) : {};
  return (
    <form
      ref={form}
      className="flex flex-col gap-3"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        const email = String(new FormData(event.currentTarget).get('email') ?? '');
        invite.mutate({ email, role, projects: [...chosen] });
      }}
    >
      <Field label="E-mail" name="email" type="email" required autoComplete="off" error={fields.email?.[0]} />
      <RoleChoice value={role} onChange={setRole} />
      <ProjectTicks projects={projects} chosen={chosen} onChange={setChosen} />
      <p>
        <Button type="submit" look="filled" disabled={invite.isPending}>
          Send the invitation
        </Button>
      </p>
      {invite.isSuccess && (
        <Notice>An invitation is on its way to {invite.data.invitation.email}. It works for seven days.</Notice>
      )}
      {invite.error && Object.keys(fields).length === 0 && <Notice kind="error">{invite.error.message}</Notice>}
    </form>
  );
}
