'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { RoleChoice } from '@/app/_client/role-choice';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import type { PersonRole } from '@/lib/access/may';
import { passwordLength } from '@/lib/access/password-length';
import { api } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

interface Added {
  readonly person: { readonly name: string; readonly email: string };
}

/** Without e-mail: the lead adds a person with a first password and hands it over. */
export function AddPerson() {
  const router = useRouter();
  const form = useRef<HTMLFormElement>(null);
  const [role, setRole] = useState<PersonRole>('analyst');
  const add = useMutation({
    mutationFn: (json: Record<string, string>) => request<Added>(api.people, { method: 'POST', json }),
    onSuccess: () => {
      form.current?.reset();
      router.refresh();
    },
  });
  const fields = add.error instanceof RequestError ? (add.error.body.fields ?? {}) : {};
  return (
    <form
      ref={form}
      className="flex flex-col gap-3"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        const sent = new FormData(event.currentTarget);
        const text = (name: string) => String(sent.get(name) ?? '');
        add.mutate({ name: text('name'), email: text('email'), password: text('password'), role });
      }}
    >
      <Field label="Name" name="name" maxLength={120} required autoComplete="off" error={fields.name?.[0]} />
      <Field label="E-mail" name="email" type="email" required autoComplete="off" error={fields.email?.[0]} />
      <RoleChoice value={role} onChange={setRole} />
      <Field
        label="First password"
        name="password"
        required
        autoComplete="off"
        error={fields.password?.[0]}
        hint={`At least ${passwordLength.min} characters. Hand it over yourself; it is not sent.`}
      />
      <p>
        <Button type="submit" disabled={add.isPending}>
          Add the person
        </Button>
      </p>
      {add.isSuccess && (
        <Notice>
          {add.data.person.name} can sign in as {add.data.person.email}.
        </Notice>
      )}
      {add.error && Object.keys(fields).length === 0 && <Notice kind="error">{add.error.message}</Notice>}
    </form>
  );
}
