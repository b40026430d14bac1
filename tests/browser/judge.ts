import AxeBuilder from '@axe-core/playwright';
import type { Page } from 'playwright-core';

/** WCAG 2.2 A and AA, as far as a machine can see. */
export const rules: RunOnly = { type: 'tag', values: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'] };

interface RunOnly {
  readonly type: 'tag' | 'rule';
  readonly values: string[];
}

/** What a page offends against. @param within of a part of it alone */
export function judge(page: Page, runOnly: RunOnly, within?: string) {
  const judged = new AxeBuilder({ page }).setLegacyMode();
  if (within !== undefined) judged.include(within);
  // what is in order is not asked for: naming it takes longer than finding what is not
  return judged.options({ runOnly, resultTypes: ['violations'] }).analyze();
}
