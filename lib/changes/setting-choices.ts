/** The settings that are chosen on screen, each with its choices and a plain word on what it does. */
import { ruleSetNames } from '@/lib/combinations/read-rule-set';
import { readSetting } from '@/lib/changes/setting-value';
import type { SettingName } from '@/lib/model/settings';

export interface SettingChoice {
  readonly setting: SettingName;
  readonly help: string;
  /** Values to choose from, as typed on the sheet; null = a number is typed. */
  readonly options: readonly string[] | null;
  /** For a number: what may be typed. */
  readonly hint: string | null;
}

const choice = (setting: SettingName, options: readonly string[], help: string): SettingChoice => ({
  setting,
  help,
  options,
  hint: null,
});
const number = (setting: SettingName, hint: string, help: string): SettingChoice => ({ setting, help, options: null, hint });

const offered: readonly SettingChoice[] = [
  choice(
    'analysis',
    ['first order', 'second order'],
    'Second order finds equilibrium on the deformed shape: what axial forces add to sway and to bending is in the results of every combination.',
  ),
  number(
    'combinationSet',
    `as listed, ${ruleSetNames.join(', ')}; behind a comma, as in “EN 1990 6.10, live B, snow to 1000 m”, what differs from the largest recommended factors`,
    'Combinations made from the kinds of the load cases by a published rule set, beside those that are listed.',
  ),
  choice(
    'imperfections',
    ['none', 'EN 1993-1-1', 'AISC 360'],
    'Frames that are out of plumb: sideways forces with every strength combination, both ways, as the standard gives them.',
  ),
  choice(
    'stiffnessReduction',
    ['none', 'AISC 360'],
    'Strength combinations are analysed with reduced stiffness, for yielding and residual stress.',
  ),
  choice('shearDeformation', ['no', 'yes'], 'Members also give by shear; every section needs its shear area.'),
  choice(
    'strengthCheck',
    ['elastic stress', 'AISC 360-22 LRFD', 'AISC 360-22 ASD', 'EN 1993-1-1'],
    'What members are checked against in strength combinations.',
  ),
  number('stressFactor', 'above 0, at most 1', 'Allowable stress ÷ yield stress. With factored loads it is usually 0.9 to 1.'),
  number(
    'gammaM0',
    'above 0, like 1.0',
    'EN 1993-1-1: partial factor for the resistance of cross-sections; the national annex gives it.',
  ),
  number(
    'gammaM1',
    'above 0, like 1.0',
    'EN 1993-1-1: partial factor for members against buckling; the national annex gives it.',
  ),
  choice('interaction', ['Annex B', 'Annex A'], 'EN 1993-1-1: which annex gives the interaction factors of 6.3.3.'),
  choice(
    'loadHeight',
    ['shear centre', 'top flange', 'bottom flange'],
    'Where loads across a member act, for lateral-torsional buckling under a design code. On the flange that is pressed they push it over.',
  ),
  number('nearLimit', 'above 0, at most 1', 'From this ratio on a check is near. It changes verdicts, not figures.'),
  choice(
    'stability',
    ['screened', 'by others'],
    'Screened: members that need a stability check are named as not checked. By others: somebody else checks it, and every page says so.',
  ),
  number(
    'deflectionRatio',
    'n of L/n, like 250, or none',
    'Members may deflect by their length over n, unless a row of Limits says otherwise.',
  ),
  number(
    'swayRatio',
    'n of h/n, like 300, or none',
    'Columns may lean by their height over n, unless a row of Limits says otherwise.',
  ),
];

/** The settings offered, without choices that cannot be analysed yet. */
export function settingChoices(): SettingChoice[] {
  return offered.flatMap((each) => {
    const options = each.options?.filter((value) => readSetting(each.setting, value).refused === null) ?? null;
    // one choice is none
    return options !== null && options.length < 2 ? [] : [{ ...each, options }];
  });
}
