/** Where in a list a page ends: the last row's value of the sort and its key. */
export interface Cursor {
  readonly sort: string | number;
  readonly key: readonly number[];
}

export function writeCursor(cursor: Cursor): string {
  return Buffer.from(JSON.stringify([cursor.sort, ...cursor.key])).toString('base64url');
}

/** Null for what was not written by writeCursor for a key of that length: the list then begins at its start. */
export function readCursor(text: string, keys: number): Cursor | null {
  if (text === '') return null;
  let read: unknown;
  try {
    read = JSON.parse(Buffer.from(text, 'base64url').toString('utf8'));
  } catch {
    return null;
  }
  if (!Array.isArray(read) || read.length !== keys + 1) return null;
  const [sort, ...key] = read as unknown[];
  if (typeof sort !== 'string' && typeof sort !== 'number') return null;
  return key.every((one): one is number => typeof one === 'number') ? { sort, key } : null;
}
