'use client';
import { useMutation } from '@tanstack/react-query';
import { SignInRow } from '@/components/sign-in/sign-in-sheet';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { passwordLength } from '@/lib/access/password-length';
import { api } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';
import { signIn } from './credentials';

interface LinkFormProps {
  /** The secret of the link that led here. */
  readonly token: string;
  /** Whose: shown, and then signed in. Null where only a password is chosen. */
  readonly email: string | null;
}

/** A name and a password for someone invited, or a new password; then on to the work. */
export function LinkForm({ token, email }: LinkFormProps) {
  const invited = email !== null;
  const send = useMutation({
    mutationFn: async ({ name, password }: { readonly name: string; readonly password: string }) => {
      if (!invited) {
        await request(api.passwordReset, { method: 'PUT', json: { token, password } });
        return '/sign-in?changed=1';
      }
      await request(api.invitation, { method: 'POST', json: { token, name, password } });
      return (await signIn(email, password)) === 'yes' ? '/' : '/sign-in';
    },
    onSuccess: (address) => window.location.assign(address),
  });
  const fields = send.error instanceof RequestError ? (send.error.body.fields ?? {}) : {};
  const other = send.error && Object.keys(fields).length === 0 ? send.error.message : null;
  return (
    <form
      method="post"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        const sent = new FormData(event.currentTarget);
        send.mutate({ name: String(sent.get('name') ?? ''), password: String(sent.get('password') ?? '') });
      }}
    >
      {invited && (
        <>
          <SignInRow>
            <Field label="E-mail" name="email" type="email" autoComplete="username" value={email} readOnly />
          </SignInRow>
          <SignInRow>
            <Field
              label="Your name"
              name="name"
              maxLength={120}
              autoComplete="name"
              autoFocus
              required
              error={fields.name?.[0]}
            />
          </SignInRow>
        </>
      )}
      <SignInRow>
        <Field
          label={invited ? 'Password' : 'New password'}
          name="password"
          type="password"
          autoComplete="new-password"
          required
          hint={`At least ${passwordLength.min} characters`}
          error={fields.password?.[0] ?? other}
        />
      </SignInRow>
      <SignInRow>
        <Button look="filled" type="submit" disabled={send.isPending || send.isSuccess}>
          {invited ? 'Begin' : 'Set the password'}
        </Button>
      </SignInRow>
    </form>
  );
}
