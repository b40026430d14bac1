'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { CombinationTable, type CombinationEdits } from '@/components/combinations/combination-table';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';
import { editedFactor } from '@/lib/combinations/edited-factor';
import type { CombinationShown } from '@/lib/combinations/shown-combinations';

interface WriteCombinationsProps {
  readonly batch: number;
  readonly letter: string;
  /** The letter that the next revision will have. */
  readonly next: string;
  readonly combinations: readonly CombinationShown[];
  readonly frames: number;
}

interface Made {
  readonly revision: string;
}

const none: CombinationEdits = { leftOut: new Set(), factors: {} };

/** The generated combinations, to be changed or left out row by row, and written into the next revision's sheet. */
export function WriteCombinations({ batch, letter, next, combinations, frames }: WriteCombinationsProps) {
  const router = useRouter();
  const [edits, setEdits] = useState<CombinationEdits | null>(null);
  const [reason, setReason] = useState('');
  const given = combinations.flatMap(({ name, terms }) =>
    terms.flatMap((term) => {
      const typed = edits?.factors[`${name}|${term.case}`];
      return typed === undefined ? [] : [{ combination: name, case: term.case, was: term.factor, factor: editedFactor(typed) }];
    }),
  );
  const wrong = given.find(({ factor }) => factor === null);
  const factors = given.flatMap(({ combination, case: of, was, factor }) =>
    factor === null || factor === was ? [] : [{ combination, case: of, factor }],
  );
  const leaveOut = [...(edits?.leftOut ?? [])];
  const make = useMutation({
    mutationFn: () =>
      request<Made>(api.part(batch, letter, 'changes'), {
        method: 'POST',
        json: { changes: [{ kind: 'list combinations', leaveOut, factors }], reason, run: false },
      }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  const fields = make.error instanceof RequestError ? (make.error.body.fields ?? {}) : {};
  const busy = make.isPending || make.isSuccess;
  if (edits === null) {
    return (
      <>
        <CombinationTable combinations={combinations} frames={frames} />
        <p className="mt-3">
          <Button onClick={() => setEdits(none)}>Change them, or write them into the sheet</Button>
        </p>
      </>
    );
  }
  return (
    <form onSubmit={(event) => event.preventDefault()}>
      <CombinationTable combinations={combinations} frames={frames} edits={edits} onEdit={setEdits} />
      <div className="make-change">
        <p role="status">
          {words(leaveOut.length, factors.length)} The rows are written into Combinations of revision {next}, and nothing is
          generated there any more; {letter} stays as it is.
        </p>
        {wrong && <Notice kind="error">{`The factor on ${wrong.case} in ${wrong.combination} is no number.`}</Notice>}
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
          <Button look="filled" disabled={busy || wrong !== undefined} onClick={() => make.mutate()}>
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

function words(out: number, changed: number): string {
  if (out + changed === 0) return 'All are kept as they were generated.';
  const parts = [
    ...(out > 0 ? [`${out} ${out === 1 ? 'is' : 'are'} left out`] : []),
    ...(changed > 0 ? [`${changed} ${changed === 1 ? 'factor is' : 'factors are'} changed`] : []),
  ];
  return `${parts.join(', ')}.`;
}
