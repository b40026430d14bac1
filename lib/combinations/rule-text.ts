/**
 * One rule of an office's own set as people write it: `1.35/1.0 dead + 1.5 live + [1.5×0.6 wind]`.
 * What is dead has one factor, or a high and a low one; a variable action has γ, or γ × ψ; in brackets it accompanies: it
 * acts or not, whichever is worse. Kinds that are one action stand together: `1.6 live and crane`.
 */
import { caseKinds, type CaseKind } from '@/lib/model/frame';

export interface RuleTerm {
  readonly kinds: readonly CaseKind[];
  readonly gamma: number;
  readonly psi: number;
  /** True: it acts. False: it accompanies, acts or not. */
  readonly leading: boolean;
}

export interface RuleParts {
  /** Factor on everything dead, and the lower one where what is dead may help; null = nothing dead is in it. */
  readonly dead: { readonly high: number; readonly low: number | null } | null;
  readonly terms: readonly RuleTerm[];
}

export type RuleReading = { readonly parts: RuleParts; readonly wrong: null } | { readonly parts: null; readonly wrong: string };

const wrong = (sentence: string): RuleReading => ({ parts: null, wrong: sentence });
const number = String.raw`(\d+(?:[.,]\d+)?)`;
const deadTerm = new RegExp(String.raw`^${number}(?:\s*/\s*${number})?\s*dead$`);
const variableTerm = new RegExp(String.raw`^${number}(?:\s*[×x*·]\s*${number})?\s*([a-z][a-z ,&]*)$`);
const variableKinds = caseKinds.filter((kind) => kind !== 'dead');

/** Reads a rule; what is wrong with it comes as one sentence. */
export function readRule(text: string): RuleReading {
  const plain = text.normalize('NFC').toLowerCase().replaceAll('−', '-').replace(/\s+/g, ' ').trim();
  if (plain === '') return wrong('Write the rule, like 1.35/1.0 dead + 1.5 live + [1.5×0.6 wind]');
  let dead: RuleParts['dead'] = null;
  const terms: RuleTerm[] = [];
  const seen = new Set<CaseKind>();
  for (const piece of plain.split('+').map((each) => each.trim())) {
    const accompanies = /^\[(.*)\]$/.exec(piece)?.[1]?.trim();
    const words = accompanies ?? piece;
    const ofDead = deadTerm.exec(words);
    if (ofDead) {
      if (accompanies !== undefined) return wrong('What is dead always acts: it has no brackets');
      if (dead !== null) return wrong('What is dead stands once in a rule: high and low like 1.35/1.0 dead');
      const [high, low] = [figure(ofDead[1]), ofDead[2] === undefined ? null : figure(ofDead[2])];
      if (!inRange(high) || (low !== null && !inRange(low))) return wrong('A factor is above 0 and at most 10');
      if (low !== null && low >= high) return wrong('Factors on what is dead are written high/low, like 1.35/1.0 dead');
      dead = { high, low };
      continue;
    }
    const ofVariable = variableTerm.exec(words);
    if (!ofVariable) return wrong(`“${piece}” is no term. Terms are like 1.5 live, or [1.5×0.6 wind] for one that accompanies`);
    const kinds = kindsIn(ofVariable[3] ?? '');
    if (typeof kinds === 'string') return wrong(kinds);
    const twice = kinds.find((kind) => seen.has(kind));
    if (twice) return wrong(`${twice} stands twice: a kind has one factor in a rule`);
    for (const kind of kinds) seen.add(kind);
    const [gamma, psi] = [figure(ofVariable[1]), ofVariable[2] === undefined ? 1 : figure(ofVariable[2])];
    if (!inRange(gamma) || !inRange(psi)) return wrong('A factor is above 0 and at most 10');
    terms.push({ kinds, gamma, psi, leading: accompanies === undefined });
  }
  if (dead === null && terms.length === 0) return wrong('A rule holds at least one action');
  return { parts: { dead, terms }, wrong: null };
}

/** The rule in the one way that the product writes it. */
export function ruleText({ dead, terms }: RuleParts): string {
  const pieces = dead === null ? [] : [`${text(dead.high)}${dead.low === null ? '' : `/${text(dead.low)}`} dead`];
  for (const { kinds, gamma, psi, leading } of terms) {
    const words = `${text(gamma)}${psi === 1 ? '' : `×${text(psi)}`} ${kinds.join(' and ')}`;
    pieces.push(leading ? words : `[${words}]`);
  }
  return pieces.join(' + ');
}

function kindsIn(words: string): CaseKind[] | string {
  const names = words.split(/\band\b|,|&/).map((each) => each.trim());
  const kinds: CaseKind[] = [];
  for (const name of names) {
    const kind = variableKinds.find((each) => each === name);
    if (!kind) return `“${name}” is no kind of load case. Kinds are dead, ${variableKinds.join(', ')}`;
    kinds.push(kind);
  }
  return new Set(kinds).size === kinds.length ? kinds : 'A kind stands once in a rule';
}

const figure = (digits: string | undefined): number => Number((digits ?? '').replace(',', '.'));
const inRange = (value: number): boolean => value > 0 && value <= 10;

/** 1 is "1.0". */
const text = (factor: number): string => {
  const plain = String(Number(factor.toPrecision(6)));
  return /^\d+$/.test(plain) ? `${plain}.0` : plain;
};
