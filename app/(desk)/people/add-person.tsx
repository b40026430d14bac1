'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { personRoles, type PersonRole } from '@/lib/access/may';
import { passwordLength } from '@/lib/access/password-length';
import { api } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

/** What each role comes to do, as the lead chooses it. */
const does: Readonly<Record<PersonRole, string>> = {
  lead: 'runs the office’s work: everything, people too',
  analyst: 'prepares batches: brings sheets in, mends, runs',
  checker: 'second engineer: reads everything, changes nothing',
  client: 'builds from the results: sees only what is issued',
};

interface Added {
  readonly person: { readonly name: string; readonly email: string };
}

/** The lead adds a person with a first password and hands it over. */
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
      <div>
        <div className="field-head">What they come to do</div>
        <Segments
          label="What they come to do"
          options={personRoles.map((value) => ({ value, label: value }))}
          value={role}
          onChange={(value) => setRole(value as PersonRole)}
        />
        <p className="field-hint">{does[role]}</p>
      </div>
      <Field
        label="First password"
        name="password"
        required
        autoComplete="off"
        error={fields.password?.[0]}
        hint={`At least ${passwordLength.min} characters. Hand it over yourself; it is not sent.`}
      />
      <p>
        <Button type="submit" look="filled" disabled={add.isPending}>
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
