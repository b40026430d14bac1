/**
 * Published limits on movement, to be copied into an office's own. The figures are as printed; national values and
 * recommendations are for whoever takes them to judge. A preset holds in every service combination unless some are
 * named: where its source limits one load alone, that is on the safe side.
 */
export interface LimitPreset {
  /** "LM-IBC-ROOF noceil_L": the table and its row. */
  readonly id: string;
  readonly what: string;
  readonly measure: 'deflection' | 'sway';
  /** n of L/n or h/n. */
  readonly ratio: number;
  readonly source: string;
}

const table = (
  id: string,
  source: string,
  measure: LimitPreset['measure'],
  rows: readonly (readonly [string, string, number])[],
): LimitPreset[] => rows.map(([row, what, ratio]) => ({ id: `${id} ${row}`, what, measure, ratio, source }));

const ibc = 'IBC Table 1604.3';
const france = 'French annex to EN 1993-1-1';

export const limitPresets: readonly LimitPreset[] = [
  ...table('LM-IBC-ROOF', ibc, 'deflection', [
    ['plaster_L', 'roof member with a plaster ceiling, live', 360],
    ['plaster_SW', 'roof member with a plaster ceiling, snow or wind', 360],
    ['plaster_DL', 'roof member with a plaster ceiling, dead and live', 240],
    ['nonplaster_L', 'roof member with another ceiling, live', 240],
    ['nonplaster_SW', 'roof member with another ceiling, snow or wind', 240],
    ['nonplaster_DL', 'roof member with another ceiling, dead and live', 180],
    ['noceil_L', 'roof member without a ceiling, live', 180],
    ['noceil_SW', 'roof member without a ceiling, snow or wind', 180],
    ['noceil_DL', 'roof member without a ceiling, dead and live', 120],
  ]),
  ...table('LM-IBC-FLOOR', ibc, 'deflection', [
    ['floor_L', 'floor member, live', 360],
    ['floor_DL', 'floor member, dead and live', 240],
  ]),
  ...table('LM-IBC-WALL', ibc, 'deflection', [
    ['ext_plaster', 'exterior wall with plaster, wind', 360],
    ['ext_brittle', 'exterior wall with another brittle finish, wind', 240],
    ['ext_flexible', 'exterior wall with a flexible finish, wind', 120],
    ['int_plaster', 'interior partition with plaster, live', 360],
    ['int_brittle', 'interior partition with another brittle finish, live', 240],
    ['int_flexible', 'interior partition with a flexible finish, live', 120],
    ['farm', 'farm building, dead and live', 180],
    ['greenhouse', 'greenhouse, dead and live', 120],
  ]),
  ...table('LM-IBC-METAL', `${ibc}, footnote a`, 'deflection', [
    ['sheet_total', 'formed metal sheets, all loads', 60],
    ['purlin_live', 'secondary roof member under metal roofing, live', 150],
    ['girt_wind', 'secondary wall member behind metal siding, wind', 90],
  ]),
  ...table('LM-UK-V', 'UK annex to EN 1993-1-1, NA.2.23', 'deflection', [
    ['cantilever', 'cantilever', 180],
    ['brittle', 'beam carrying plaster or another brittle finish', 360],
    ['other', 'other beam, not purlins and rails', 200],
  ]),
  ...table('LM-FR-V', france, 'deflection', [
    ['roof_wmax', 'roof, all loads', 200],
    ['roof_w23', 'roof, variable loads', 250],
    ['roofpers_w23', 'roof that carries people often, variable loads', 300],
    ['floor_wmax', 'floor, all loads', 200],
    ['floor_w23', 'floor, variable loads', 300],
    ['brittle_wmax', 'floor or roof with brittle parts, all loads', 250],
    ['brittle_w23', 'floor or roof with brittle parts, variable loads', 350],
    ['col_wmax', 'floor that supports columns, all loads', 400],
    ['col_w23', 'floor that supports columns, variable loads', 500],
    ['appearance', 'where sagging is seen, all loads', 250],
  ]),
  ...table('LM-FR-H', france, 'sway', [
    ['portal', 'portal frame without cranes, top of column', 150],
    ['post', 'post that supports metal cladding', 150],
    ['other', 'single-storey building with brittle walls, top of column', 250],
  ]),
  ...table('LM-ES', 'Spanish limits (Steel Buildings in Europe)', 'deflection', [
    ['roof_access', 'roof with access for maintenance only', 250],
    ['roof', 'roof', 300],
    ['floor', 'floor without fragile elements', 300],
    ['partitions', 'floor with ordinary partitions', 400],
    ['fragile', 'floor with fragile elements', 500],
  ]),
  ...table('LM-ES', 'Spanish limits (Steel Buildings in Europe)', 'sway', [
    ['portal_h', 'portal frame without fragile elements', 150],
    ['flat_h', 'single-storey building with a flat roof', 300],
  ]),
  ...table('LM-DG3', 'AISC Design Guide 3, 10-year wind', 'sway', [
    ['bareframe_min', 'metal panels on bare frame, stricter end of the range', 100],
    ['bareframe_max', 'metal panels on bare frame, looser end of the range', 60],
  ]),
  ...table('LM-DG3', 'AISC Design Guide 3, 10-year wind', 'deflection', [['girt', 'girt with metal panels', 120]]),
  ...table('LM-SN035', 'Access Steel SN035a', 'sway', [['top', 'portal frame without cranes, top of column', 150]]),
];
