'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import type { ProblemLine } from '@/components/intake/intake-data';
import { ProblemList } from '@/components/intake/problem-list';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';
import type { SectionPreview } from '@/lib/changes/section-preview';
import type { Problem } from '@/lib/problems/problem';

interface SheetAnswer {
  readonly rows: number;
  readonly problems: readonly Problem[];
  readonly more: number;
  readonly refused: string | null;
  readonly frames: number;
  readonly carriedOver: number;
  readonly changes: readonly (Pick<SectionPreview, 'to' | 'from' | 'mass'> & {
    readonly frames: number;
    readonly count: number;
  })[];
}

interface FromSheetProps {
  readonly batch: number;
  readonly letter: string;
  /** The letter that the next revision will have. */
  readonly next: string;
}

const count = (n: number, one: string): string => `${n.toLocaleString('en-GB')} ${n === 1 ? one : `${one}s`}`;

/** Changes from a sheet: what they would do is shown, every slip at its cell, before the next revision is made by them. */
export function FromSheet({ batch, letter, next }: FromSheetProps) {
  const router = useRouter();
  const id = useId();
  const [files, setFiles] = useState<readonly File[]>([]);
  const [reason, setReason] = useState('');
  const [selected, setSelected] = useState<string | null>(null);
  const send = <T,>(of: readonly File[], fields: Readonly<Record<string, string>>): Promise<T> => {
    const form = new FormData();
    for (const [name, value] of Object.entries(fields)) form.append(name, value);
    for (const file of of) form.append('files', file);
    return request<T>(api.changesSheet(batch, letter), { method: 'POST', body: form });
  };
  const look = useMutation({ mutationFn: (of: readonly File[]) => send<SheetAnswer>(of, {}) });
  const make = useMutation({
    mutationFn: (run: boolean) =>
      send<{ readonly revision: string }>(files, { make: 'yes', run: run ? 'yes' : 'no', reason: reason.trim() }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  const read = look.data;
  const wrong = read?.problems.some(({ severity }) => severity === 'error') ?? false;
  const busy = make.isPending || make.isSuccess;
  const reasonError = make.error instanceof RequestError ? (make.error.body.fields?.['reason']?.[0] ?? null) : null;
  const lines = (read?.problems ?? []).map((problem, i): ProblemLine => ({ ...problem, id: String(i) }));
  return (
    <Zone title="From a sheet" note="Changes: frame, member or role, section">
      <p>
        A row gives a member of a frame, a role of a frame, or a role of every frame its section; of rows that fit one member the
        closest holds.{' '}
        <a className="link" href={api.changesSheet(batch, letter, '?format=xlsx')} download>
          Template (XLSX)
        </a>{' '}
        <a className="link" href={api.changesSheet(batch, letter, '?format=csv')} download>
          (CSV)
        </a>
      </p>
      <p>
        <input
          id={id}
          className="sr-only drop-input"
          type="file"
          accept=".xlsx,.csv,.zip"
          disabled={busy}
          onChange={(event) => {
            const chosen = [...(event.target.files ?? [])];
            event.target.value = '';
            if (chosen.length === 0) return;
            setFiles(chosen);
            make.reset();
            look.mutate(chosen);
          }}
        />
        <label htmlFor={id} className="btn btn-outline">
          Choose a Changes sheet
        </label>
      </p>
      {look.isPending && <p role="status">Reading {files[0]?.name} …</p>}
      {look.error && <Notice kind="error">{look.error.message}</Notice>}
      {read?.refused && <Notice kind="error">{read.refused}</Notice>}
      {lines.length > 0 && <ProblemList problems={lines} selected={selected} onSelect={setSelected} />}
      {read && read.more > 0 && <p>{read.more.toLocaleString('en-GB')} more problems are not listed.</p>}
      {wrong && (
        <Notice kind="error">Nothing is changed while a cell is wrong: mend what is named and choose the sheet again.</Notice>
      )}
      {read && read.changes.length > 0 && (
        <>
          <p role="status">
            {files[0]?.name} touches {count(read.frames, 'frame')};{' '}
            {read.carriedOver === 1
              ? '1 other frame keeps its'
              : `${read.carriedOver.toLocaleString('en-GB')} other frames keep their`}{' '}
            results, carried over from {letter}.
          </p>
          <div className="tbl-scroll section-list" role="region" tabIndex={0} aria-label="What the sheet changes">
            <table className="tbl">
              <caption className="sr-only">What the sheet changes</caption>
              <thead>
                <tr>
                  <th scope="col">Section</th>
                  <th scope="col">In place of</th>
                  <th scope="col" className="num">
                    Members
                  </th>
                  <th scope="col" className="num">
                    Frames
                  </th>
                </tr>
              </thead>
              <tbody>
                {read.changes.map(({ to, from, count: members, frames }) => (
                  <tr key={to}>
                    <th scope="row">{to}</th>
                    <td className="tc-wordy">{[...new Set(from.map(({ before }) => before.section))].join(', ')}</td>
                    <td className="num">{members.toLocaleString('en-GB')}</td>
                    <td className="num">{frames.toLocaleString('en-GB')}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
          <form className="make-change" onSubmit={(event) => event.preventDefault()}>
            <Field
              label="Why it is changed by this sheet"
              maxLength={500}
              value={reason}
              error={reasonError}
              disabled={busy}
              onChange={(event) => setReason(event.target.value)}
            />
            {make.error && reasonError === null && <Notice kind="error">{make.error.message}</Notice>}
            <div className="make-change-acts">
              <Button disabled={busy} onClick={() => make.mutate(true)}>
                Make revision {next} by the sheet and run {count(read.frames, 'frame')}
              </Button>
              <Button disabled={busy} onClick={() => make.mutate(false)}>
                Make revision {next} by the sheet
              </Button>
            </div>
          </form>
        </>
      )}
    </Zone>
  );
}
