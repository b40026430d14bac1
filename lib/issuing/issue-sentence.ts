/** One sentence that answers a client's page: how many frames, and whether they are within their limits. */

export interface IssuedCounts {
  readonly over: number;
  readonly notChecked: number;
  readonly near: number;
  readonly within: number;
  /** Frames without a solution or stopped by errors of their sheets: not issued. Not among the four above. */
  readonly notIssued: number;
}

/**
 * "79 frames, all within their limits; 6 of them near."; "12 frames: 2 over, 10 within (3 near)." A frame that is near is within its limits; one that is over or not
 * checked never is, whoever accepted it.
 */
export function issueSentence({ over, notChecked, near, within, notIssued }: IssuedCounts): string {
  const frames = over + notChecked + near + within;
  const pieces: string[] = [];
  if (over === 0 && notChecked === 0) {
    const all = frames === 1 ? '1 frame, within its limits' : `${number(frames)} frames, all within their limits`;
    pieces.push(
      near > 0 ? `${all}; ${near === frames ? (frames === 1 ? 'near them' : 'all near') : `${number(near)} of them near`}` : all,
    );
  } else {
    const bad = [over > 0 && `${number(over)} over`, notChecked > 0 && `${number(notChecked)} not checked`].filter(Boolean);
    const good = near + within;
    pieces.push(
      `${count(frames, 'frame')}: ${bad.join(' and ')}${good > 0 ? `, ${number(good)} within${near > 0 ? ` (${number(near)} near)` : ''}` : ''}`,
    );
  }
  if (notIssued > 0) pieces.push(`${count(notIssued, 'frame')} of the sheets ${notIssued === 1 ? 'is' : 'are'} not issued`);
  return `${pieces.join('. ')}.`;
}

const number = (n: number): string => n.toLocaleString('en-GB');
const count = (n: number, noun: string): string => `${number(n)} ${noun}${n === 1 ? '' : 's'}`;
