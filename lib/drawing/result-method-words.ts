import { powerText } from '@/lib/units/power-text';
import type { DrawingData, DrawingResult } from './drawing-data';

/** "second order, 5 passes, last change 3.1 · 10⁻¹¹", "imperfection to the right →", "slack: BD, CE" … */
export function resultMethodWords(
  { members, noCasesAlone }: Pick<DrawingData, 'noCasesAlone'> & { readonly members: readonly { readonly id: string }[] },
  { method, slack }: Pick<DrawingResult, 'method' | 'slack'>,
): string[] {
  const { order, iterations, change, imperfection, shearDeformation, reducedStiffness, loadScale } = method;
  const passes = iterations === 1 ? 'settled in one pass' : `settled in ${iterations} passes, last change ${powerText(change)}`;
  const words = [
    order === 2
      ? `second order: equilibrium on the deformed shape, ${passes}`
      : `first order${iterations > 1 ? `, ${passes}` : ''}`,
  ];
  if (imperfection !== null) words.push(`imperfection to the ${imperfection} ${imperfection === 'right' ? '→' : '←'}`);
  if (shearDeformation) words.push('members shear as well as bend');
  if (reducedStiffness) words.push('stiffness reduced (AISC 360)');
  if (loadScale !== 1) words.push(`analysed under ${loadScale} times the loads, results divided by ${loadScale}`);
  if (slack.length > 0) {
    const names = slack.map((index) => members[index]?.id ?? '').join(', ');
    words.push(`slack, drawn dashed: ${names}`);
  }
  if (noCasesAlone !== null) words.push(noCasesAlone);
  return words;
}
