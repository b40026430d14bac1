import { Zone } from '../ui/sheet';
import { NumberTable } from './number-table';
import type { NumberStep } from './numbers-data';

/** The calculation step by step, numbered from `from`. */
export function NumberSteps({ steps, from = 1 }: { readonly steps: readonly NumberStep[]; readonly from?: number }) {
  return steps.map(({ title, words, tables }, i) => (
    <Zone key={title} className="numbers-step" title={`${from + i}  ${title}`}>
      {words.map((sentence) => (
        <p key={sentence} className="numbers-words">
          {sentence}
        </p>
      ))}
      <div className="numbers-tables">
        {tables.map((table) => (
          <NumberTable key={table.id} table={table} />
        ))}
      </div>
    </Zone>
  ));
}
