import { type OfficeLimit, ofNodes } from '@/lib/model/office-limit';

/** Whose a limit is: "all members", "role beam", "nodes at eaves". */
export function limitedWords({ appliesTo, measure }: OfficeLimit, roles: readonly string[]): string {
  if (appliesTo === '*') return ofNodes(measure) ? 'all nodes' : 'all members';
  const role = roles.includes(appliesTo);
  if (!ofNodes(measure)) return `role ${appliesTo}`;
  return role ? `nodes of role ${appliesTo}` : `nodes at ${appliesTo}`;
}

/** "deflection", "displacement in x", "spread to apex" */
export function measureWords({ measure, direction, toPlace }: OfficeLimit): string {
  if (measure === 'displacement' && direction && direction !== 'resultant') return `displacement in ${direction}`;
  return measure === 'spread' ? `spread to ${toPlace ?? ''}` : measure;
}

/** "L/250", "50 mm", "L/250 and 50 mm" */
export function figureWords({ measure, ratio, absolute_m }: OfficeLimit): string {
  const letter = measure === 'sway' ? 'h' : measure === 'spread' ? 'distance' : 'L';
  const parts = [
    ...(ratio === null ? [] : [`${letter}/${ratio}`]),
    ...(absolute_m ? [`${Number((absolute_m * 1000).toPrecision(6))} mm`] : []),
  ];
  return parts.join(' and ');
}
