/**
 * EN 1990:2002 + A1, 6.4.3 and 6.5.3: fundamental combinations (6.10) or (6.10a/b), seismic (6.12b), and for service
 * characteristic (6.14b), frequent (6.15b) and quasi-permanent (6.16b).
 *
 * - Recommended values: γ of Table A1.2(B), ψ of Table A1.1 (categories A to G, E = storage the largest; from memory but for
 *   roofs, snow and wind), cranes of EN 1991-3 Tables A.1, A.2 (from memory; ψ2 not above ψ1).
 * - Everything dead comes from one source (Table A1.2(B) note 3): one factor, high or low.
 * - Actions of one kind are one action: where it leads, all cases of the kind that act have its full value.
 * - Imposed loads on a roof (category H) act with neither snow nor wind (EN 1991-1-1 3.3.2(1)).
 */
import { type Form, optional, required, type Slot } from '@/lib/combinations/rule-set';
import type { CaseKind, Purpose } from '@/lib/model/frame';

export const enVariable = ['live', 'roof live', 'snow', 'wind', 'crane', 'temperature'] as const;
export type EnVariable = (typeof enVariable)[number];
export type Psi = readonly [psi0: number, psi1: number, psi2: number];

export interface EnFactors {
  readonly expression: '6.10' | '6.10a/b';
  readonly gammaGSup: number;
  readonly gammaGInf: number;
  readonly gammaQ: Readonly<Record<EnVariable, number>>;
  readonly psi: Readonly<Record<EnVariable, Psi>>;
  /** ξ of (6.10b). */
  readonly xi: number;
  readonly service: readonly EnService[];
}

export const enServices = ['characteristic', 'frequent', 'quasi-permanent'] as const;
export type EnService = (typeof enServices)[number];

/** ψ of imposed loads by category (Table A1.1). */
export const psiOfCategory = {
  A: [0.7, 0.5, 0.3],
  B: [0.7, 0.5, 0.3],
  C: [0.7, 0.7, 0.6],
  D: [0.7, 0.7, 0.6],
  E: [1, 0.9, 0.8],
  F: [0.7, 0.7, 0.6],
  G: [0.7, 0.5, 0.3],
} as const satisfies Record<string, Psi>;

/** ψ of snow (Table A1.1): sites up to 1000 m; above, and in the Nordic states. */
export const psiOfSnow = { low: [0.5, 0.2, 0], high: [0.7, 0.5, 0.2] } as const satisfies Record<string, Psi>;

/** Recommended values; where the category or the site's height is not given, the largest. */
export const recommended: Omit<EnFactors, 'expression'> = {
  gammaGSup: 1.35,
  gammaGInf: 1,
  gammaQ: { live: 1.5, 'roof live': 1.5, snow: 1.5, wind: 1.5, crane: 1.35, temperature: 1.5 },
  psi: {
    live: psiOfCategory.E,
    'roof live': [0, 0, 0],
    snow: psiOfSnow.high,
    wind: [0.6, 0.2, 0],
    crane: [1, 0.9, 0.9],
    temperature: [0.6, 0.5, 0],
  },
  xi: 0.85,
  service: enServices,
};

const mayMeet = (a: CaseKind, b: CaseKind): boolean => {
  const roof = (one: CaseKind, other: CaseKind) => one === 'roof live' && (other === 'snow' || other === 'wind');
  return a !== b && !roof(a, b) && !roof(b, a);
};

/** All forms, strength before service. */
export function enForms(factors: EnFactors): Form[] {
  const { expression, gammaGSup, gammaGInf, gammaQ, psi, xi } = factors;
  /** Accompanying actions of a leading one (or of none): each acts or not. */
  const beside = (lead: CaseKind | null, factor: (kind: EnVariable) => number): Slot[] =>
    enVariable
      .filter((kind) => (lead === null ? kind !== 'roof live' : mayMeet(lead, kind)) && factor(kind) > 0)
      .map((kind) => {
        const slot = optional(factor(kind), kind);
        return factor === psi0 ? { ...slot, parts: { gamma: gammaQ[kind], psi: psi[kind][0] } } : slot;
      });
  const psi0 = (kind: EnVariable) => gammaQ[kind] * psi[kind][0];
  const led = (clause: string, dead: number): Form[] =>
    enVariable.map((lead) => strength(clause, dead, [required(gammaQ[lead], lead), ...beside(lead, psi0)]));
  const fundamental =
    expression === '6.10'
      ? [strength('EN 1990 (6.10)', gammaGSup, []), ...led('EN 1990 (6.10)', gammaGSup), ...led('EN 1990 (6.10)', gammaGInf)]
      : [
          ...accompanied('EN 1990 (6.10a)', gammaGSup, psi0),
          ...led('EN 1990 (6.10b)', xi * gammaGSup),
          ...led('EN 1990 (6.10b)', gammaGInf),
        ];
  return [
    ...fundamental,
    strength('EN 1990 (6.12b)', 1, [required(1, 'seismic'), ...beside(null, (kind) => psi[kind][2])]),
    ...factors.service.flatMap((which) => serviceForms(which)),
  ];

  /** Every action at its accompanying value; a roof's imposed load, where it has one, without snow and wind. */
  function accompanied(clause: string, dead: number, factor: (kind: EnVariable) => number): Form[] {
    const roof = factor('roof live');
    return [
      strength(clause, dead, beside(null, factor)),
      ...(roof > 0 ? [strength(clause, dead, [required(roof, 'roof live'), ...beside('roof live', factor)])] : []),
    ];
  }

  function serviceForms(which: EnService): Form[] {
    const [clause, leading, accompanying] = serviceRules[which];
    const value = (kind: EnVariable, i: 0 | 1 | 2 | null) => (i === null ? 1 : psi[kind][i]);
    const alone = accompanying === leading ? beside(null, (kind) => value(kind, accompanying)) : [];
    const leads = enVariable.filter((kind) => value(kind, leading) > 0 && (alone.length === 0 || kind === 'roof live'));
    return [
      made('service', clause, 1, alone, which),
      ...leads.map((lead) => {
        const others = beside(lead, (kind) => value(kind, accompanying));
        return made('service', clause, 1, [required(value(lead, leading), lead), ...others], which);
      }),
    ];
  }
}

/** Clause, and which ψ the leading and the accompanying actions have (null = the characteristic value). */
const serviceRules: Readonly<Record<EnService, readonly [string, 0 | 1 | 2 | null, 0 | 1 | 2]>> = {
  characteristic: ['EN 1990 (6.14b)', null, 0],
  frequent: ['EN 1990 (6.15b)', 1, 2],
  'quasi-permanent': ['EN 1990 (6.16b)', 2, 2],
};

const made = (purpose: Purpose, clause: string, dead: number, slots: readonly Slot[], suffix: string | null): Form => ({
  clause,
  purpose,
  dead,
  slots,
  suffix,
});
const strength = (clause: string, dead: number, slots: readonly Slot[]): Form => made('strength', clause, dead, slots, null);
