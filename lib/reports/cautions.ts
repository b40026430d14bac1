/** The words that stand once, plainly, wherever results are read. */
import type { Settings } from '@/lib/model/settings';

export const cautions: readonly string[] = [
  'Results are of a linear-elastic plane model of what the sheets say.',
  "They don't check connections, foundations, out-of-plane stability beyond the lengths given, fatigue, fire or erection.",
  'They must be reviewed by a competent engineer, licensed where the law asks for it. Local codes, national annexes and the authority having jurisdiction come first.',
  'An "over" or "not checked" is not to be built from, unless a checker accepted it with the reason printed beside it.',
  'A pass here is not a signature or a seal.',
];

/** What the settings have checked and what they leave out, as two sentences for cover, title block and screens. */
export function checkedWords(settings: Settings): { readonly checked: string; readonly notChecked: string } {
  const elastic = settings.strengthCheck === 'elastic stress';
  const screened = settings.stability === 'screened';
  const checked = [
    ...(elastic
      ? ['elastic normal, shear and equivalent stress', screened ? 'whether buckling is negligible' : null]
      : byCode(settings)),
    settings.deflectionRatio === 'none' ? null : 'deflection',
    settings.swayRatio === 'none' ? null : 'sway',
    'other movements where Limits ask for them',
    settings.analysis === 'second order'
      ? 'critical load factor of the plane frame'
      : 'critical load factor of the plane frame (whether first-order results hold)',
  ].filter((each) => each !== null);
  const left = [
    screened || !elastic ? null : 'member and frame stability (by others): this is a check of stress and movement only',
    settings.deflectionRatio === 'none' ? 'deflection (declared to have no limit, except where Limits name one)' : null,
    settings.swayRatio === 'none' ? 'sway (declared to have no limit, except where Limits name one)' : null,
    elastic ? 'member buckling by a design code' : null,
    elastic ? null : 'members that a clause does not cover, each named with its reason',
    elastic ? null : 'holes and net sections, local crushing under loads and supports, torsion, bending out of the plane',
    'connections, foundations, fatigue, fire, erection',
  ].filter((each) => each !== null);
  return { checked: `${checked.join('; ')}.`, notChecked: `${left.join('; ')}.` };
}

function byCode({ strengthCheck, gammaM0, gammaM1, nationalAnnex, interaction }: Settings): readonly string[] {
  if (strengthCheck !== 'EN 1993-1-1')
    return [`members by ${strengthCheck}: tension, compression, bending, shear and combined forces (D, E, F, G, H1)`];
  const annex = nationalAnnex === null ? '' : `, national annex: ${nationalAnnex}`;
  return [
    `members by EN 1993-1-1: cross-sections (6.2) and buckling (6.3, interaction by ${interaction}), γM0 ${gammaM0}, γM1 ${gammaM1}${annex}`,
  ];
}
