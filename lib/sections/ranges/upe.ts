import { channelRows, type Range } from './range';

/** UPE, parallel flange channels: nominal dimensions of EN 10365: h b tw tf r. */
export const upe: Range = {
  standard: 'EN 10365',
  unit: 'mm',
  made: 'rolled',
  rows: channelRows([
    ['UPE 80', 80, 50, 4, 7, 10],
    ['UPE 100', 100, 55, 4.5, 7.5, 10],
    ['UPE 120', 120, 60, 5, 8, 12],
    ['UPE 140', 140, 65, 5, 9, 12],
    ['UPE 160', 160, 70, 5.5, 9.5, 12],
    ['UPE 180', 180, 75, 5.5, 10.5, 12],
    ['UPE 200', 200, 80, 6, 11, 13],
    ['UPE 220', 220, 85, 6.5, 12, 13],
    ['UPE 240', 240, 90, 7, 12.5, 15],
    ['UPE 270', 270, 95, 7.5, 13.5, 15],
    ['UPE 300', 300, 100, 9.5, 15, 15],
    ['UPE 330', 330, 105, 11, 16, 18],
    ['UPE 360', 360, 110, 12, 17, 18],
    ['UPE 400', 400, 115, 13.5, 18, 18],
  ]),
};
