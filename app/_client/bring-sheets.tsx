'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { DropZone } from '@/components/intake/drop-zone';
import { Field } from '@/components/ui/field';
import { api, pages } from '@/lib/api/addresses';
import { sendFiles } from './send-files';

interface BringSheetsProps {
  /** Where the files go: a project's batches, or a batch's revisions. */
  readonly to: string;
  /** A new batch has a name; a next revision has its batch's. */
  readonly named: boolean;
}

/** Drops files, sends them, and goes on to what was read. */
export function BringSheets({ to, named }: BringSheetsProps) {
  const router = useRouter();
  const [name, setName] = useState('');
  const [share, setShare] = useState<number | null>(null);
  const [sending, setSending] = useState<string | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const send = async (files: readonly File[]) => {
    const what = files.length === 1 ? files[0]!.name : `${files.length} files`;
    setFault(null);
    setSending(what);
    setShare(0);
    try {
      const { batch, revision } = await sendFiles(to, files, named && name.trim() !== '' ? { name } : {}, setShare);
      router.push(pages.sheet(batch.id, revision, 'read'));
    } catch (thrown) {
      setFault(thrown instanceof Error ? thrown.message : 'The files did not arrive. Send them again.');
      setSending(null);
      setShare(null);
    }
  };
  const busy =
    sending === null
      ? null
      : share === 1
        ? `${sending} has arrived and is being read`
        : `sending ${sending}, ${Math.round((share ?? 0) * 100)} %`;
  return (
    <>
      {named && (
        <Field
          className="mb-4 max-w-[480px]"
          label="Name of the batch"
          hint="The file’s name if left blank; a set of several files is called that."
          maxLength={120}
          value={name}
          disabled={sending !== null}
          onChange={(event) => setName(event.target.value)}
        />
      )}
      <DropZone onFiles={(files) => void send(files)} busy={busy} progress={share} error={fault} templateHref={api.template} />
    </>
  );
}
