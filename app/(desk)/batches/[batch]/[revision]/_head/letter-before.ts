/** The letter before a revision's: "A" for "B", "Z" for "AA"; null for "A", the first. */
export function letterBefore(letter: string): string | null {
  const last = letter.charCodeAt(letter.length - 1);
  const head = letter.slice(0, -1);
  if (last > 65) return head + String.fromCharCode(last - 1);
  if (head === '') return null;
  return `${letterBefore(head) ?? ''}Z`;
}
