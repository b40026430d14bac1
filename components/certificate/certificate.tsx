import { CopyButton } from '../ui/copy-button';
import { powerText } from '@/lib/units/power-text';
import type { CertificateLine } from '@/lib/analysis/certificate-lines';

export interface SettingLine {
  readonly name: string;
  readonly value: string;
  /** Where it was given: "Setup B6", "the office's own", "default, Setup is silent". */
  readonly source: string;
}

export interface CertificateData {
  /** [] where the frame has no solution. */
  readonly lines: readonly CertificateLine[];
  /** The engine that made the results; null = not run. */
  readonly engine: string | null;
  /** SHA-256 of the input. */
  readonly inputHash: string | null;
  /** The hash that the results of this frame hang on. */
  readonly frameHash: string | null;
  readonly settings: readonly SettingLine[];
}

/** What vouches for the figures of a frame: each item in words, its figure, its tolerance and whether it passed. */
export function Certificate({ lines, engine, inputHash, frameHash, settings }: CertificateData) {
  return (
    <div className="certificate">
      <ol className="cert-lines">
        {lines.map((line) => (
          <li key={line.name}>
            <div className="cert-head">
              <span className="cert-item">{line.item}</span>
              <b>{line.name}</b>
              <span className="cert-figure">{figureWords(line)}</span>
              <span className={`cert-outcome cert-${line.outcome.replace(' ', '-')}`}>{line.outcome}</span>
            </div>
            <p>
              {line.meaning}
              {line.reason !== null && ` Not made: ${line.reason}.`}
            </p>
          </li>
        ))}
        <li>
          <div className="cert-head">
            <span className="cert-item">4</span>
            <b>Made by</b>
          </div>
          <dl className="cert-by">
            <dt>engine</dt>
            <dd>{engine ?? 'not run yet'}</dd>
            <Hash name="input" hash={inputHash} />
            <Hash name="frame" hash={frameHash} />
          </dl>
        </li>
      </ol>
      {settings.length > 0 && (
        <table className="tbl tbl-side cert-settings">
          <caption className="sr-only">Settings of the run, each with its source</caption>
          <thead>
            <tr>
              <th scope="col">Setting</th>
              <th scope="col">Value</th>
              <th scope="col">Given by</th>
            </tr>
          </thead>
          <tbody>
            {settings.map(({ name, value, source }) => (
              <tr key={name}>
                <th scope="row">{name}</th>
                <td className="tbl-wraps">{value}</td>
                <td className="tbl-wraps">{source}</td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </div>
  );
}

function Hash({ name, hash }: { readonly name: string; readonly hash: string | null }) {
  if (hash === null) return null;
  return (
    <>
      <dt>{name}, SHA-256</dt>
      <dd>
        <span className="mono cert-hash">{hash}</span> <CopyButton text={hash} what={`the ${name}’s hash`} />
      </dd>
    </>
  );
}

/** "3.1 · 10⁻¹⁵, at most 10⁻¹⁰"; "11.0, at least 6" */
function figureWords({ figure, bound, tolerance }: CertificateLine): string {
  const power = bound === 'at most';
  const shown = figure === null ? null : !Number.isFinite(figure) ? 'no number' : power ? powerText(figure) : downTo(figure);
  const allowed = power ? powerText(tolerance).replace(/^1\.0 · /, '') : String(tolerance);
  return shown === null ? `${bound} ${allowed}` : `${shown}, ${bound} ${allowed}`;
}

/** One decimal, never more than there is: 5.97 is no 6.0. */
const downTo = (digits: number): string => (Math.floor(digits * 10) / 10).toFixed(1);
