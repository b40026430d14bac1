'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CopyButton } from '@/components/ui/copy-button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { tokenDays, tokenScopes } from '@/lib/access/token-scopes';
import { api } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

interface Made {
  readonly token: { readonly name: string; readonly secret: string };
}

/** Makes a token, shown this once. */
export function MakeToken() {
  const router = useRouter();
  const form = useRef<HTMLFormElement>(null);
  const [scope, setScope] = useState<string>('upload and run');
  const [days, setDays] = useState('90');
  const make = useMutation({
    mutationFn: (name: string) => request<Made>(api.tokens, { method: 'POST', json: { name, scope, days: Number(days) } }),
    onSuccess: () => {
      form.current?.reset();
      router.refresh();
    },
  });
  const fields = make.error instanceof RequestError ? (make.error.body.fields ?? {}) : {};
  return (
    <form
      ref={form}
      className="flex flex-col gap-3"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        make.mutate(String(new FormData(event.currentTarget).get('name') ?? ''));
      }}
    >
      <Field
        label="What it is for"
        name="name"
        maxLength={60}
        required
        autoComplete="off"
        error={fields.name?.[0]}
        className="max-w-90"
      />
      <div>
        <div className="field-head">It may</div>
        <Segments
          label="It may"
          options={tokenScopes.map((one) => ({ value: one, label: one }))}
          value={scope}
          onChange={setScope}
        />
      </div>
      <div>
        <div className="field-head">for</div>
        <Segments
          label="Days"
          options={tokenDays.map((one) => ({ value: String(one), label: `${one} days` }))}
          value={days}
          onChange={setDays}
        />
      </div>
      <p>
        <Button type="submit" disabled={make.isPending}>
          Make a token
        </Button>
      </p>
      {make.isSuccess && (
        <Notice kind="near">
          Copy the token for {make.data.token.name} now; it is not shown again.{' '}
          <code className="mono break-all">{make.data.token.secret}</code>{' '}
          <CopyButton text={make.data.token.secret} what="the token" />
        </Notice>
      )}
      {make.error && Object.keys(fields).length === 0 && <Notice kind="error">{make.error.message}</Notice>}
    </form>
  );
}
