import { taperedChannelRows, type Range } from './range';

/**
 * UPN, channels with tapered flanges: nominal dimensions of EN 10365: h b tw tf r, toe radius. Slope of the inner flange
 * face 8 % with tf at b/2 up to UPN 300; 5 % with tf at (b − tw)/2 from the toe above.
 */
export const upn: Range = {
  standard: 'EN 10365',
  unit: 'mm',
  made: 'rolled',
  rows: taperedChannelRows(
    [
      ['UPN 50', 50, 38, 5, 7, 7, 3.5],
      ['UPN 65', 65, 42, 5.5, 7.5, 7.5, 4],
      ['UPN 80', 80, 45, 6, 8, 8, 4],
      ['UPN 100', 100, 50, 6, 8.5, 8.5, 4.5],
      ['UPN 120', 120, 55, 7, 9, 9, 4.5],
      ['UPN 140', 140, 60, 7, 10, 10, 5],
      ['UPN 160', 160, 65, 7.5, 10.5, 10.5, 5.5],
      ['UPN 180', 180, 70, 8, 11, 11, 5.5],
      ['UPN 200', 200, 75, 8.5, 11.5, 11.5, 6],
      ['UPN 220', 220, 80, 9, 12.5, 12.5, 6.5],
      ['UPN 240', 240, 85, 9.5, 13, 13, 6.5],
      ['UPN 260', 260, 90, 10, 14, 14, 7],
      ['UPN 280', 280, 95, 10, 15, 15, 7.5],
      ['UPN 300', 300, 100, 10, 16, 16, 8],
      ['UPN 320', 320, 100, 14, 17.5, 17.5, 8.8],
      ['UPN 350', 350, 100, 14, 16, 16, 8],
      ['UPN 380', 380, 102, 13.5, 16, 16, 8],
      ['UPN 400', 400, 110, 14, 18, 18, 9],
    ],
    (h, b, tw) => (h <= 300 ? { slope: 0.08, at: b / 2 } : { slope: 0.05, at: (b + tw) / 2 }),
  ),
};
