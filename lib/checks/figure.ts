/**
 * A figure within a reason, two significant digits, rounded to the unfavourable side: a printed figure never looks safer than
 * it is. `up` for a utilisation, `down` for a load factor.
 */
export function figure(value: number, side: 'up' | 'down'): string {
  if (!Number.isFinite(value)) return '∞';
  if (value === 0) return '0';
  const digits = Math.min(12, Math.max(0, 1 - Math.floor(Math.log10(Math.abs(value)))));
  const scaled = value * 10 ** digits;
  // a figure that is exact to within rounding stays as it is
  const nearest = Math.round(scaled);
  const whole =
    Math.abs(scaled - nearest) < 1e-9 * Math.abs(scaled) ? nearest : side === 'up' ? Math.ceil(scaled) : Math.floor(scaled);
  return (whole / 10 ** digits).toFixed(digits);
}
