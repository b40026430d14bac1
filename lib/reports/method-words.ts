import type { Settings } from '@/lib/model/settings';

/** How the settings have frames analysed, a line for each part of it, for cover and screens. The first is of the order. */
export function methodWords(settings: Settings): string[] {
  const lines = [
    settings.analysis === 'second order'
      ? 'second order: every combination in equilibrium on its deformed shape (P-Δ and P-δ); load cases alone of first order'
      : 'first order: equilibrium on the undeformed shape',
  ];
  if (settings.imperfections !== 'none')
    lines.push(
      `imperfections by ${settings.imperfections === 'AISC 360' ? 'AISC 360-22 C2.2b' : 'EN 1993-1-1 5.3.2'}: each strength combination leaning right (→) and left (←), as two results; a check takes the worse`,
    );
  if (settings.stiffnessReduction !== 'none')
    lines.push('stiffness of strength combinations reduced by AISC 360-22 C2.3 (0.8, τb)');
  if (settings.shearDeformation) lines.push('members shear as well as bend');
  return lines;
}
