import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';

/** A state as sheets and settings ask for it, read anew: nothing of it comes from the first analysis. */
export interface AskedState {
  readonly name: string;
  /** On each case, without `scale`. */
  readonly factors: readonly number[];
  readonly order: 1 | 2;
  /** Times the loads under which it is analysed; results are divided by it. */
  readonly scale: number;
  /** 1 imperfections towards +X, −1 towards −X, 0 none. */
  readonly lean: 1 | -1 | 0;
  /** Stiffness as AISC 360-22 C2.3 reduces it. */
  readonly reduced: boolean;
  /** α of τ_b and notional loads: what makes the forces as they are analysed αP. */
  readonly alpha: number;
}

/** Every state that a frame is to have, in order: load cases (none with tension-only members), then combinations. */
export function askedStates(frame: Frame, settings: Settings): AskedState[] {
  const order = settings.analysis === 'second order' ? 2 : 1;
  const asd = settings.strengthCheck === 'AISC 360-22 ASD';
  const plain = { order: 1, scale: 1, lean: 0, reduced: false, alpha: 1 } as const;
  const cases = frame.members.some((m) => m.tensionOnly)
    ? []
    : frame.cases.map(({ name }, c) => ({ ...plain, name, factors: frame.cases.map((_, i) => (i === c ? 1 : 0)) }));
  const leans = settings.imperfections !== 'none';
  const combinations = frame.combinations.flatMap(({ name, purpose, terms }): AskedState[] => {
    const factors = frame.cases.map(() => 0);
    for (const { case: c, factor } of terms) factors[c]! += factor;
    if (purpose !== 'strength') return [{ ...plain, name, factors, order }];
    const scale = asd && order === 2 ? 1.6 : 1;
    const reduced = settings.stiffnessReduction !== 'none';
    const state = { name, factors, order, scale, reduced, alpha: (asd ? 1.6 : 1) / scale } as const;
    if (!leans) return [{ ...state, lean: 0 }];
    return [
      { ...state, name: `${name} →`, lean: 1 },
      { ...state, name: `${name} ←`, lean: -1 },
    ];
  });
  return [...cases, ...combinations];
}
