import 'server-only';
import type { RevisionRecord } from '@/db/queries/revisions';
import { checkedWords as wordsOf } from '@/lib/reports/cautions';

/** What was checked of a revision and what was not, in the same words as its workbook, for every page with results. */
export function checkedWords({ settings }: RevisionRecord): { checked: string | null; notChecked: string | null } {
  if (settings === null) return { checked: null, notChecked: null };
  const { checked, notChecked } = wordsOf(settings);
  return { checked: unstopped(checked), notChecked: unstopped(notChecked) };
}

/** The page sets its own full stop. */
const unstopped = (sentence: string): string => sentence.replace(/\.$/, '');
