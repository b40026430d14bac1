'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { ProblemList } from '@/components/intake/problem-list';
import type { ProblemLine } from '@/components/intake/intake-data';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import type { Problem } from '@/lib/problems/problem';
import type { System } from '@/lib/units/quantity';

interface Answer {
  readonly records: readonly {
    readonly name: string;
    readonly cells: Readonly<Record<string, string>>;
    /** That keeping it makes, or finds unchanged. */
    readonly version: number;
  }[];
  readonly problems: readonly Problem[];
  readonly more: number;
}

/** A table of the office's own from a sheet: looked at first, with every problem at its cell, then kept. */
export function ImportTable({ kind }: { readonly kind: OwnKind }) {
  const router = useRouter();
  const id = useId();
  const [units, setUnits] = useState<System>('metric');
  const [files, setFiles] = useState<readonly File[]>([]);
  const [selected, setSelected] = useState<string | null>(null);
  const send = (keep: boolean, of: readonly File[]): Promise<Answer> => {
    const form = new FormData();
    for (const file of of) form.append('files', file);
    return request<Answer>(api.ownImport(kind, units, keep), { method: 'POST', body: form });
  };
  const look = useMutation({ mutationFn: (of: readonly File[]) => send(false, of) });
  const keep = useMutation({
    mutationFn: () => send(true, files),
    onSuccess: () => {
      router.push(pages.own);
      router.refresh();
    },
  });
  const read = look.data;
  const errors = read?.problems.filter(({ severity }) => severity === 'error').length ?? 0;
  const words = kind === 'section' ? 'section' : 'grade';
  const count = (n: number): string => `${n.toLocaleString('en-GB')} ${n === 1 ? words : `${words}s`}`;
  const lines = (read?.problems ?? []).map((problem, i): ProblemLine => ({ ...problem, id: String(i) }));
  return (
    <>
      <Zone title="The table">
        <p>
          One sheet with a row for each {words}, headings as in Sections and Materials of a batch; its units stand in the headings
          or in a row below them.{' '}
          {kind === 'section' &&
            'Properties that are given (A, Iy or I, Wy, Wply, It …) are used as given; where shape and dimensions stand beside them, what is not given is derived.'}{' '}
          <a className="link" href={api.ownTemplate(kind, units, 'xlsx')} download>
            Template (XLSX)
          </a>{' '}
          <a className="link" href={api.ownTemplate(kind, units, 'csv')} download>
            (CSV)
          </a>
        </p>
        <div className="own-choices">
          <Segments
            label="Units where the headings say none"
            options={[
              { value: 'metric', label: 'metric' },
              { value: 'us', label: 'US' },
            ]}
            value={units}
            onChange={(one) => {
              setUnits(one === 'us' ? 'us' : 'metric');
              look.reset();
            }}
          />
          <span>
            <input
              id={id}
              className="sr-only drop-input"
              type="file"
              multiple
              accept=".xlsx,.csv,.zip"
              onChange={(event) => {
                const chosen = [...(event.target.files ?? [])];
                event.target.value = '';
                if (chosen.length === 0) return;
                setFiles(chosen);
                keep.reset();
                look.mutate(chosen);
              }}
            />
            <label htmlFor={id} className="btn btn-outline">
              Choose a file
            </label>
          </span>
        </div>
        {look.isPending && <p role="status">Reading the table …</p>}
        {look.error && <Notice kind="error">{look.error.message}</Notice>}
      </Zone>
      {read && (
        <Zone title={`${files[0]?.name ?? 'The table'} says`} note={count(read.records.length)}>
          {lines.length > 0 && <ProblemList problems={lines} selected={selected} onSelect={setSelected} />}
          {read.more > 0 && <p>{read.more.toLocaleString('en-GB')} more problems are not listed.</p>}
          {errors > 0 && (
            <Notice kind="error">Nothing is kept while a cell is wrong: mend what is named and choose the file again.</Notice>
          )}
          {read.records.length > 0 && (
            <div className="tbl-scroll section-list section-members" role="region" tabIndex={0} aria-label="What the table says">
              <table className="tbl">
                <caption className="sr-only">What the table says</caption>
                <thead>
                  <tr>
                    <th scope="col">Name</th>
                    <th scope="col">Becomes</th>
                    <th scope="col">Figures</th>
                  </tr>
                </thead>
                <tbody>
                  {read.records.slice(0, 200).map(({ name, cells, version }) => (
                    <tr key={name}>
                      <th scope="row">{name}</th>
                      <td>{version === 1 ? 'new' : `v${version}`}</td>
                      <td className="tc-wordy">
                        {Object.entries(cells)
                          .filter(([column]) => column !== 'published')
                          .map(([column, text]) => `${column} ${text}`)
                          .join(', ')}
                      </td>
                    </tr>
                  ))}
                </tbody>
              </table>
            </div>
          )}
          {keep.error && <Notice kind="error">{keep.error.message}</Notice>}
          {errors === 0 && read.records.length > 0 && (
            <p className="own-keep">
              <Button look="filled" disabled={keep.isPending || keep.isSuccess} onClick={() => keep.mutate()}>
                Keep {count(read.records.length)}
              </Button>
            </p>
          )}
        </Zone>
      )}
    </>
  );
}
