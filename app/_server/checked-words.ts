import 'server-only';
import type { RevisionRecord } from '@/db/queries/revisions';

/** What was checked of a revision and what was not, for the cautions on every page with results. */
export function checkedWords({ settings }: RevisionRecord): { checked: string | null; notChecked: string | null } {
  if (settings === null) return { checked: null, notChecked: null };
  const { stability, deflectionRatio, swayRatio } = settings;
  const checked = ['normal, shear and equivalent stress (elastic)', 'movements where a limit is given'];
  const not = ['connections, foundations, fatigue, fire, erection'];
  if (stability === 'screened') checked.splice(1, 0, 'stability (screening)');
  else not.unshift('stability (by others)');
  if (deflectionRatio === 'none') not.unshift('deflection (declared to have no limit)');
  if (swayRatio === 'none') not.unshift('sway (declared to have no limit)');
  return { checked: checked.join(', '), notChecked: not.join(', ') };
}
