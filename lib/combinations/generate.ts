/** A rule set over a frame's load cases → combinations, named for what they hold, each with the clause it came from. */
import { type Acting, countSets, deadSets, mayActTogether, variableSets } from '@/lib/combinations/acting';
import { type Form, kindsOf, type RuleSet, type Slot } from '@/lib/combinations/rule-set';
import type { CaseKind, Combination, LoadCase } from '@/lib/model/frame';

/** Most combinations that a set may make of one frame's cases. */
export const mostGenerated = 1000;
/** Most that are looked at before duplicates are taken out. */
const mostTried = 50_000;

export interface GeneratedCombination extends Combination {
  /** "EN 1990 (6.10)"; of several forms that give the same, the first. */
  readonly clause: string;
}

export interface Generated {
  /** In the order of the clauses, then of the cases; no two alike. Empty where there would be too many. */
  readonly list: readonly GeneratedCombination[];
  /** Cases for whose kind the set has no rule: they are in no combination. */
  readonly noRule: readonly LoadCase[];
  /** How many there would be, where that is more than `mostGenerated`; null = all are in `list`. */
  readonly tooMany: number | null;
  /** What was taken for the kinds that the frame has. */
  readonly said: readonly string[];
}

/** Makes every combination of a set: pure, the same for the same cases. */
export function generateCombinations(cases: readonly LoadCase[], set: RuleSet): Generated {
  const kinds = kindsOf(set);
  const noRule = cases.filter(({ kind }) => !kinds.has(kind));
  const present = new Set(cases.map(({ kind }) => kind));
  const said = set.said.filter(({ kinds: of }) => of.some((kind) => present.has(kind))).map(({ words }) => words);
  const usable = set.forms.filter(({ slots }) => slots.every((slot) => !slot.required || indices(cases, slot.kinds).length > 0));
  const tried = usable.reduce((sum, form) => sum + triesOf(form, cases, set.together), 0);
  if (tried > mostTried) return { list: [], noRule, tooMany: tried, said };
  const list = new Map<string, GeneratedCombination>();
  const names = new Set(cases.map(({ name }) => key(name)));
  for (const form of usable) {
    for (const acting of actingIn(form, cases, set.together)) {
      const terms = termsOf(acting);
      if (terms.length === 0) continue;
      const same = sameTerms(form.purpose, terms);
      if (list.has(same)) continue;
      const name = nameOf(cases, terms, form.suffix, names);
      list.set(same, { name, purpose: form.purpose, terms, clause: form.clause });
    }
  }
  if (list.size > mostGenerated) return { list: [], noRule, tooMany: list.size, said };
  return { list: [...list.values()], noRule, tooMany: null, said };
}

/** What makes two combinations the same: purpose and factors, in whatever order. */
export function sameTerms(purpose: string, terms: Combination['terms']): string {
  const sorted = [...terms].sort((a, b) => a.case - b.case);
  return `${purpose}|${sorted.map((term) => `${term.case}:${term.factor}`).join('|')}`;
}

const key = (name: string): string => name.trim().toLowerCase();

const indices = (cases: readonly LoadCase[], kinds: readonly CaseKind[]): number[] =>
  cases.flatMap((each, i) => (kinds.includes(each.kind) ? [i] : []));

function triesOf({ slots }: Form, cases: readonly LoadCase[], together: boolean): number {
  const dead = Math.max(1, countSets(cases, indices(cases, ['dead']), true));
  return slots.reduce((n, slot) => n * (countSets(cases, indices(cases, slot.kinds), together) + (slot.required ? 0 : 1)), dead);
}

type Weighed = Acting & { readonly factor: number };

function actingIn(form: Form, cases: readonly LoadCase[], together: boolean): Weighed[][] {
  const weighed = (sets: readonly Acting[][], factor: number): Weighed[][] =>
    sets.map((set) => set.map((one) => ({ ...one, factor })));
  const ofSlot = ({ kinds, factor, required }: Slot): Weighed[][] => [
    ...(required ? [] : [[]]),
    ...weighed(variableSets(cases, indices(cases, kinds), together), factor),
  ];
  return form.slots
    .map(ofSlot)
    .reduce(
      (sets, slot) => sets.flatMap((set) => slot.map((own) => [...set, ...own])),
      // a rule of an office's own may leave out what is dead
      form.dead === 0 ? [[]] : weighed(deadSets(cases, indices(cases, ['dead'])), form.dead),
    )
    .filter((acting) => mayActTogether(cases, acting));
}

const termsOf = (acting: readonly Weighed[]): Combination['terms'] =>
  // 0.75 × 0.7 and the like: the figure that is meant, not its last bit
  acting.map(({ case: index, sign, factor }) => ({ case: index, factor: sign * Number(factor.toPrecision(12)) }));

/** "1.35 dead + 1.5 snow − 0.9 wind", of service with which one: "… (characteristic)". Never the name of a case or of another. */
function nameOf(cases: readonly LoadCase[], terms: Combination['terms'], suffix: string | null, taken: Set<string>): string {
  const written = terms.map(({ case: index, factor }, i) => {
    const sign = factor < 0 ? (i === 0 ? '−' : ' − ') : i === 0 ? '' : ' + ';
    return `${sign}${factorText(Math.abs(factor))} ${cases[index]?.name ?? ''}`;
  });
  const plain = `${written.join('')}${suffix === null ? '' : ` (${suffix})`}`;
  let name = plain;
  for (let n = 2; taken.has(key(name)); n++) name = `${plain} #${n}`;
  taken.add(key(name));
  return name;
}

/** 1 is "1.0", so that a factor always stands before a case's name. */
function factorText(factor: number): string {
  const text = String(Number(factor.toPrecision(6)));
  return /^\d+$/.test(text) ? `${text}.0` : text;
}
