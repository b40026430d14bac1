import type { DesignCode } from '../design-code/clause-row';
import { aiscRows } from './aisc-rows';
import { aiscWorking } from './working-aisc';

/** AISC 360-22 by load and resistance factor design. */
export const aiscLrfd: DesignCode = {
  name: 'AISC 360-22 LRFD',
  rows: (member, demands, settings, note) => aiscRows(member, demands, settings, note, 'LRFD'),
  working: aiscWorking,
};

/** AISC 360-22 by allowable strength design. */
export const aiscAsd: DesignCode = {
  name: 'AISC 360-22 ASD',
  rows: (member, demands, settings, note) => aiscRows(member, demands, settings, note, 'ASD'),
  working: aiscWorking,
};
