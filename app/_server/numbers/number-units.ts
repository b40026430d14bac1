/** Units in which matrices and vectors of one page multiply out: one of force, one of length, radians. */
export interface NumberUnits {
  readonly name: 'si' | 'metric' | 'us';
  readonly force: string;
  readonly length: string;
  /** N and m of each. */
  readonly N: number;
  readonly m: number;
}

const all = {
  si: { name: 'si', force: 'N', length: 'm', N: 1, m: 1 },
  metric: { name: 'metric', force: 'kN', length: 'm', N: 1000, m: 1 },
  // 1 kip = 1000 lbf exactly 0.45359237 × 9.80665 N each; 1 in = 0.0254 m (NIST SP 811)
  us: { name: 'us', force: 'kip', length: 'in', N: 4448.2216152605, m: 0.0254 },
} as const;

/** @param asked `si` as the engine has them, else those that go with the batch */
export const numberUnits = (asked: string | null, batch: 'metric' | 'us'): NumberUnits => (asked === 'si' ? all.si : all[batch]);

/** "kN·m²" of powers of force and length. */
export function unitText({ force, length }: NumberUnits, forces: 0 | 1, lengths: number): string {
  const raised = (power: number) => (power === 1 ? length : `${length}${'⁰¹²³⁴'[power] ?? ''}`);
  if (lengths < 0) return `${forces ? force : '1'}/${raised(-lengths)}`;
  return [...(forces ? [force] : []), ...(lengths > 0 ? [raised(lengths)] : [])].join('·');
}

/** SI → these units, of powers of force and length. */
export const inUnits = (value: number, { N, m }: NumberUnits, forces: 0 | 1, lengths: number): number =>
  value / (N ** forces * m ** lengths);
