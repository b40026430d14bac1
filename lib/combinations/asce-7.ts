/**
 * ASCE 7-22 and ASCE 7-16, combinations for strength (2.3.1, 2.3.6) and for allowable stress (2.4.1, 2.4.5).
 *
 * - A crane's load is a live load (chapter 4). No kind stands for rain, fluid, earth pressure, ice or tornado: no combination holds them.
 * - L keeps its factor of 1.0 in (3), (4), (6): the exception that halves it is not taken (safe side).
 * - Self-straining effects (2.3.4, 2.4.4) have no combination of their own in the standard: a temperature case has no rule.
 * - Seismic cases are E as given, with E_v in them; (7) and (10) take them with both signs only where they are reversible,
 *   and −0.2 S_DS D and overstrength (2.3.6, 12.4.3) are not made.
 * - Service: common practice after appendix C and its commentary (D + L, D + S, D + 0.5 L + W), snow and wind in full.
 *
 * Source: ASCE/SEI 7-22 and 7-16, 2.3.1 and 2.4.1 checked against published excerpts; 2.3.6, 2.4.5 from memory.
 */
import { type Form, optional, required, type Slot } from '@/lib/combinations/rule-set';

export type AsceEdition = '7-22' | '7-16';

interface Roof {
  readonly live: number;
  readonly snow: number;
}

/** (L_r or S): one form for each; without either the rest of the form stands alone. */
const roofs = ({ live, snow }: Roof, how: typeof required | typeof optional): Slot[] => [
  how(live, 'roof live'),
  how(snow, 'snow'),
];

const L = ['live', 'crane'] as const;

const form = (clause: string, dead: number, slots: readonly Slot[], service = false): Form => ({
  clause,
  purpose: service ? 'service' : 'strength',
  dead,
  slots,
  suffix: service ? 'service' : null,
});

/** 2.3.1 (1) to (5) and 2.3.6 (6), (7). */
export function lrfdForms(edition: AsceEdition): Form[] {
  const new22 = edition === '7-22';
  const a = new22 ? 'a' : '';
  const basic = (n: number) => `ASCE ${edition} 2.3.1 (${n}${a})`;
  const companion: Roof = { live: 0.5, snow: new22 ? 0.3 : 0.5 };
  const principal: Roof = { live: 1.6, snow: new22 ? 1 : 1.6 };
  return [
    form(basic(1), 1.4, []),
    ...roofs(companion, optional).map((roof) => form(basic(2), 1.2, [required(1.6, ...L), roof])),
    ...roofs(principal, required).flatMap((roof) => [
      form(basic(3), 1.2, [roof, optional(1, ...L)]),
      form(basic(3), 1.2, [roof, required(0.5, 'wind')]),
    ]),
    ...roofs(companion, optional).map((roof) => form(basic(4), 1.2, [required(1, 'wind'), optional(1, ...L), roof])),
    form(basic(5), 0.9, [required(1, 'wind')]),
    form(`ASCE ${edition} 2.3.6 (6)`, 1.2, [required(1, 'seismic'), optional(1, ...L), optional(new22 ? 0.15 : 0.2, 'snow')]),
    form(`ASCE ${edition} 2.3.6 (7)`, 0.9, [required(1, 'seismic')]),
    ...service(edition),
  ];
}

/** 2.4.1 (1) to (7) and 2.4.5 (8) to (10). */
export function asdForms(edition: AsceEdition): Form[] {
  const new22 = edition === '7-22';
  const a = new22 ? 'a' : '';
  const basic = (n: number) => `ASCE ${edition} 2.4.1 (${n}${a})`;
  const roof: Roof = { live: 1, snow: new22 ? 0.7 : 1 };
  // 0.75 (0.7 S): in 2.4.5 (9) too, on the safe side of the smaller snow that ASCE 7-22 has there
  const three: Roof = { live: 0.75, snow: 0.75 * roof.snow };
  return [
    form(basic(1), 1, []),
    form(basic(2), 1, [required(1, ...L)]),
    ...roofs(roof, required).map((each) => form(basic(3), 1, [each])),
    ...roofs(three, required).map((each) => form(basic(4), 1, [required(0.75, ...L), each])),
    form(basic(5), 1, [required(0.6, 'wind')]),
    form(basic(6), 1, [required(0.45, 'wind'), required(0.75, ...L)]),
    ...roofs(three, required).map((each) => form(basic(6), 1, [required(0.45, 'wind'), optional(0.75, ...L), each])),
    form(basic(7), 0.6, [required(0.6, 'wind')]),
    form(`ASCE ${edition} 2.4.5 (8)`, 1, [required(0.7, 'seismic')]),
    form(`ASCE ${edition} 2.4.5 (9)`, 1, [required(0.525, 'seismic'), optional(0.75, ...L), optional(three.snow, 'snow')]),
    form(`ASCE ${edition} 2.4.5 (10)`, 0.6, [required(0.7, 'seismic')]),
    ...service(edition),
  ];
}

function service(edition: AsceEdition): Form[] {
  const clause = `ASCE ${edition} appendix C, common practice`;
  return [
    form(clause, 1, [], true),
    form(clause, 1, [required(1, ...L)], true),
    form(clause, 1, [required(1, 'roof live')], true),
    form(clause, 1, [required(1, 'snow')], true),
    form(clause, 1, [required(1, 'wind'), optional(0.5, ...L)], true),
  ];
}
