import type { RecordedChange } from '@/lib/reports/compare-workbook/compare-sheets';
import type { SettingDifference } from '@/lib/results/compare-inputs';

interface RecordedChangesProps {
  readonly settings: readonly SettingDifference[];
  readonly recorded: readonly RecordedChange[];
}

/** Settings that differ, and the changes chosen on screen that lie between the two revisions. */
export function RecordedChanges({ settings, recorded }: RecordedChangesProps) {
  if (settings.length === 0 && recorded.length === 0) return null;
  return (
    <ul className="change-list compare-recorded" aria-label="Settings and recorded changes">
      {settings.map(({ setting, before, after }) => (
        <li key={setting}>
          Setting {setting}: <s className="change-from">{before}</s> <span aria-hidden="true">→</span>
          <span className="sr-only"> becomes </span> <b>{after}</b>
        </li>
      ))}
      {recorded.map(({ letter, what, from, to, reason, person, at }, i) => (
        <li key={i}>
          Changed in {letter} by {person}, {at}: {what}, {from} <span aria-hidden="true">→</span>
          <span className="sr-only"> becomes </span> <b>{to}</b>. Why: {reason}
        </li>
      ))}
    </ul>
  );
}
