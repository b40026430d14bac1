import { type Role, roles } from '@/lib/model/frame';

/** A limit on movement that an office keeps: used where a batch's sheets give none for it. */
export interface OfficeLimit {
  /** Whose: members of a role, or `*` for all. */
  readonly appliesTo: Role | '*';
  readonly measure: 'deflection' | 'sway';
  /** n of L/n, or of h/n. */
  readonly ratio: number;
  /** Where the figure is from, in words; '' = the office's own. */
  readonly source: string;
}

export const limitedBy: readonly OfficeLimit['appliesTo'][] = ['*', ...roles];
