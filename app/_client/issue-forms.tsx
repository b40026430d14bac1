'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useRef } from 'react';
import { Area } from '@/components/ui/area';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { request, RequestError } from '@/lib/api/fetch';

const fieldsOf = (error: Error | null) => (error instanceof RequestError ? (error.body.fields ?? {}) : {});

/** Asks the office, about the frame that is chosen or whichever is named. */
export function Ask({ address, frame }: { readonly address: string; readonly frame: string }) {
  const router = useRouter();
  const form = useRef<HTMLFormElement>(null);
  const ask = useMutation({
    mutationFn: (json: object) => request(address, { method: 'POST', json }),
    onSuccess: () => {
      form.current?.reset();
      router.refresh();
    },
  });
  const fields = fieldsOf(ask.error);
  return (
    <form
      ref={form}
      className="issue-ask flex flex-col gap-2"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        const sent = new FormData(event.currentTarget);
        const named = String(sent.get('frame') ?? '').trim();
        ask.mutate({ text: String(sent.get('text') ?? ''), ...(named === '' ? {} : { frame: named }) });
      }}
    >
      <Field
        key={frame}
        label="Frame"
        name="frame"
        defaultValue={frame}
        maxLength={100}
        autoComplete="off"
        error={fields.frame?.[0]}
        hint="Its name; leave it empty to ask about the whole issue."
      />
      <Area label="Question" name="text" maxLength={2000} required error={fields.text?.[0]} />
      <p>
        <Button type="submit" disabled={ask.isPending}>
          Send to the office
        </Button>
      </p>
      <div role="status">{ask.isSuccess && 'Sent. The office answers here, and you get an e-mail.'}</div>
      {ask.error && Object.keys(fields).length === 0 && <Notice kind="error">{ask.error.message}</Notice>}
    </form>
  );
}

/** More said to a question. */
export function Say({ address, label, button }: { readonly address: string; readonly label: string; readonly button: string }) {
  const router = useRouter();
  const form = useRef<HTMLFormElement>(null);
  const say = useMutation({
    mutationFn: (text: string) => request(address, { method: 'POST', json: { text } }),
    onSuccess: () => {
      form.current?.reset();
      router.refresh();
    },
  });
  return (
    <form
      ref={form}
      className="issue-ask flex flex-col gap-2"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        say.mutate(String(new FormData(event.currentTarget).get('text') ?? ''));
      }}
    >
      <Area label={label} name="text" rows={2} maxLength={2000} required error={say.error?.message} />
      <p>
        <Button type="submit" disabled={say.isPending}>
          {button}
        </Button>
      </p>
    </form>
  );
}

/** Acknowledges receipt, once. */
export function Acknowledge({ address, number }: { readonly address: string; readonly number: string }) {
  const router = useRouter();
  const acknowledge = useMutation({
    mutationFn: () => request(address, { method: 'POST' }),
    onSuccess: () => router.refresh(),
  });
  return (
    <p className="flex flex-wrap items-center gap-3 pt-3">
      <Button onClick={() => acknowledge.mutate()} disabled={acknowledge.isPending}>
        Acknowledge receipt of {number}
      </Button>
      <span role="status">{acknowledge.error?.message ?? ''}</span>
    </p>
  );
}
