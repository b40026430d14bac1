import { Zone } from '../ui/sheet';
import { NumberTable } from './number-table';
import type { NumberStep } from './numbers-data';

/** The calculation step by step, numbered. */
export function NumberSteps({ steps }: { readonly steps: readonly NumberStep[] }) {
  return steps.map(({ title, words, tables }, i) => (
    <Zone key={title} className="numbers-step" title={`${i + 1}  ${title}`}>
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
