import { formatNumber } from '@/lib/units/format';
import { Finder, type FinderOption } from '../ui/finder';
import { Segments } from '../ui/segments';
import type { ResultName } from '@/lib/drawing/drawing-data';

interface ResultChoiceProps {
  readonly results: readonly ResultName[];
  /** Load cases without a result of their own. */
  readonly notApplicable: readonly string[];
  readonly chosen: string;
  readonly onChoose: (result: string) => void;
}

/** Every case and combination in sight; more than fourteen in a list that opens and narrows to what is typed. */
export function ResultChoice({ results, notApplicable, chosen, onChoose }: ResultChoiceProps) {
  const label = 'Load case or combination';
  if (results.length <= 14) {
    const options = results.map(({ name }) => ({ value: name, label: name }));
    return <Segments label={label} options={options} value={chosen} onChange={onChoose} />;
  }
  const cases = notApplicable.map((name): FinderOption => ({ value: ` ${name}`, label: name, group: 'Load cases alone', unavailable: 'not applicable' })); // prettier-ignore
  const options = results.map(({ name, kind, purpose, criticalLoadFactor }): FinderOption => ({
    value: name,
    label: name,
    group: kind === 'case' ? 'Load cases alone' : purpose === 'service' ? 'Service combinations' : 'Strength combinations',
    note: criticalLoadFactor === null ? null : `α_cr ${formatNumber(criticalLoadFactor, { significant: 3 })}`,
  }));
  return <Finder label={label} options={[...cases, ...options]} value={chosen} onChange={onChoose} />;
}
