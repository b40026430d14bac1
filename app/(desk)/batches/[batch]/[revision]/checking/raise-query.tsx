'use client';
import { useId, useState } from 'react';
import { CheckMark } from '@/components/checking/check-mark';
import { Button } from '@/components/ui/button';
import type { FrameChecking } from '@/app/_server/checking-detail';
import type { FrameCheckingActs } from './use-frame-checking';

/** A checker asks about a frame, one of its members, or one of its checks. */
export function RaiseQuery({ marks, acts }: { readonly marks: FrameChecking; readonly acts: FrameCheckingActs }) {
  const [about, text] = [useId(), useId()];
  const [of, setOf] = useState('frame');
  const [words, setWords] = useState('');
  const raise = () => {
    if (words.trim() === '' || acts.busy) return;
    const [kind, ...rest] = of.split(' ');
    const named = rest.join(' ');
    const check = kind === 'check' ? (marks.figures.checks.find((one) => String(one.check) === named)?.label ?? null) : null;
    const asked = { subject: kind === 'member' ? named : null, check, text: words.trim() };
    acts.query(asked).then(
      () => setWords(''),
      () => undefined, // said above; the words stay in the field
    );
  };
  return (
    <form
      className="ck-form"
      onSubmit={(event) => {
        event.preventDefault();
        raise();
      }}
    >
      <label htmlFor={about}>Query about</label>
      <select id={about} value={of} onChange={(event) => setOf(event.target.value)}>
        <option value="frame">the frame</option>
        {marks.figures.members.map((member) => (
          <option key={`m ${member}`} value={`member ${member}`}>
            member {member}
          </option>
        ))}
        {marks.figures.checks.map(({ check, label }) => (
          <option key={`c ${check}`} value={`check ${check}`}>
            {label}
          </option>
        ))}
      </select>
      <label htmlFor={text}>Your query</label>
      <textarea
        id={text}
        data-key="q"
        rows={2}
        maxLength={2000}
        value={words}
        onChange={(event) => setWords(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) raise();
          if (event.key === 'Escape') event.currentTarget.blur();
        }}
      />
      <div className="ck-buttons">
        <Button type="submit" look="checker" disabled={acts.busy || words.trim() === ''}>
          <CheckMark kind="queried" /> Raise the query
        </Button>
      </div>
    </form>
  );
}
