/** Which frames are calculated in full: every one, those over or not checked, or places in sheet order from 1. */
export type ReportChoice = 'all' | 'flagged' | readonly number[];

/** Frames that may be named one by one; of more all or the flagged ones are asked for. */
const mostNamed = 20_000;

/**
 * A choice as a person writes it, an address or the command line has it: `all`, `flagged`, or places like `3,7-12` (also
 * `3; 7 – 12`).
 *
 * @param frames how many there are
 * @returns places in ascending order, each once; a sentence where it makes no sense
 */
export function readReportChoice(text: string, frames: number): { readonly frames: ReportChoice } | { readonly wrong: string } {
  if (text === 'all' || text === 'flagged') return { frames: text };
  const unread = { wrong: 'Choose frames as all, flagged, or by their places in sheet order, like 3,7-12.' };
  const chosen = new Set<number>();
  for (const part of text.split(/[,;]/)) {
    const asked = part.trim();
    if (asked === '') continue;
    const [, first, last = first] = /^(\d{1,6})(?:\s*[-–]\s*(\d{1,6}))?$/.exec(asked) ?? [];
    if (first === undefined || last === undefined) return unread;
    const [from, to] = [Number(first), Number(last)];
    if (from < 1 || to > frames || from > to)
      return { wrong: frames === 0 ? 'There is no frame to report on.' : `Choose frames from 1 to ${frames}; found ${asked}.` };
    if (chosen.size + to - from + 1 > mostNamed)
      return { wrong: `Name at most ${mostNamed.toLocaleString('en-GB')} frames; of more choose all.` };
    for (let number = from; number <= to; number++) chosen.add(number);
  }
  return chosen.size === 0 ? unread : { frames: [...chosen].sort((a, b) => a - b) };
}
