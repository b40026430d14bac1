import { type Measure, type Role, roles } from '@/lib/model/frame';

/** A limit on movement that an office keeps: used where a batch's sheets give none for it. */
export interface OfficeLimit {
  /** Whose: members of a role, or `*` for all; of displacement and spread also nodes of a place. */
  readonly appliesTo: string;
  readonly measure: Measure;
  /** Of a displacement; silent = the resultant. */
  readonly direction?: 'x' | 'y' | 'resultant' | null;
  /** Of a spread: the place of the other node. */
  readonly toPlace?: string | null;
  /** n of L/n, of h/n, or of the nodes' distance over n; null where only `absolute_m` is given. */
  readonly ratio: number | null;
  readonly absolute_m?: number | null;
  /** A service combination's name, `*` in it for anything (`* (frequent)`); silent = every service combination. */
  readonly combination?: string | null;
  /** Where the figure is from, in words; '' = the office's own. */
  readonly source: string;
}

export const limitedBy: readonly (Role | '*')[] = ['*', ...roles];

export const ofNodes = (measure: Measure): boolean => measure === 'displacement' || measure === 'spread';

/** What makes two limits of an office the same one: whose, of what, in which combination. */
export function limitKey({ appliesTo, measure, direction, toPlace, combination }: OfficeLimit): string {
  const turned = measure === 'displacement' ? (direction ?? 'resultant') : '';
  return [appliesTo, measure, turned, measure === 'spread' ? (toPlace ?? '') : '', combination ?? ''].join('|').toLowerCase();
}

/** True where a combination is one that the limit names. */
export function namesCombination(pattern: string, name: string): boolean {
  const pieces = pattern.trim().toLowerCase().split('*');
  const text = name.trim().toLowerCase();
  if (pieces.length === 1) return text === pieces[0];
  const [first = '', last = ''] = [pieces[0], pieces.at(-1)];
  if (text.length < first.length + last.length || !text.startsWith(first) || !text.endsWith(last)) return false;
  let at = first.length;
  for (const piece of pieces.slice(1, -1)) {
    const found = text.indexOf(piece, at);
    if (found < 0) return false;
    at = found + piece.length;
  }
  return at <= text.length - last.length;
}
