'use client';
import { useMutation } from '@tanstack/react-query';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

interface ChooseOfficeSetProps {
  readonly batch: number;
  readonly letter: string;
  readonly next: string;
  readonly sets: readonly { readonly set: number; readonly version: number; readonly name: string }[];
}

const keeping = [
  { value: 'replace', label: 'in place of what is listed' },
  { value: 'keep', label: 'beside what is listed' },
] as const;

/** Combines the frames of the next revision by one of the office's own sets. */
export function ChooseOfficeSet({ batch, letter, next, sets }: ChooseOfficeSetProps) {
  const router = useRouter();
  const id = useId();
  const [chosen, setChosen] = useState('');
  const [listed, setListed] = useState<'keep' | 'replace'>('replace');
  const [reason, setReason] = useState('');
  const set = sets.find((one) => String(one.set) === chosen);
  const make = useMutation({
    mutationFn: () =>
      request<{ revision: string }>(api.part(batch, letter, 'changes'), {
        method: 'POST',
        json: { changes: [{ kind: 'office combinations', set: set?.set, version: set?.version, listed }], reason, run: false },
      }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  const fields = make.error instanceof RequestError ? (make.error.body.fields ?? {}) : {};
  const busy = make.isPending || make.isSuccess;
  return (
    <form className="flex max-w-2xl flex-col gap-3" onSubmit={(event) => event.preventDefault()}>
      <p>
        Its combinations are made from the kinds of the load cases and written into Combinations, row by row, so that the input
        workbook gives the same frames wherever it is read; nothing is generated any more.
      </p>
      <div className="field">
        <div className="field-head">
          <label htmlFor={id}>Combination set of the office</label>
          {set && (
            <Link className="link" href={pages.combinationSet(set.set)}>
              Its rules
            </Link>
          )}
        </div>
        <div className="field-box">
          <select id={id} value={chosen} disabled={busy} onChange={(event) => setChosen(event.target.value)}>
            <option value="">choose …</option>
            {sets.map((one) => (
              <option key={one.set} value={one.set}>
                {one.name}, version {one.version}
              </option>
            ))}
          </select>
        </div>
      </div>
      <Segments
        label="What becomes of listed combinations"
        options={keeping}
        value={listed}
        onChange={(value) => setListed(value === 'keep' ? 'keep' : 'replace')}
      />
      <Field
        label="Why it is chosen"
        maxLength={500}
        value={reason}
        error={fields['reason']?.[0] ?? null}
        disabled={busy}
        onChange={(event) => setReason(event.target.value)}
      />
      {make.error && !fields['reason'] && <Notice kind="error">{make.error.message}</Notice>}
      <p>
        <Button disabled={!set || busy} onClick={() => make.mutate()}>
          Make revision {next} with this set
        </Button>
      </p>
    </form>
  );
}
