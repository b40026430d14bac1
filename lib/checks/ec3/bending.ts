import type { SectionClass } from './width-limits';

/** W of a class: W_pl for class 1 and 2, the smaller W_el for class 3 (EN 1993-1-1 6.2.5(2), 6.3.2.1(3)). */
export const modulusOf = (sectionClass: SectionClass, Wpl: number, Wel: number): number => (sectionClass <= 2 ? Wpl : Wel);

/** M_c,Rd = W fy/γM0, N·m: M_pl,Rd for class 1 and 2, M_el,Rd for class 3 (EN 1993-1-1 6.2.5(2), (6.13), (6.14)). */
export const bendingResistance = (sectionClass: SectionClass, Wpl: number, Wel: number, fy: number, gammaM0: number): number =>
  (modulusOf(sectionClass, Wpl, Wel) * fy) / gammaM0;
