'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ChangeList } from '@/components/changes/change-list';
import { SettingField, type SettingOffered } from '@/components/changes/setting-field';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

interface ChooseSettingsProps {
  readonly batch: number;
  readonly letter: string;
  /** The letter that the next revision will have. */
  readonly next: string;
  /** Frames that can run. */
  readonly frames: number;
  readonly offered: readonly SettingOffered[];
}

interface Made {
  readonly batch: { readonly id: number };
  readonly revision: string;
}

/** Chooses settings, says what will be run again, and makes the next revision with a reason. */
export function ChooseSettings({ batch, letter, next, frames, offered }: ChooseSettingsProps) {
  const router = useRouter();
  const [chosen, setChosen] = useState<Readonly<Record<string, string>>>({});
  const [reason, setReason] = useState('');
  const changed = offered.filter(({ setting, typed }) => (chosen[setting] ?? typed).trim() !== typed);
  const make = useMutation({
    mutationFn: (run: boolean) =>
      request<Made>(api.part(batch, letter, 'changes'), {
        method: 'POST',
        json: {
          changes: changed.map(({ setting }) => ({ kind: 'setting', setting, value: chosen[setting] ?? '' })),
          reason,
          run,
        },
      }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  const fields = make.error instanceof RequestError ? (make.error.body.fields ?? {}) : {};
  // the sentence stands at the field it is about, where that is in sight
  const atField = Object.keys(fields).some((name) => name === 'reason' || offered.some(({ setting }) => setting === name));
  const busy = make.isPending || make.isSuccess;
  const ready = changed.length > 0 && !busy;
  const all = frames.toLocaleString('en-GB');
  return (
    <form onSubmit={(event) => event.preventDefault()}>
      {offered.map((one) => (
        <SettingField
          key={one.setting}
          offered={one}
          value={chosen[one.setting] ?? one.typed}
          error={fields[one.setting]?.[0] ?? null}
          onChange={(value) => {
            make.reset();
            setChosen((before) => ({ ...before, [one.setting]: value }));
          }}
        />
      ))}
      <div className="make-change">
        {changed.length === 0 ? (
          <p role="status">Nothing is chosen that differs from revision {letter}.</p>
        ) : (
          <div role="status">
            <ChangeList
              changes={changed.map(({ setting, word, now }) => ({
                what: word,
                from: now,
                to: chosen[setting]?.trim() || 'nothing',
              }))}
            />
            <p>
              {frames === 1 ? 'The one frame' : `All ${all} frames`} that can run {frames === 1 ? 'is' : 'are'} analysed and
              checked again. Where an earlier revision ran a frame with these very settings, its results are carried over.
            </p>
          </div>
        )}
        <Field
          label="Why it is changed"
          hint="It stands at the head of the new revision and in the activity of the project."
          maxLength={500}
          value={reason}
          error={fields['reason']?.[0] ?? null}
          disabled={busy}
          onChange={(event) => setReason(event.target.value)}
        />
        {make.error && !atField && <Notice kind="error">{make.error.message}</Notice>}
        <div className="make-change-acts">
          <Button look="filled" disabled={!ready} onClick={() => make.mutate(true)}>
            Make revision {next} and run {frames === 1 ? 'its frame' : `${all} frames`}
          </Button>
          <Button disabled={!ready} onClick={() => make.mutate(false)}>
            Make revision {next}
          </Button>
        </div>
      </div>
    </form>
  );
}
