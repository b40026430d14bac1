/** Which load cases may act at once: `alternative` and `reversible` (sheets §3). */
import type { LoadCase } from '@/lib/model/frame';

/** A case at work, by its index, as it is or turned about. */
export interface Acting {
  readonly case: number;
  readonly sign: 1 | -1;
}

/** The word that cases which never act together share; '' = none. */
export const alternativeOf = ({ alternative }: LoadCase): string => (alternative ?? '').trim().toLowerCase();

interface Group {
  readonly word: string;
  readonly group: readonly number[];
}

/** Cases grouped: each with the others of its word, or alone. In the order of the cases. */
function groupsOf(cases: readonly LoadCase[], of: readonly number[]): Group[] {
  const groups = new Map<string, { word: string; group: number[] }>();
  for (const i of of) {
    const one = cases[i];
    const word = one ? alternativeOf(one) : '';
    const known = word === '' ? undefined : groups.get(word);
    if (known) known.group.push(i);
    else groups.set(word === '' ? `#${i}` : word, { word, group: [i] });
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

/** How cases may act at once: one of each group or, where `absent` lets it, none of it. The empty set may be among them. */
function setsOf(cases: readonly LoadCase[], of: readonly number[], absent: (word: string) => boolean): Acting[][] {
  return groupsOf(cases, of).reduce<Acting[][]>(
    (sets, { word, group }) =>
      sets.flatMap((set) => [...(absent(word) ? [set] : []), ...ways(cases, group).map((way) => [...set, way])]),
    [[]],
  );
}

/** How many `variableSets` gives, without making them. */
export function countSets(cases: readonly LoadCase[], of: readonly number[], together: boolean): number {
  if (of.length === 0) return 0;
  const product = groupsOf(cases, of).reduce((n, { group }) => n * (ways(cases, group).length + (together ? 0 : 1)), 1);
  return together ? product : product - 1;
}

/** Variable cases of a kind: every choice of them but none at all. @param together all of them at once, one of each alternative */
export const variableSets = (cases: readonly LoadCase[], of: readonly number[], together: boolean): Acting[][] =>
  setsOf(cases, of, () => !together).filter((set) => set.length > 0);

/**
 * Dead cases act all at once, one of each alternative. One that is the alternative of a case which is not dead may be absent.
 * @returns [[]] where there is none
 */
export function deadSets(cases: readonly LoadCase[], of: readonly number[]): Acting[][] {
  const words = new Set(cases.filter(({ kind }) => kind !== 'dead').map(alternativeOf));
  return setsOf(cases, of, (word) => word !== '' && words.has(word));
}

/** True where no two of them are alternatives of one another. */
export function mayActTogether(cases: readonly LoadCase[], acting: readonly Acting[]): boolean {
  const words = acting
    .map((each) => cases[each.case])
    .flatMap((each) => (each && alternativeOf(each) !== '' ? [alternativeOf(each)] : []));
  return new Set(words).size === words.length;
}
