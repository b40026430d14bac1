'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { AddCombination } from '@/components/combinations/add-combination';
import { type CombinationEdits, noEdits, readEdits } from '@/components/combinations/combination-edits';
import { CombinationTable } from '@/components/combinations/combination-table';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';
import type { CombinationShown } from '@/lib/combinations/shown-combinations';

interface WriteCombinationsProps {
  readonly batch: number;
  readonly letter: string;
  /** The letter that the next revision will have. */
  readonly next: string;
  readonly combinations: readonly CombinationShown[];
  /** Load cases of the batch. */
  readonly cases: readonly string[];
  readonly frames: number;
}

interface Made {
  readonly revision: string;
}

/** Combinations to be changed, left out and added row by row, and written into the next revision's sheet. */
export function WriteCombinations({ batch, letter, next, combinations, cases, frames }: WriteCombinationsProps) {
  const router = useRouter();
  const anyGenerated = combinations.some(({ clause }) => clause !== null);
  const [edits, setEdits] = useState<CombinationEdits | null>(null);
  const [write, setWrite] = useState(anyGenerated);
  const [reason, setReason] = useState('');
  const { change, wrong, ofGenerated } = readEdits(combinations, edits ?? noEdits, write);
  const make = useMutation({
    mutationFn: () =>
      request<Made>(api.part(batch, letter, 'changes'), {
        method: 'POST',
        json: { changes: [change], reason, run: false },
      }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  const fields = make.error instanceof RequestError ? (make.error.body.fields ?? {}) : {};
  const busy = make.isPending || make.isSuccess;
  if (edits === null) {
    return (
      <>
        {combinations.length > 0 ? (
          <CombinationTable combinations={combinations} frames={frames} />
        ) : (
          <p>No combinations: the load cases are analysed one by one, and nothing is checked.</p>
        )}
        <p className="mt-3">
          <Button onClick={() => setEdits(noEdits)}>
            {anyGenerated ? 'Change them, or write them into the sheet' : combinations.length > 0 ? 'Change them' : 'Add some'}
          </Button>
        </p>
      </>
    );
  }
  const edited = change.leaveOut.length + change.factors.length + edits.added.length;
  const writes = change.generated === 'write' && anyGenerated;
  return (
    <form onSubmit={(event) => event.preventDefault()}>
      {combinations.length > 0 && (
        <CombinationTable combinations={combinations} frames={frames} cases={cases} edits={edits} onEdit={setEdits} />
      )}
      {edits.added.length > 0 && (
        <ul className="my-2" aria-label="Rows added">
          {edits.added.map(({ name, purpose, terms }) => (
            <li key={name}>
              <b>{name}</b>, {purpose}: {terms.map((term) => `${term.factor} ${term.case}`).join(', ')}{' '}
              <button
                type="button"
                className="link"
                aria-label={`Take ${name} away again`}
                onClick={() => setEdits({ ...edits, added: edits.added.filter((one) => one.name !== name) })}
              >
                Take it away again
              </button>
            </li>
          ))}
        </ul>
      )}
      <AddCombination
        cases={cases}
        taken={[...combinations, ...edits.added].map(({ name }) => name)}
        onAdd={(added) => setEdits({ ...edits, added: [...edits.added, added] })}
      />
      <div className="make-change">
        {anyGenerated && (
          <label className="flex items-baseline gap-2">
            <input type="checkbox" checked={writes} disabled={ofGenerated} onChange={(event) => setWrite(event.target.checked)} />
            Write the generated ones into the sheet too{ofGenerated && ', since one of them is changed'}
          </label>
        )}
        <p role="status">
          {words(change.leaveOut.length, change.factors.length, edits.added.length)}{' '}
          {writes
            ? `The rows are written into Combinations of revision ${next}, and nothing is generated there any more`
            : `Combinations of revision ${next} is written so`}
          ; {letter} stays as it is.
        </p>
        {wrong !== null && <Notice kind="error">{wrong}</Notice>}
        <Field
          label="Why they are written"
          hint="It stands at the head of the new revision and in the activity of the project."
          maxLength={500}
          value={reason}
          error={fields['reason']?.[0] ?? null}
          disabled={busy}
          onChange={(event) => setReason(event.target.value)}
        />
        {make.error && !fields['reason'] && <Notice kind="error">{make.error.message}</Notice>}
        <div className="make-change-acts">
          <Button look="filled" disabled={busy || wrong !== null || (edited === 0 && !writes)} onClick={() => make.mutate()}>
            Make revision {next}
          </Button>
          <Button disabled={busy} onClick={() => setEdits(null)}>
            Leave them as they are
          </Button>
        </div>
      </div>
    </form>
  );
}

function words(out: number, changed: number, added: number): string {
  if (out + changed + added === 0) return 'All are kept as they are.';
  const parts = [
    ...(out > 0 ? [`${out} ${out === 1 ? 'is' : 'are'} left out`] : []),
    ...(changed > 0 ? [`${changed} ${changed === 1 ? 'factor is' : 'factors are'} changed`] : []),
    ...(added > 0 ? [`${added} ${added === 1 ? 'is' : 'are'} added`] : []),
  ];
  return `${parts.join(', ')}.`;
}
