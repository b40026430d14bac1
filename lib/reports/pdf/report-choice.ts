/** Which frames are calculated in full: every one, those over or not checked, or places in sheet order from 1. */
export type ReportChoice = 'all' | 'flagged' | readonly number[];

/** Frames that may be named one by one; of more all or the flagged ones are asked for. */
const mostNamed = 2_000;

/**
 * A choice as an address or the command line has it: `all`, `flagged`, or places like `3,7-12`.
 *
 * @param frames how many there are
 * @returns a sentence where it makes no sense
 */
export function readReportChoice(text: string, frames: number): { readonly frames: ReportChoice } | { readonly wrong: string } {
  if (text === 'all' || text === 'flagged') return { frames: text };
  const chosen = new Set<number>();
  for (const part of text.split(',')) {
    const [, first, last = first] = /^\s*(\d{1,6})(?:\s*-\s*(\d{1,6}))?\s*$/.exec(part) ?? [];
    if (first === undefined || last === undefined)
      return { wrong: 'Choose frames as all, flagged, or by their places in sheet order, like 3,7-12.' };
    const [from, to] = [Number(first), Number(last)];
    if (from < 1 || to > frames || from > to)
      return {
        wrong: frames === 0 ? 'There is no frame to report on.' : `Choose frames from 1 to ${frames}; found ${part.trim()}.`,
      };
    if (chosen.size + to - from + 1 > mostNamed) return { wrong: `Name at most ${mostNamed} frames; of more choose all.` };
    for (let number = from; number <= to; number++) chosen.add(number);
  }
  return { frames: [...chosen].sort((a, b) => a - b) };
}
