'use client';
import type { OfficeRule } from '@/lib/combinations/office-set';
import { readRule } from '@/lib/combinations/rule-text';

interface RuleFieldsProps {
  readonly rules: readonly OfficeRule[];
  readonly onChange: (rules: readonly OfficeRule[]) => void;
}

/** The rules of a set to be typed, a row each; what cannot be read is said under it. */
export function RuleFields({ rules, onChange }: RuleFieldsProps) {
  const set = (at: number, more: Partial<OfficeRule>) =>
    onChange(rules.map((rule, i) => (i === at ? { ...rule, ...more } : rule)));
  return (
    <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Rules">
      <table className="tbl tbl-tight">
        <caption className="sr-only">Rules of the set, to be changed</caption>
        <thead>
          <tr>
            <th scope="col">From</th>
            <th scope="col">Purpose</th>
            <th scope="col">Rule</th>
            <th scope="col">Name ends in</th>
            <th scope="col">
              <span className="sr-only">Take away</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {rules.map(({ from, purpose, suffix, rule }, i) => {
            const { wrong } = rule.trim() === '' ? { wrong: null } : readRule(rule);
            const name = `rule ${i + 1}`;
            return (
              <tr key={i}>
                <td>
                  <input
                    className="border-hair w-44 border px-1"
                    aria-label={`Where ${name} is from`}
                    maxLength={100}
                    value={from}
                    onChange={(event) => set(i, { from: event.target.value })}
                  />
                </td>
                <td>
                  <select
                    className="border-hair border px-1"
                    aria-label={`Purpose of ${name}`}
                    value={purpose}
                    onChange={(event) => set(i, { purpose: event.target.value === 'service' ? 'service' : 'strength' })}
                  >
                    <option>strength</option>
                    <option>service</option>
                  </select>
                </td>
                <td>
                  <input
                    className="border-hair mt-1 w-[34rem] max-w-full border px-1"
                    aria-label={`Factors of ${name}`}
                    aria-invalid={wrong !== null || undefined}
                    aria-describedby={wrong === null ? undefined : `rule-${i}-wrong`}
                    maxLength={500}
                    value={rule}
                    onChange={(event) => set(i, { rule: event.target.value })}
                  />
                  {wrong !== null && (
                    <p id={`rule-${i}-wrong`} className="field-error pb-1">
                      {wrong}.
                    </p>
                  )}
                </td>
                <td>
                  <input
                    className="border-hair w-32 border px-1"
                    aria-label={`What names of ${name} end in`}
                    maxLength={40}
                    value={suffix}
                    onChange={(event) => set(i, { suffix: event.target.value })}
                  />
                </td>
                <td>
                  <button
                    type="button"
                    className="link"
                    aria-label={`Take away ${name}`}
                    onClick={() => onChange(rules.filter((_, at) => at !== i))}
                  >
                    Take away
                  </button>
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
