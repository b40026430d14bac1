/** A combination set that an office keeps: its rules, what they are based on, and as a rule set that makes combinations. */
import { readRule, type RuleParts, ruleText } from '@/lib/combinations/rule-text';
import { optional, required, type Form, type RuleSet } from '@/lib/combinations/rule-set';
import { readRuleSet } from '@/lib/combinations/read-rule-set';
import type { Purpose } from '@/lib/model/frame';

export interface OfficeRule {
  /** Where the rule is from, shown beside what it makes: "EN 1990 (6.10)", "office handbook 4.2". */
  readonly from: string;
  readonly purpose: Purpose;
  /** What the names of its combinations end in, in brackets: "characteristic"; '' = nothing. */
  readonly suffix: string;
  /** As written (lib/combinations/rule-text.ts). */
  readonly rule: string;
}

export interface OfficeSet {
  readonly name: string;
  /** The published set that it was begun from, as written in Setup; null = from nothing. */
  readonly basedOn: string | null;
  /** Whether strength combinations hold factored loads or those of allowable stress. */
  readonly level: RuleSet['level'];
  /** Cases of one kind act all together, not also one without the other. */
  readonly together: boolean;
  readonly rules: readonly OfficeRule[];
  /** Where the figures are from and who agreed to them, in words. */
  readonly provenance: string;
}

/** Most rules in a set. */
export const mostRules = 100;

export interface RuleWrong {
  /** Place of the rule in the set. */
  readonly rule: number;
  readonly sentence: string;
}

export type OfficeSetReading =
  { readonly set: RuleSet; readonly wrong: readonly [] } | { readonly set: null; readonly wrong: readonly RuleWrong[] };

/** An office's set as a rule set, or every rule that cannot be read. */
export function officeRuleSet({ name, level, together, rules }: OfficeSet): OfficeSetReading {
  const wrong: RuleWrong[] = [];
  const forms: Form[] = [];
  for (const [i, rule] of rules.entries()) {
    const read = readRule(rule.rule);
    if (read.parts === null) wrong.push({ rule: i, sentence: read.wrong });
    else forms.push(...formsOf(rule, read.parts));
  }
  return wrong.length > 0 ? { set: null, wrong } : { set: { name, level, forms, together, said: [] }, wrong: [] };
}

function formsOf({ from, purpose, suffix }: OfficeRule, { dead, terms }: RuleParts): Form[] {
  const slots = terms.map(({ kinds, gamma, psi, leading }) => {
    const factor = Number((gamma * psi).toPrecision(12));
    return leading ? required(factor, ...kinds) : optional(factor, ...kinds);
  });
  const form = (factor: number): Form => ({
    clause: from,
    purpose,
    dead: factor,
    slots,
    suffix: suffix === '' ? null : suffix,
  });
  if (dead === null) return [form(0)];
  return dead.low === null ? [form(dead.high)] : [form(dead.high), form(dead.low)];
}

/**
 * The rules of a published set, to begin an office's own from: high and low factors on what is dead in one rule, γ and ψ
 * apart where the set tells them apart.
 *
 * @param text as written in Setup   @throws {RangeError} for no published set
 */
export function rulesOf(text: string): OfficeRule[] {
  const { set, wrong } = readRuleSet(text);
  if (set === null) throw new RangeError(`Expected a published set: ${wrong}`);
  const rules = new Map<string, { from: string; purpose: Purpose; suffix: string; parts: RuleParts }>();
  for (const { clause, purpose, dead, slots, suffix } of set.forms) {
    const terms = slots.map(({ kinds, factor, required: leading, parts }) => ({
      kinds,
      gamma: parts?.gamma ?? factor,
      psi: parts?.psi ?? 1,
      leading,
    }));
    const key = JSON.stringify([clause, purpose, suffix, terms]);
    const known = rules.get(key);
    if (known?.parts.dead && known.parts.dead.low === null && dead < known.parts.dead.high)
      known.parts = { ...known.parts, dead: { high: known.parts.dead.high, low: dead } };
    else rules.set(key, { from: clause, purpose, suffix: suffix ?? '', parts: { dead: { high: dead, low: null }, terms } });
  }
  return [...rules.values()].map(({ parts, ...rule }) => ({ ...rule, rule: ruleText(parts) }));
}
