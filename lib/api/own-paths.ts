import type { OwnKind } from '@/lib/intake/own/own-thing';

/** As an office's own sections and grades are called in addresses. */
export const ownPaths = { section: 'sections', material: 'grades' } as const satisfies Record<OwnKind, string>;
