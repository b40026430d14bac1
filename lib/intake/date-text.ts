const month = '(?:jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec|mär|mai|okt|dez)[a-zä]*';
const dates = [
  /^\d{4}-\d{1,2}-\d{1,2}(?:[t ].*)?$/i,
  /^\d{1,2}([./])\d{1,2}\1(?:\d{2}|\d{4})$/,
  new RegExp(`^\\d{1,2}[-./ ]{1,2}${month}\\.?(?:[-./ ]{1,2}\\d{2,4})?$`, 'i'),
  new RegExp(`^${month}\\.?[- ]\\d{2,4}$`, 'i'),
];

/** True for text that a spreadsheet wrote for a date: `2-Jan`, `02/01/2026`, `2026-01-02`, `Jan-26`. */
export function looksLikeDate(text: string): boolean {
  const trimmed = text.trim();
  return trimmed.length <= 30 && dates.some((date) => date.test(trimmed));
}
