const months = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

/** "1 December 2026" of an instant (ISO 8601, UTC); the text itself where it is none. */
export function longDate(at: string): string {
  const [, year, month, day] = /^(\d{4})-(\d\d)-(\d\d)/.exec(at) ?? [];
  return year === undefined ? at : `${Number(day)} ${months[Number(month) - 1] ?? month} ${year}`;
}

/** "1 Dec 2026" */
export function shortDate(at: string): string {
  const [day = '', month = '', ...year] = longDate(at).split(' ');
  return [day, month.slice(0, 3), ...year].join(' ').trim();
}
