/** "1-12, 20, 31–35": frames by their numbers in sheet order, as a person writes them. */

/** @returns the numbers in ascending order, each once; or what is wrong with the text */
export function framesAsked(text: string, frames: number): { readonly numbers: readonly number[] } | { readonly wrong: string } {
  const numbers = new Set<number>();
  for (const piece of text.split(/[,;]/)) {
    const asked = piece.trim();
    if (asked === '') continue;
    const [, first, last = first] = /^(\d{1,6})(?:\s*[-–]\s*(\d{1,6}))?$/.exec(asked) ?? [];
    if (first === undefined || last === undefined) return { wrong: `“${asked}” is no number and no range, like 1-12.` };
    const [from, to] = [Number(first), Number(last)];
    if (from < 1 || to > frames || from > to)
      return { wrong: `“${asked}” names no frames: they are numbered from 1 to ${frames}.` };
    for (let n = from; n <= to; n++) numbers.add(n);
  }
  if (numbers.size === 0) return { wrong: 'Name the frames by their numbers, like 1-12, 20.' };
  return { numbers: [...numbers].sort((a, b) => a - b) };
}
