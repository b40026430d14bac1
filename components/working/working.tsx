import { Fragment, type ReactNode } from 'react';
import type { Verdict } from '@/lib/results/result';
import { RatioText } from '../ui/ratio-text';
import { VerdictMark } from '../ui/verdict-mark';
import { Typeset } from './typeset';
import type { WorkingLine, WorkingPart } from '@/lib/checks/working-parts';

interface WorkingProps {
  /** "rafter BC, normal stress" */
  readonly title: string;
  /** "elastic stress", a clause: at the right of the heading. */
  readonly reference?: string | null;
  readonly lines: readonly WorkingLine[];
  readonly ratio: number | null;
  readonly verdict: Verdict;
  readonly nearLimit: number;
  /** Why it is not checked. */
  readonly reason?: string | null;
  /** Ends with the ratio and its verdict; off where the lines already do. */
  readonly conclude?: boolean;
  /** Set as mathematics: the clauses of a design code. */
  readonly typeset?: boolean;
}

/** The calculation of one check, as an engineer would set it out: what, formula, numbers put in, limit, ratio. */
export function Working(props: WorkingProps) {
  const { title, reference, lines, ratio, verdict, nearLimit, reason, conclude = true, typeset = false } = props;
  return (
    <section className="working" aria-label={`Working: ${title}`}>
      <div className="zone-head">
        <h2>Working: {title}</h2>
        {reference && <span className="zone-note zone-aside">{withSubscripts(reference)}</span>}
      </div>
      <dl className="working-lines">
        {lines.map((line, i) => (
          <div key={i} className="working-line">
            <dt>{line.what}</dt>
            <dd>
              {typeset ? (
                <Typeset parts={line.parts}>
                  <Parts parts={line.parts} />
                </Typeset>
              ) : (
                <Parts parts={line.parts} />
              )}
              {line.source && <span className="working-source"> {line.source}</span>}
            </dd>
          </div>
        ))}
        {conclude && (
          <div className="working-line">
            <dt>verdict</dt>
            <dd className="working-verdict">
              {ratio !== null && <RatioText ratio={ratio} verdict={verdict} nearLimit={nearLimit} />}{' '}
              <VerdictMark verdict={verdict} word />
              {reason && <span>: {reason}</span>}
            </dd>
          </div>
        )}
      </dl>
    </section>
  );
}

function Parts({ parts }: { readonly parts: readonly WorkingPart[] }) {
  const shown: ReactNode[] = [];
  for (let i = 0; i < parts.length; i++) {
    const part = parts[i]!;
    const gap = i === 0 ? '' : between(parts[i - 1]!, part, i === 1);
    const [equals, value] = [parts[i + 1], parts[i + 2]];
    // "A = 53.8 cm²" is never broken between two lines
    const given = part.kind === 'symbol' && equals?.kind === 'text' && equals.text === '=' && value?.kind === 'number';
    // a product or a sum that goes on is no single property
    const whole = given && parts[i - 1]?.kind !== 'symbol' && [undefined, 'symbol'].includes(parts[i + 3]?.kind);
    shown.push(
      <Fragment key={i}>
        {gap}
        {whole ? (
          <span className="w-whole">
            {one(part)} = {one(value)}
          </span>
        ) : (
          one(part)
        )}
      </Fragment>,
    );
    if (whole) i += 2;
  }
  return shown;
}

/**
 * Units and signs stand a space apart. A line that opens with a section's name has a comma before the letter of its first
 * property, lest they read as one; within a formula no comma is ever added.
 */
function between(before: WorkingPart, part: WorkingPart, opens: boolean): string {
  if (part.kind === 'text' && /^[,;:)]/.test(part.text)) return '';
  if (before.kind === 'text' && /\($/.test(before.text)) return '';
  const named = opens && before.kind === 'text' && part.kind === 'symbol' && /^\p{L}.*[\p{L}\d]$/u.test(before.text);
  return named ? ', ' : ' ';
}

function one(part: WorkingPart): ReactNode {
  switch (part.kind) {
    case 'text':
      return withSubscripts(part.text);
    case 'symbol':
      return (
        <span className="w-symbol">
          <var>{part.symbol}</var>
          {part.sub && <sub>{part.sub}</sub>}
          {part.sup && <sup>{part.sup}</sup>}
        </span>
      );
    case 'number':
      return <Figure text={part.text} unit={part.unit} />;
    case 'result':
      return (
        <b>
          <Figure text={part.text} unit={part.unit} />
        </b>
      );
    case 'fraction':
      return (
        <span className="w-fraction">
          <span className="w-over">
            <Parts parts={part.over} />
          </span>
          <span className="sr-only"> over </span>
          <span className="w-under">
            <Parts parts={part.under} />
          </span>
        </span>
      );
    case 'root':
      return (
        <span className="w-root">
          <span aria-hidden="true">√</span>
          <span className="sr-only">root of </span>
          <span className="w-radicand">
            <Parts parts={part.of} />
          </span>
        </span>
      );
  }
}

/** A symbol within a sentence as it is written by hand: "σ_v" with its v below. */
function withSubscripts(text: string): ReactNode {
  const pieces = text.split(/(?<=[\p{L}])_(\p{L}+)/u);
  if (pieces.length === 1) return text;
  return <span>{pieces.map((piece, i) => (i % 2 === 1 ? <sub key={i}>{piece}</sub> : piece))}</span>;
}

function Figure({ text, unit }: { readonly text: string; readonly unit?: string }) {
  return (
    <span className="w-figure">
      {text}
      {unit && ` ${unit}`}
    </span>
  );
}
