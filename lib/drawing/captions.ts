import { unitLabel } from '@/lib/units/batch-unit';
import { formatNumber } from '@/lib/units/format';
import type { Force } from './diagram-plan';
import type { DrawingBuckled, DrawingData, DrawingResult } from './drawing-data';

export const viewNames = ['diagram', 'loads', 'deflected', 'ratio'] as const;
export type ViewName = (typeof viewNames)[number];
/** What the first view draws: a diagram of internal forces, or the buckled shape (B). */
export type Diagram = Force | 'B';

const forceTitles = { N: 'Axial force', V: 'Shear force', M: 'Bending moment' } as const;

/** Title of a view and what it shows. */
export function captionOf(
  name: ViewName,
  data: DrawingData,
  diagram: Diagram,
  shape: DrawingBuckled | null = null,
): { title: string; note: string } {
  const result = data.chosen;
  const told = (one: DrawingResult | null) => (one ? [one.name, one.description].filter(Boolean).join(', ') : 'not solved');
  if (name === 'diagram') {
    if (diagram === 'B') return { title: 'Buckled shape', note: result ? buckledWords(result, shape) : told(null) };
    return { title: forceTitles[diagram], note: result ? `${told(result)}; ${unitWords(diagram, data)}` : told(null) };
  }
  if (name === 'loads') return { title: 'Loads and reactions', note: told(result) };
  if (name === 'deflected') return { title: 'Deflected line', note: told(data.movement ?? result) };
  return { title: 'Ratio', note: result ? 'each member filled to its governing ratio' : 'nothing is checked yet' };
}

function unitWords(force: Force, { units }: DrawingData): string {
  if (force === 'M') return `${unitLabel('moment', units)}, drawn on the tension side`;
  return `${unitLabel('force', units)}${force === 'N' ? ', tension positive' : ''}`;
}

/** "at 4.21 times the loads of C3 → the frame would buckle so: in its plane, elastic" */
function buckledWords({ name, method: { criticalLoadFactor } }: DrawingResult, shape: DrawingBuckled | null): string {
  if (criticalLoadFactor === null) return 'none';
  const times = formatNumber(criticalLoadFactor, { significant: 3 });
  const what = shape?.kind === 'member' ? 'a member would buckle so between its nodes' : 'the frame would sway so';
  return `at ${times} times the loads of ${name} ${what}; in its plane, elastic, out of plane not looked at`;
}
