'use client';
import { useMutation } from '@tanstack/react-query';
import Link from 'next/link';
import { SignInRow } from '@/components/sign-in/sign-in-sheet';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

/** Asks for a link by e-mail; says the same to everyone. */
export function AskForPassword() {
  const ask = useMutation({
    mutationFn: (email: string) => request(api.passwordReset, { method: 'POST', json: { email } }),
  });
  return (
    <form
      method="post"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        ask.mutate(String(new FormData(event.currentTarget).get('email') ?? ''));
      }}
    >
      <SignInRow>
        <Field label="E-mail" name="email" type="email" autoComplete="username" autoFocus required error={ask.error?.message} />
      </SignInRow>
      <SignInRow>
        <span className="flex flex-wrap items-center justify-between gap-3">
          <Button look="filled" type="submit" disabled={ask.isPending}>
            Send a link
          </Button>
          <Link className="link" href={pages.signIn}>
            Back to sign in
          </Link>
        </span>
      </SignInRow>
      {ask.isSuccess && (
        <SignInRow>
          <Notice>If the address is someone’s here, a link to choose a new password is on its way. It works for an hour.</Notice>
        </SignInRow>
      )}
    </form>
  );
}
