/** A very small figure as engineers write it: "3.1 · 10⁻¹⁵". */
export function powerText(value: number): string {
  if (value === 0) return '0';
  const [digits = '', power = ''] = value.toExponential(1).split('e');
  const raised = [...String(Number(power))].map((letter) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(letter)] ?? '⁻').join('');
  return `${digits} · 10${raised}`;
}
