import { channelRows, type Range } from './range';

/** PFC, parallel flange channels: nominal dimensions of EN 10365: h b tw tf r. */
export const pfc: Range = {
  standard: 'EN 10365',
  unit: 'mm',
  made: 'rolled',
  rows: channelRows([
    ['PFC 430x100x64', 430, 100, 11, 19, 15],
    ['PFC 380x100x54', 380, 100, 9.5, 17.5, 15],
    ['PFC 300x100x46', 300, 100, 9, 16.5, 15],
    ['PFC 300x90x41', 300, 90, 9, 15.5, 12],
    ['PFC 260x90x35', 260, 90, 8, 14, 12],
    ['PFC 260x75x28', 260, 75, 7, 12, 12],
    ['PFC 230x90x32', 230, 90, 7.5, 14, 12],
    ['PFC 230x75x26', 230, 75, 6.5, 12.5, 12],
    ['PFC 200x90x30', 200, 90, 7, 14, 12],
    ['PFC 200x75x23', 200, 75, 6, 12.5, 12],
    ['PFC 180x90x26', 180, 90, 6.5, 12.5, 12],
    ['PFC 180x75x20', 180, 75, 6, 10.5, 12],
    ['PFC 150x90x24', 150, 90, 6.5, 12, 12],
    ['PFC 150x75x18', 150, 75, 5.5, 10, 12],
    ['PFC 125x65x15', 125, 65, 5.5, 9.5, 12],
    ['PFC 100x50x10', 100, 50, 5, 8.5, 9],
  ]),
};
