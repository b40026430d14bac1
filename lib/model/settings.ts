/** What a batch's Setup sheet (or the office, or a default) says about how every frame of it is analysed and checked. */
export interface Settings {
  readonly title: string | null;
  readonly units: 'metric' | 'us';
  readonly analysis: 'first order' | 'second order';
  readonly material: string | null;
  readonly strengthCheck: 'elastic stress' | 'AISC 360-22 LRFD' | 'AISC 360-22 ASD' | 'EN 1993-1-1';
  /** f: allowable stress ÷ yield. */
  readonly stressFactor: number;
  readonly nearLimit: number;
  /** n of L/n; 'none' = declared to have none; null = silent. */
  readonly deflectionRatio: number | 'none' | null;
  readonly swayRatio: number | 'none' | null;
  readonly stability: 'screened' | 'by others';
  readonly combinationSet: string | null;
  readonly imperfections: 'none' | 'EN 1993-1-1' | 'AISC 360';
  readonly stiffnessReduction: 'none' | 'AISC 360';
  readonly shearDeformation: boolean;
  /** Partial factors of EN 1993-1-1: resistance of cross-sections, and of members to instability. */
  readonly gammaM0: number;
  readonly gammaM1: number;
  /** Of the national annex, as words for the reader: it changes nothing by itself. */
  readonly nationalAnnex: string | null;
  /** Interaction factors of EN 1993-1-1 6.3.3. */
  readonly interaction: 'Annex A' | 'Annex B';
  /** Where loads across a member act, for lateral-torsional buckling. */
  readonly loadHeight: 'shear centre' | 'top flange' | 'bottom flange';
}

export type SettingName = keyof Settings;

/** How each setting is written in the Setup sheet and in the results. */
export const settingWords: Readonly<Record<SettingName, string>> = {
  title: 'title',
  units: 'units',
  analysis: 'analysis',
  material: 'material',
  strengthCheck: 'strength check',
  stressFactor: 'stress factor',
  nearLimit: 'near limit',
  deflectionRatio: 'deflection ratio',
  swayRatio: 'sway ratio',
  stability: 'stability',
  combinationSet: 'combination set',
  imperfections: 'imperfections',
  stiffnessReduction: 'stiffness reduction',
  shearDeformation: 'shear deformation',
  gammaM0: 'gamma M0',
  gammaM1: 'gamma M1',
  nationalAnnex: 'national annex',
  interaction: 'interaction',
  loadHeight: 'load height',
};

export const defaultSettings: Settings = {
  title: null,
  units: 'metric',
  analysis: 'first order',
  material: null,
  strengthCheck: 'elastic stress',
  stressFactor: 0.6,
  nearLimit: 0.9,
  deflectionRatio: null,
  swayRatio: null,
  stability: 'screened',
  combinationSet: null,
  imperfections: 'none',
  stiffnessReduction: 'none',
  shearDeformation: false,
  gammaM0: 1,
  gammaM1: 1,
  nationalAnnex: null,
  interaction: 'Annex B',
  loadHeight: 'shear centre',
};

export interface SettingOrigin {
  readonly source: 'sheet' | 'office' | 'default';
  /** "Setup B6" where the sheet gave it. */
  readonly cell: string | null;
  /** Who chose it on screen; the cell is then that of the revision's own input workbook. */
  readonly changedBy?: string;
}
export type SettingOrigins = Readonly<Record<SettingName, SettingOrigin>>;

/** Settings that only a design code reads. */
const ofDesignCodes: ReadonlySet<SettingName> = new Set(['gammaM0', 'gammaM1', 'nationalAnnex', 'interaction', 'loadHeight']);
const ofEurocode: ReadonlySet<SettingName> = new Set(['gammaM0', 'gammaM1', 'nationalAnnex', 'interaction']);

/** Settings that only the check of elastic stress reads. */
const ofElasticStress: ReadonlySet<SettingName> = new Set(['stressFactor', 'stability']);

/** Whether a setting has a part in the results under the strength check chosen. */
export function settingMatters(name: SettingName, { strengthCheck }: Settings): boolean {
  if (strengthCheck === 'elastic stress') return !ofDesignCodes.has(name);
  return !ofElasticStress.has(name) && (strengthCheck === 'EN 1993-1-1' || !ofEurocode.has(name));
}

/** The settings that cover, screens and results list, in order: those with a part in the results, and any that was given. */
export function statedSettings(settings: Settings, origins: SettingOrigins): readonly SettingName[] {
  const given = (name: SettingName): boolean => (origins[name] as SettingOrigin | undefined)?.source !== 'default';
  return (Object.keys(settingWords) as SettingName[]).filter(
    // a revision kept from before a setting was known has no word of it
    (name) => settings[name] !== undefined && (settingMatters(name, settings) || given(name)),
  );
}
