import type { Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { figure } from '../figure';
import type { InPlaneRule } from './demand';

/** The rule for a state: with the in-plane length typed, and with it left blank. */
export interface InPlaneRules {
  readonly typed: InPlaneRule;
  readonly blank: InPlaneRule;
}

const yes = (how: string): InPlaneRule => ({ allowed: true, how });
const no = (why: string): InPlaneRule => ({ allowed: false, why });

/** Whether lengths in the plane of the frame stand for a state by the code chosen in the settings. */
export function inPlaneRules(settings: Settings, state: ResultState): InPlaneRules {
  return settings.strengthCheck === 'EN 1993-1-1' ? eurocode(settings, state) : aisc(settings, state);
}

/**
 * EN 1993-1-1 5.2.2(7): the length of the span needs second order with imperfections, or α_cr ≥ 10 (5.2.1(3)). A length that
 * was typed is the engineer's own.
 */
function eurocode(settings: Settings, state: ResultState): InPlaneRules {
  const typed = yes('length as given');
  // notional loads of another standard are smaller
  const leans = settings.imperfections === 'EN 1993-1-1' && state.method !== null && state.method.imperfection !== null;
  if (state.order === 2 && leans) return { typed, blank: yes('length of the span: second order with imperfections (5.2.2(7)a)') };
  const alpha = state.criticalLoadFactor ?? Infinity;
  if (alpha >= 10) return { typed, blank: yes('length of the span: α_cr is 10 or more (5.2.1(3))') };
  return {
    typed,
    blank: no(
      `needs the length in the plane (blank, with α_cr ${figure(alpha, 'down')} below 10), or second order with EN 1993-1-1 imperfections`,
    ),
  };
}

/**
 * AISC 360-22: direct analysis (Chapter C: second order, notional loads, reduced stiffness) with K = 1, or typed lengths by the
 * effective-length method (Appendix 7.2: second order, notional loads, Δ2nd/Δ1st ≤ 1.5, which is α_cr ≥ 3 at the loads of LRFD).
 */
function aisc(settings: Settings, state: ResultState): InPlaneRules {
  const asks = 'needs a second-order analysis with AISC 360 imperfections and AISC 360 stiffness reduction (direct analysis)';
  if (state.order !== 2 || settings.imperfections !== 'AISC 360') {
    const refused = no(`${asks}, or second order with AISC 360 imperfections and lengths in the plane given`);
    return { typed: refused, blank: refused };
  }
  if (settings.stiffnessReduction === 'AISC 360') {
    const direct = yes('direct analysis method (C2), K = 1');
    return { typed: direct, blank: direct };
  }
  const blank = no(`${asks}, or the length in the plane (effective-length method)`);
  const alpha = (state.criticalLoadFactor ?? Infinity) / (settings.strengthCheck === 'AISC 360-22 ASD' ? 1.6 : 1);
  if (alpha >= 3) return { typed: yes('effective-length method (Appendix 7.2), length as given'), blank };
  return {
    typed: no(
      `${asks}: α_cr ${figure(alpha, 'down')} is below 3, beyond the effective-length method (Appendix 7.2.1, Δ2nd/Δ1st above 1.5)`,
    ),
    blank,
  };
}
