/** Number formats of a workbook that show a number as a date or a time (ECMA-376 part 1, 18.8.30 and 18.8.31). */
const builtIn: Readonly<Record<number, string>> = {
  14: 'yyyy-mm-dd', 15: 'd-mmm-yy', 16: 'd-mmm', 17: 'mmm-yy', 18: 'h:mm AM/PM', 19: 'h:mm:ss AM/PM', 20: 'h:mm',
  21: 'h:mm:ss', 22: 'yyyy-mm-dd h:mm', 45: 'mm:ss', 46: '[h]:mm:ss', 47: 'mm:ss',
}; // prettier-ignore

/** The date code of a format, or null if it shows a plain number. @param code the format's own code, undefined = built in */
export function dateCode(id: number, code: string | undefined): string | null {
  if (code === undefined) return builtIn[id] ?? ((id >= 27 && id <= 36) || (id >= 50 && id <= 58) ? 'yyyy-mm-dd' : null);
  const bare = (code.split(';')[0] ?? '')
    .replace(/"[^"]*"/g, '')
    .replace(/[_*]./g, '')
    .replace(/\\(.)/g, (_, c: string) => (/[-./, :]/.test(c) ? c : ''))
    .replace(/\[(?!h+\]|m+\]|s+\])[^\]]*\]/gi, '');
  return /[ymdhs]/i.test(bare) && !/general|standard/i.test(bare) ? bare : null;
}

const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/**
 * A stored day number as a reader sees it.
 * @param serial days since 1899-12-30 (or 1904-01-01)   @param code what `dateCode` gave
 * @returns the text shown, and the day as ISO; null where the number is no day at all
 */
export function showDate(serial: number, code: string, date1904: boolean): { text: string; iso: string } | null {
  const days = date1904 ? serial + 1462 : serial;
  if (!Number.isFinite(days) || days < 0 || days > 2_958_466) return null;
  // the first 60 days of 1900 are one off in every spreadsheet, which knows a 29 February 1900
  const date = new Date(Date.UTC(1899, 11, days < 60 ? 31 : 30) + Math.round(days * 86_400_000));
  const iso = date.toISOString();
  const two = (n: number): string => String(n).padStart(2, '0');
  const hours = /AM\/PM/i.test(code) ? ((date.getUTCHours() + 11) % 12) + 1 : date.getUTCHours();
  const tokens = code.replace(/AM\/PM|A\/P/gi, 'p').match(/\[h+\]|\[m+\]|\[s+\]|y+|m+|d+|h+|s+|p|./gi) ?? [];
  const words = tokens.map((token, i) => {
    const t = token.toLowerCase();
    const minutes =
      /h/i.test(
        tokens
          .slice(0, i)
          .filter((x) => /[hmsyd]/i.test(x))
          .at(-1) ?? '',
      ) || /^s/i.test(tokens.slice(i + 1).find((x) => /[hmsyd]/i.test(x)) ?? '');
    if (t.startsWith('[h')) return String(Math.floor(days * 24));
    if (t.startsWith('[m')) return String(Math.floor(days * 1440));
    if (t.startsWith('[s')) return String(Math.floor(days * 86_400));
    if (t.startsWith('y')) return t.length > 2 ? String(date.getUTCFullYear()) : two(date.getUTCFullYear() % 100);
    if (t.startsWith('m') && !minutes) {
      const month = date.getUTCMonth();
      return t.length > 2 ? months[month] : t.length === 2 ? two(month + 1) : String(month + 1);
    }
    if (t.startsWith('m')) return two(date.getUTCMinutes());
    if (t.startsWith('d')) return t.length > 1 ? two(date.getUTCDate()) : String(date.getUTCDate());
    if (t.startsWith('h')) return t.length > 1 ? two(hours) : String(hours);
    if (t.startsWith('s')) return two(date.getUTCSeconds());
    if (t === 'p') return date.getUTCHours() < 12 ? 'AM' : 'PM';
    return token;
  });
  return { text: words.join('').trim() || iso.slice(0, 10), iso: iso.slice(0, 10) };
}
