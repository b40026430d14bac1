import { generateCombinations } from '@/lib/combinations/generate';
import { type OfficeSet, officeRuleSet } from '@/lib/combinations/office-set';
import { kindsOf } from '@/lib/combinations/rule-set';
import { caseKinds, type LoadCase } from '@/lib/model/frame';

/** One case of each kind that the set has a rule for. */
function oneOfEach(kinds: ReadonlySet<string>): LoadCase[] {
  return caseKinds
    .filter((kind) => kinds.has(kind))
    .map((kind) => ({ name: kind, kind, selfWeight: 0, alternative: null, reversible: false, note: null }));
}

/** What a set makes of one load case of each kind, so that it can be judged before it is used. */
export function WhatItMakes({ set }: { readonly set: OfficeSet }) {
  const { set: rules } = officeRuleSet(set);
  if (rules === null || set.rules.length === 0) return null;
  const known = kindsOf(rules);
  const without = caseKinds.filter((kind) => !known.has(kind));
  const { list } = generateCombinations(oneOfEach(known), rules);
  const of = (purpose: string) => list.filter((each) => each.purpose === purpose).length;
  return (
    <details className="my-3">
      <summary>
        Of one load case of each kind it makes {list.length} combinations: {of('strength')} strength, {of('service')} service
      </summary>
      {without.length > 0 && (
        <p>
          It has no rule for {without.join(', ')}: a batch with such a case that is in no combination is refused, not run without
          it.
        </p>
      )}
      <ul className="my-2 columns-1 pl-4 min-[900px]:columns-2">
        {list.map(({ name, clause }) => (
          <li key={name}>
            {name} <span className="text-ink-2">{clause}</span>
          </li>
        ))}
      </ul>
    </details>
  );
}
