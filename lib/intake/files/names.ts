/** A file's name without any folder: paths never appear in what is shown or stored. */
export function baseName(path: string): string {
  return path.slice(Math.max(path.lastIndexOf('/'), path.lastIndexOf('\\')) + 1);
}

/** A name without its extension: the sheet name of a CSV file. */
export function withoutExtension(name: string): string {
  const dot = name.lastIndexOf('.');
  return dot > 0 ? name.slice(0, dot) : name;
}

/** Order of file names, the same on every machine. */
export function byName(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

/** What sheet names are compared by: case, blanks, `_`, `-` and a plural s do not count (sheets §2). */
export function sheetKey(name: string): string {
  const bare = name.toLowerCase().replace(/[\s_-]+/g, '');
  return bare.length > 1 && bare.endsWith('s') ? bare.slice(0, -1) : bare;
}
