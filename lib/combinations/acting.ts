/** Which load cases may act at once: `alternative` and `reversible` (sheets §3). */
import type { LoadCase } from '@/lib/model/frame';

/** A case at work, by its index, as it is or turned about. */
export interface Acting {
  readonly case: number;
  readonly sign: 1 | -1;
}

/** The word that cases which never act together share; '' = none. */
export const alternativeOf = ({ alternative }: LoadCase): string => (alternative ?? '').trim().toLowerCase();

/** Cases grouped: each with the others of its word, or alone. In the order of the cases. */
function groupsOf(cases: readonly LoadCase[], of: readonly number[]): number[][] {
  const groups = new Map<string, number[]>();
  for (const i of of) {
    const word = cases[i] ? alternativeOf(cases[i]) : '';
    const key = word === '' ? `#${i}` : word;
    groups.set(key, [...(groups.get(key) ?? []), i]);
  }
  return [...groups.values()];
}

const ways = (cases: readonly LoadCase[], group: readonly number[]): Acting[] =>
  group.flatMap((i): Acting[] =>
    cases[i]?.reversible
      ? [
          { case: i, sign: 1 },
          { case: i, sign: -1 },
        ]
      : [{ case: i, sign: 1 }],
  );

/**
 * How cases may act at once: one of each group or, where `absent` lets it, none of it; the empty set left out.
 * @param absent whether a group may be absent
 */
function setsOf(cases: readonly LoadCase[], of: readonly number[], absent: (group: readonly number[]) => boolean): Acting[][] {
  return groupsOf(cases, of)
    .reduce<Acting[][]>(
      (sets, group) =>
        sets.flatMap((set) => [...(absent(group) ? [set] : []), ...ways(cases, group).map((way) => [...set, way])]),
      [[]],
    )
    .filter((set) => set.length > 0);
}

/** How many `variableSets` gives, without making them. */
export function countSets(cases: readonly LoadCase[], of: readonly number[], together: boolean): number {
  if (of.length === 0) return 0;
  const product = groupsOf(cases, of).reduce((n, group) => n * (ways(cases, group).length + (together ? 0 : 1)), 1);
  return together ? product : product - 1;
}

/** Variable cases of a kind: every choice of them but none at all. @param together all of them at once, one of each alternative */
export const variableSets = (cases: readonly LoadCase[], of: readonly number[], together: boolean): Acting[][] =>
  setsOf(cases, of, () => !together);

/**
 * Dead cases act all at once, one of each alternative. One that is the alternative of a case which is not dead may be absent.
 * @returns [[]] where there is none
 */
export function deadSets(cases: readonly LoadCase[], of: readonly number[]): Acting[][] {
  const words = new Set(cases.filter(({ kind }) => kind !== 'dead').map(alternativeOf));
  const sets = setsOf(cases, of, ([first]) => {
    const word = first === undefined ? '' : alternativeOf(cases[first] ?? { ...noCase });
    return word !== '' && words.has(word);
  });
  return sets.length === 0 ? [[]] : sets;
}

const noCase = { alternative: null } as LoadCase;

/** True where no two of them are alternatives of one another. */
export function mayActTogether(cases: readonly LoadCase[], acting: readonly Acting[]): boolean {
  const words = acting.map((each) => (cases[each.case] ? alternativeOf(cases[each.case]!) : '')).filter((word) => word !== '');
  return new Set(words).size === words.length;
}
