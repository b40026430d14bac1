'use client';
import { useMutation } from '@tanstack/react-query';
import { useRef } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { passwordLength } from '@/lib/access/password-length';
import { api } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

/** Changes one’s own password. */
export function OwnPassword({ email }: { readonly email: string }) {
  const form = useRef<HTMLFormElement>(null);
  const change = useMutation({
    mutationFn: (json: unknown) => request(api.ownPassword, { method: 'PUT', json }),
    onSuccess: () => form.current?.reset(),
  });
  const fields = change.error instanceof RequestError ? (change.error.body.fields ?? {}) : {};
  return (
    <form
      ref={form}
      className="flex flex-col gap-3"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        const sent = new FormData(event.currentTarget);
        change.mutate({ current: String(sent.get('current') ?? ''), password: String(sent.get('password') ?? '') });
      }}
    >
      {/* For password managers, which keep a password by its account. */}
      <input type="hidden" name="email" autoComplete="username" value={email} readOnly />
      <Field
        label="The password you have now"
        name="current"
        type="password"
        autoComplete="current-password"
        required
        error={fields.current?.[0]}
      />
      <Field
        label="The new one"
        name="password"
        type="password"
        autoComplete="new-password"
        required
        error={fields.password?.[0]}
        hint={`At least ${passwordLength.min} characters`}
      />
      <p>
        <Button type="submit" disabled={change.isPending}>
          Change the password
        </Button>
      </p>
      {change.isSuccess && <Notice>Your password is changed. Other sessions have ended.</Notice>}
      {change.error && Object.keys(fields).length === 0 && <Notice kind="error">{change.error.message}</Notice>}
    </form>
  );
}
