import { RatioText } from '@/components/ui/ratio-text';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { TriedSection } from '@/lib/sizing/taken-by';
import type { TryTold } from '@/lib/sizing/try-sections';
import { formatNumber, formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';
import { wordsOf } from './try-options';

export interface Kept {
  readonly tried: readonly TriedSection[];
  readonly told: TryTold;
}

interface KeptTriesProps {
  readonly kept: readonly Kept[];
  /** The one that is shown. */
  readonly shown: readonly TriedSection[];
  readonly units: System;
  readonly nearLimit: number;
  readonly onTake: (tried: readonly TriedSection[]) => void;
}

/** What was tried so far, the frame as stored first: mass and its change, worst ratio and what governs. */
export function KeptTries({ kept, shown, units, nearLimit, onTake }: KeptTriesProps) {
  const stored = kept.find(({ tried }) => tried.length === 0)?.told.mass_kg ?? null;
  return (
    <div className="tbl-wrap overflow-x-auto" role="region" tabIndex={0} aria-label="Tries side by side">
      <table className="tbl">
        <caption className="sr-only">Tries side by side</caption>
        <thead>
          <tr>
            <th scope="col">Sections</th>
            <th scope="col" className="num">
              Mass<span className="unit">{unitLabel('mass', units)}</span>
            </th>
            <th scope="col" className="num">
              Change<span className="unit">%</span>
            </th>
            <th scope="col" className="num">
              Ratio
            </th>
            <th scope="col">Verdict</th>
            <th scope="col">Governs</th>
          </tr>
        </thead>
        <tbody>
          {kept.map(({ tried, told }, i) => {
            const { mass_kg, governing, verdict, failure } = told;
            const change = stored === null || mass_kg === null || stored === 0 ? null : 100 * (mass_kg / stored - 1);
            const governs = [governing?.check, governing?.subject, governing?.combination].filter(
              (word) => word !== null && word !== undefined,
            );
            return (
              <tr key={i} className={tried === shown ? 'tbl-selected' : undefined}>
                <th scope="row">
                  <button type="button" className="link" aria-pressed={tried === shown} onClick={() => onTake(tried)}>
                    {tried.length === 0
                      ? 'as stored'
                      : tried.map((one) => `${wordsOf(one.of)} → ${one.taken.section.name}`).join('; ')}
                  </button>
                </th>
                <td className="num">{formatQuantity(mass_kg, 'mass', units, { decimals: 1 })}</td>
                <td className="num">
                  {change === null ? '–' : `${change > 0 ? '+' : ''}${formatNumber(change, { decimals: 1 })}`}
                </td>
                <td className="num">
                  <RatioText ratio={governing?.ratio ?? null} verdict={verdict} nearLimit={nearLimit} />
                </td>
                <td>
                  <VerdictMark verdict={verdict} word />
                </td>
                <td>{failure ?? governs.join(', ')}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
