/** Combinations as they are being changed on screen, and the change that this asks for. */
import type { ListCombinationsChange } from '@/lib/changes/change';
import { editedFactor } from '@/lib/combinations/edited-factor';
import type { CombinationShown } from '@/lib/combinations/shown-combinations';
import type { Purpose } from '@/lib/model/frame';

export interface CombinationAdded {
  readonly name: string;
  readonly purpose: Purpose;
  readonly terms: readonly { readonly case: string; readonly factor: number }[];
}

export interface CombinationEdits {
  /** Names. */
  readonly leftOut: ReadonlySet<string>;
  /** As typed, by `combination|case`. */
  readonly factors: Readonly<Record<string, string>>;
  readonly added: readonly CombinationAdded[];
}

export const noEdits: CombinationEdits = { leftOut: new Set(), factors: {}, added: [] };

/** Names whose factors can be typed: one name, one set of factors. Where frames list one name differently, the sheet is the place. */
export function editable(combinations: readonly CombinationShown[]): ReadonlySet<string> {
  const names = new Set<string>();
  const known = new Map<string, Map<string, number>>();
  for (const { name, terms } of combinations) {
    const before = known.get(name);
    if (!before) {
      known.set(name, new Map(terms.map((term) => [term.case, term.factor])));
      names.add(name);
      continue;
    }
    for (const { case: of, factor } of terms) {
      if ((before.get(of) ?? factor) !== factor) names.delete(name);
      before.set(of, factor);
    }
  }
  return names;
}

export interface EditsRead {
  readonly change: ListCombinationsChange;
  /** The first factor typed that is no number, in words. */
  readonly wrong: string | null;
  /** True where a generated combination is changed or left out: all are written then. */
  readonly ofGenerated: boolean;
}

/** @param write whether generated combinations are written as rows in any case */
export function readEdits(combinations: readonly CombinationShown[], edits: CombinationEdits, write: boolean): EditsRead {
  let wrong: string | null = null;
  const factors: ListCombinationsChange['factors'] = [];
  for (const [key, typed] of Object.entries(edits.factors)) {
    const combination = combinations.find(({ name }) => key.startsWith(`${name}|`) && !key.slice(name.length + 1).includes('|'));
    if (!combination || edits.leftOut.has(combination.name)) continue;
    const of = key.slice(combination.name.length + 1);
    const was = combination.terms.find((term) => term.case === of)?.factor;
    if (typed.trim() === '' && was === undefined) continue;
    const factor = editedFactor(typed);
    if (factor === null) wrong ??= `The factor on ${of} in ${combination.name} is no number.`;
    else if (factor !== (was ?? 0)) factors.push({ combination: combination.name, case: of, factor });
  }
  const leaveOut = [...edits.leftOut];
  const touched = new Set([...leaveOut, ...factors.map(({ combination }) => combination)]);
  const ofGenerated = combinations.some(({ name, clause }) => clause !== null && touched.has(name));
  const add = edits.added.map(({ name, purpose, terms }) => ({ name, purpose, terms: [...terms] }));
  const generated = ofGenerated || write ? 'write' : 'keep';
  return { change: { kind: 'list combinations', generated, leaveOut, factors, add }, wrong, ofGenerated };
}
