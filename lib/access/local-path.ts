/**
 * A path of this site, and nothing that a browser could take for another: browsers drop tabs and line ends from an address,
 * and read a backslash as a slash. Null for all else.
 */
export function localPath(next: string | readonly string[] | undefined): string | null {
  return typeof next === 'string' && /^\/(?!\/)[^\\\p{Cc}]*$/u.test(next) ? next : null;
}
