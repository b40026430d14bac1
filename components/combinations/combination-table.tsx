import { editable, type CombinationEdits } from '@/components/combinations/combination-edits';
import type { CombinationShown } from '@/lib/combinations/shown-combinations';

interface CombinationTableProps {
  readonly combinations: readonly CombinationShown[];
  /** Frames that were read: a combination of fewer says of how many it is. */
  readonly frames: number;
  /** Further load cases that a row could hold. */
  readonly cases?: readonly string[];
  /** Given together with `onEdit`: rows may be left out and their factors typed. */
  readonly edits?: CombinationEdits;
  readonly onEdit?: (edits: CombinationEdits) => void;
}

/** Of so many cells at most, empty ones may be typed in too. */
const mostCells = 3000;

/** Combinations with the factor on each case, and the clause each comes from. */
export function CombinationTable({ combinations, frames, cases: further = [], edits, onEdit }: CombinationTableProps) {
  const own = combinations.flatMap(({ terms }) => terms.map((term) => term.case));
  const cases = [...new Set(edits ? [...own, ...further] : own)];
  const some = combinations.some((each) => each.frames !== frames);
  const may = edits && onEdit ? editable(combinations) : null;
  const inEmpty = combinations.length * cases.length <= mostCells;
  return (
    <div
      className="tbl-wrap max-h-[32rem] overflow-y-auto print:max-h-none print:overflow-visible"
      role="region"
      tabIndex={0}
      aria-label="Combinations"
    >
      <table className="tbl tbl-tight">
        <caption className="sr-only">Combinations, with the factor on each load case</caption>
        <thead>
          <tr>
            {edits && <th scope="col">Keep</th>}
            <th scope="col">Combination</th>
            <th scope="col">Purpose</th>
            {cases.map((name) => (
              <th key={name} scope="col" className="num">
                {name}
              </th>
            ))}
            <th scope="col">From</th>
            {some && (
              <th scope="col" className="num">
                Frames
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {combinations.map((each, i) => {
            // of frames that list it differently there are several rows: the first stands for all
            const first = combinations.findIndex(({ name }) => name === each.name) === i;
            const open = may?.has(each.name) === true && first;
            return (
              <tr key={`${i} ${each.name}`}>
                {edits && onEdit && (
                  <td>
                    {first && (
                      <input
                        type="checkbox"
                        aria-label={`Keep ${each.name}`}
                        checked={!edits.leftOut.has(each.name)}
                        onChange={(event) =>
                          onEdit({ ...edits, leftOut: without(edits.leftOut, each.name, event.target.checked) })
                        }
                      />
                    )}
                  </td>
                )}
                <th scope="row">{each.name}</th>
                <td>{each.purpose}</td>
                {cases.map((name) => (
                  <td key={name} className="num">
                    {edits && onEdit && open && (inEmpty || factorOf(each, name) !== '') ? (
                      <input
                        className="border-hair w-20 border px-1 text-right"
                        inputMode="decimal"
                        aria-label={`Factor on ${name} in ${each.name}`}
                        disabled={edits.leftOut.has(each.name)}
                        value={edits.factors[`${each.name}|${name}`] ?? factorOf(each, name)}
                        onChange={(event) =>
                          onEdit({ ...edits, factors: { ...edits.factors, [`${each.name}|${name}`]: event.target.value } })
                        }
                      />
                    ) : (
                      factorOf(each, name)
                    )}
                  </td>
                ))}
                <td>{each.clause ?? 'listed'}</td>
                {some && <td className="num">{each.frames.toLocaleString('en-GB')}</td>}
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

function without(leftOut: ReadonlySet<string>, name: string, kept: boolean): ReadonlySet<string> {
  return kept ? new Set([...leftOut].filter((one) => one !== name)) : new Set([...leftOut, name]);
}

function factorOf({ terms }: CombinationShown, name: string): string {
  const factor = terms.find((term) => term.case === name)?.factor;
  return factor === undefined ? '' : String(factor).replace('-', '−');
}
