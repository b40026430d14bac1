import type { Frame, Purpose } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';

/** One state that a combination is analysed as. */
export interface PlannedState {
  /** Index of the combination in the frame. */
  readonly combination: number;
  /** The combination's name, with ` →` or ` ←` where imperfections lean that way. */
  readonly name: string;
  readonly purpose: Purpose;
  readonly order: 1 | 2;
  readonly imperfection: 'right' | 'left' | null;
  /** Stiffness reduced as AISC 360-22 C2.3 says. */
  readonly reduced: boolean;
  readonly loadScale: number;
}

/** Loads of AISC 360-22 ASD times this stand against strength (C2.1(d), C2.2b, C2.3: α). */
export const asdScale = 1.6;

/**
 * The states of a frame's combinations, in order: one each, or two for a strength combination with imperfections.
 * Imperfections and reduced stiffness are for strength. A frame without columns has both directions too, without forces, so
 * that the states of a batch have the same names.
 */
export function planStates(frame: Frame, settings: Settings): readonly PlannedState[] {
  const order = settings.analysis === 'second order' ? 2 : 1;
  const leans = settings.imperfections !== 'none';
  const asd = order === 2 && settings.strengthCheck === 'AISC 360-22 ASD';
  return frame.combinations.flatMap(({ name, purpose }, combination): PlannedState[] => {
    const strength = purpose === 'strength';
    const state: PlannedState = {
      combination,
      name,
      purpose,
      order,
      imperfection: null,
      reduced: strength && settings.stiffnessReduction !== 'none',
      loadScale: strength && asd ? asdScale : 1,
    };
    if (!strength || !leans) return [state];
    return [
      { ...state, name: `${name} →`, imperfection: 'right' },
      { ...state, name: `${name} ←`, imperfection: 'left' },
    ];
  });
}

/** α: what times the loads of a combination stands against strength: 1.6 for ASD, else 1. */
export function strengthScale(settings: Settings): number {
  return settings.strengthCheck === 'AISC 360-22 ASD' ? asdScale : 1;
}

/** Whether every combination is the plain sum of its first-order cases of Euler–Bernoulli members. */
export function isPlain(frame: Frame, settings: Settings): boolean {
  return (
    settings.analysis === 'first order' &&
    !settings.shearDeformation &&
    settings.imperfections === 'none' &&
    settings.stiffnessReduction === 'none' &&
    !frame.members.some((member) => member.tensionOnly)
  );
}
