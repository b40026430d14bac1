import Link from 'next/link';
import type { ReactNode } from 'react';
import { formatRatio } from '@/lib/units/format';
import type { Verdict } from '@/lib/results/result';
import { VerdictMark, verdictClass } from '../ui/verdict-mark';
import { RevisionMark } from './revision-mark';

interface Named {
  readonly name: string;
  readonly href?: string;
}

export interface TitleBlockProps {
  readonly project: Named;
  readonly batch: Named | null;
  readonly revision: { readonly letter: string; readonly date: string; readonly earlier?: boolean } | null;
  /** The revision's state in the product's words, with what qualifies it ("being read: 9 problems"). */
  readonly state: string | null;
  readonly frame?: { readonly id: string; readonly number: number; readonly of: number } | null;
  readonly verdict?: { readonly verdict: Verdict; readonly ratio: number | null; readonly nearLimit: number } | null;
  /** Who and when; null = not yet. */
  readonly prepared: string | null;
  readonly checked: string | null;
  readonly issued: string | null;
  /** SHA-256 of the input; its first eight digits are shown, the whole in the element's title. */
  readonly inputHash: string | null;
  /** "1 of 7", "read", "run" */
  readonly sheet?: string | null;
  /** "stress and movement only", where stability is by others. */
  readonly scope?: string | null;
  /** Cells of a page of its own (compare, issue), after the ones above. */
  readonly more?: readonly { readonly label: string; readonly value: ReactNode }[];
}

/**
 * The drawing's ruled block: first row of every batch and frame page on screen, its footer in print.
 * A missing value says "not yet".
 */
export function TitleBlock(props: TitleBlockProps) {
  const { project, batch, revision, state, frame, verdict, prepared, checked, issued, inputHash, sheet, scope, more } = props;
  return (
    <div className="title-block" role="group" aria-label="Title block">
      <Cell label="Project">{named(project)}</Cell>
      {batch && <Cell label="Batch">{named(batch)}</Cell>}
      {frame && (
        <Cell label="Frame" first>
          {frame.id}{' '}
          <span className="tb-soft">
            {frame.number.toLocaleString('en-GB')} of {frame.of.toLocaleString('en-GB')}
          </span>
        </Cell>
      )}
      {verdict && (
        <Cell label="Verdict" first>
          <span className={`verdict verdict-${verdictClass(verdict.verdict)}`}>
            <VerdictMark verdict={verdict.verdict} size={13} /> {verdict.verdict}
            {verdict.ratio !== null && ` ${formatRatio(verdict.ratio, verdict.nearLimit)}`}
          </span>
        </Cell>
      )}
      {revision && (
        <Cell label="Revision" first>
          <span className="tb-revision">
            <RevisionMark letter={revision.letter} earlier={revision.earlier} /> of {revision.date}
          </span>
        </Cell>
      )}
      {state && (
        <Cell label="State" first>
          {state}
          {scope && <span className="tb-soft"> {scope}</span>}
        </Cell>
      )}
      <Cell label="Prepared" late>
        {prepared ?? <NotYet />}
      </Cell>
      <Cell label="Checked">{checked ?? <NotYet />}</Cell>
      {!frame && <Cell label="Issued">{issued ?? <NotYet />}</Cell>}
      <Cell label="Input, SHA-256" late>
        {inputHash ? (
          <span className="mono" title={inputHash}>
            {inputHash.slice(0, 4)} {inputHash.slice(4, 8)}
          </span>
        ) : (
          <NotYet />
        )}
      </Cell>
      {sheet && (
        <Cell label="Sheet" late>
          {sheet}
        </Cell>
      )}
      {more?.map((cell) => (
        <Cell key={cell.label} label={cell.label}>
          {cell.value}
        </Cell>
      ))}
    </div>
  );
}

function Cell({ label, first, late, children }: { label: string; first?: boolean; late?: boolean; children: ReactNode }) {
  return (
    <div className={`tb-cell ${first ? 'tb-first' : ''} ${late ? 'tb-late' : ''}`}>
      <div className="tb-label">{label}</div>
      <div className="tb-value">{children}</div>
    </div>
  );
}

const NotYet = () => <span className="tb-none">not yet</span>;
const named = ({ name, href }: Named) => (href ? <Link href={href}>{name}</Link> : name);
