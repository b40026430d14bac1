import { taperedChannelRows, type Range } from './range';

/**
 * MC, channels with tapered flanges: nominal dimensions of ASTM A6: d bf tw tf (mean thickness). The standard gives neither
 * radii nor one slope: root radius and slope are those that give the tabulated area and minor second moment, the toe radius
 * is half of the root radius.
 */
export const mc: Range = {
  standard: 'ASTM A6',
  unit: 'in',
  made: 'rolled',
  rows: taperedChannelRows(
    [
      ['MC18X58', 18, 4.2, 0.7, 0.625, 0.666, undefined, 0.056],
      ['MC18X51.9', 18, 4.1, 0.6, 0.625, 0.665, undefined, 0.055],
      ['MC18X45.8', 18, 4, 0.5, 0.625, 0.668, undefined, 0.059],
      ['MC18X42.7', 18, 3.95, 0.45, 0.625, 0.665, undefined, 0.055],
      ['MC13X50', 13, 4.41, 0.787, 0.61, 0.467, undefined, 0.151],
      ['MC13X40', 13, 4.19, 0.56, 0.61, 0.467, undefined, 0.151],
      ['MC13X35', 13, 4.07, 0.447, 0.61, 0.551, undefined, 0.147],
      ['MC13X31.8', 13, 4, 0.375, 0.61, 0.483, undefined, 0.15],
      ['MC12X50', 12, 4.14, 0.835, 0.7, 0.428, undefined, 0.046],
      ['MC12X45', 12, 4.01, 0.71, 0.7, 0.452, undefined, 0.04],
      ['MC12X40', 12, 3.89, 0.59, 0.7, 0.582, undefined, 0.037],
      ['MC12X35', 12, 3.77, 0.465, 0.7, 0.564, undefined, 0.041],
      ['MC12X31', 12, 3.67, 0.37, 0.7, 0.454, undefined, 0.043],
      ['MC12X14.3', 12, 2.12, 0.25, 0.313, 0.21, undefined, 0.172],
      ['MC12X10.6', 12, 1.5, 0.19, 0.309, 0.223, undefined, 0.179],
      ['MC10X41.1', 10, 4.32, 0.796, 0.575, 0.556, undefined, 0.055],
      ['MC10X33.6', 10, 4.1, 0.575, 0.575, 0.487, undefined, 0.06],
      ['MC10X28.5', 10, 3.95, 0.425, 0.575, 0.487, undefined, 0.06],
      ['MC10X25', 10, 3.41, 0.38, 0.575, 0.455, undefined, 0.077],
      ['MC10X22', 10, 3.32, 0.29, 0.575, 0.495, undefined, 0.078],
      ['MC10X8.4', 10, 1.5, 0.17, 0.28, 0.267, undefined, 0.172],
      ['MC10X6.5', 10, 1.17, 0.152, 0.202, 0.26, undefined, 0.065],
      ['MC9X25.4', 9, 3.5, 0.45, 0.55, 0.485, undefined, 0.065],
      ['MC9X23.9', 9, 3.45, 0.4, 0.55, 0.486, undefined, 0.066],
      ['MC8X22.8', 8, 3.5, 0.427, 0.525, 0.455, undefined, 0.064],
      ['MC8X21.4', 8, 3.45, 0.375, 0.525, 0.431, undefined, 0.066],
      ['MC8X20', 8, 3.03, 0.4, 0.5, 0.386, undefined, 0.077],
      ['MC8X18.7', 8, 2.98, 0.353, 0.5, 0.425, undefined, 0.073],
      ['MC8X8.5', 8, 1.87, 0.179, 0.311, 0.273, undefined, 0.165],
      ['MC7X22.7', 7, 3.6, 0.503, 0.5, 0.43, undefined, 0.057],
      ['MC7X19.1', 7, 3.45, 0.352, 0.5, 0.414, undefined, 0.06],
      ['MC6X18', 6, 3.5, 0.379, 0.475, 0.424, undefined, 0.054],
      ['MC6X15.3', 6, 3.5, 0.34, 0.385, 0.245, undefined, 0.058],
      ['MC6X16.3', 6, 3, 0.375, 0.475, 0.411, undefined, 0.068],
      ['MC6X15.1', 6, 2.94, 0.316, 0.475, 0.432, undefined, 0.068],
      ['MC6X12', 6, 2.5, 0.31, 0.375, 0.316, undefined, 0.067],
      ['MC6X7', 6, 1.88, 0.179, 0.291, 0.318, undefined, 0.096],
      ['MC6X6.5', 6, 1.85, 0.155, 0.291, 0.358, undefined, 0.089],
      ['MC4X13.8', 4, 2.5, 0.5, 0.5, 0.331, undefined, 0.069],
      ['MC3X7.1', 3, 1.94, 0.312, 0.351, 0.35, undefined, 0.099],
    ],
    (_h, b, tw, slope = 0) => ({ slope, at: (b + tw) / 2 }),
  ),
};
