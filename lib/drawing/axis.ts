/** Round steps for an axis: about `wanted` of them between low and high, each 1, 2 or 5 × 10ⁿ. */
export function ticks(low: number, high: number, wanted: number): number[] {
  const span = high - low;
  if (!(span > 0) || !Number.isFinite(span)) return [low];
  const raw = span / Math.max(1, wanted);
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = [1, 2, 5, 10].map((k) => k * power).find((s) => s >= raw) ?? raw;
  const out: number[] = [];
  for (let i = Math.ceil(low / step - 1e-9); i * step <= high + step * 1e-9; i++) out.push(Number((i * step).toPrecision(12)));
  return out;
}

/** As many decimals as the steps of an axis need. */
export function tickText(value: number, all: readonly number[]): string {
  const step = all.length > 1 ? Math.abs((all[1] ?? 0) - (all[0] ?? 0)) : Math.abs(value) || 1;
  return value.toFixed(Math.max(0, -Math.floor(Math.log10(step) + 1e-9))).replace('-', '−');
}
