'use client';
import Link from 'next/link';
import { useState, type FormEvent } from 'react';
import { signIn, type SignedIn } from '@/app/_client/credentials';
import { SignInRow } from '@/components/sign-in/sign-in-sheet';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { pages } from '@/lib/api/addresses';

const words: Readonly<Record<Exclude<SignedIn, 'yes'>, string>> = {
  no: 'The e-mail address and the password don’t belong together. Check both, or have a link for a new password sent to you.',
  wait: 'There were too many attempts. Wait a quarter of an hour, then try again.',
  'no answer': 'The server did not answer. Check the connection and try again.',
};

/** The form is the drawing's title block. */
export function SignInForm({ next }: { readonly next: string }) {
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const [email, password] = [String(form.get('email') ?? ''), String(form.get('password') ?? '')];
    if (email === '' || password === '') {
      setFault(email === '' ? 'Enter your e-mail address.' : 'Enter your password.');
      return;
    }
    setBusy(true);
    const answer = await signIn(email, password);
    if (answer === 'yes') {
      window.location.assign(next);
      return;
    }
    setBusy(false);
    setFault(words[answer]);
  };
  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)}>
      <SignInRow>
        <Field label="E-mail" name="email" type="email" autoComplete="username" autoFocus required />
      </SignInRow>
      <SignInRow>
        <Field
          label="Password"
          name="password"
          type="password"
          autoComplete="current-password"
          required
          error={fault}
          aside={
            <Link className="link" href={pages.forgotten}>
              Forgotten
            </Link>
          }
        />
      </SignInRow>
      <SignInRow>
        <Button look="filled" type="submit" disabled={busy}>
          {busy ? 'Signing in' : 'Sign in'}
        </Button>
      </SignInRow>
    </form>
  );
}
