/** Which change of the inputs touches a frame or a member that moved, in a few words. */
import { idKey } from '@/lib/intake/ids';
import type { FramePair } from '@/lib/results/compare';
import type { InputDifference, SettingDifference } from '@/lib/results/compare-inputs';

export interface Causes {
  /** Null: nothing in the rows of the sheets; then settings or the engine differ. */
  readonly ofFrame: (frame: string) => string | null;
  /** What names the member, else what touches its frame. */
  readonly ofMember: (frame: string, member: string) => string | null;
}

/** Changes that are named; the others are counted. */
const mostNamed = 2;

/**
 * A row that names a frame touches that frame; every other row (of a family, a section, a case, a combination, `*`) may touch
 * any, and is named where no row of the frame's own differs.
 *
 * @param frames ids of the frames that are not the same in both
 */
export function causesOf(differences: readonly InputDifference[], frames: readonly string[]): Causes {
  const known = new Set(frames.map(idKey));
  const own = new Map<string, Touch[]>();
  const shared: Touch[] = [];
  for (const difference of differences) {
    if (difference.what === 'heading' && difference.where === 'headings') continue;
    const [frame, rest] = ownerOf(difference.where, known);
    const touch = { rest, difference };
    if (frame === null) shared.push(touch);
    else {
      const list = own.get(frame);
      if (list) list.push(touch);
      else own.set(frame, [touch]);
    }
  }
  const wide = said(shared);
  const ofFrame = (frame: string): string | null => said(own.get(idKey(frame)) ?? []) ?? wide;
  return {
    ofFrame,
    ofMember: (frame, member) => {
      const named = (own.get(idKey(frame)) ?? []).filter(
        ({ rest, difference }) =>
          difference.sheet.startsWith('Member') && rest.split(', ').some((id) => idKey(id) === idKey(member)),
      );
      return said(named.map((touch) => ({ ...touch, rest: '' }))) ?? ofFrame(frame);
    },
  };
}

/** Whether a frame may have a cause at all: not one that is the same in both, or that one revision has only. */
export const hasCause = ({ carried, before, after }: FramePair): boolean => !carried && before !== null && after !== null;

/** Where no row of the sheets touches a frame, what differs is how it is analysed and checked; null where no setting differs. */
export function settingsCause(settings: readonly SettingDifference[]): string | null {
  if (settings.length === 0) return null;
  return settings
    .slice(0, mostNamed)
    .map(({ setting, before, after }) => `${setting} ${before} to ${after}`)
    .join('; ');
}

interface Touch {
  /** What names the row beside its frame: "BC". */
  readonly rest: string;
  readonly difference: InputDifference;
}

/** The frame that a row's title begins with, and what is left of the title; ids may hold commas themselves. */
function ownerOf(where: string, known: ReadonlySet<string>): readonly [frame: string | null, rest: string] {
  for (let at = where.indexOf(', '); ; at = where.indexOf(', ', at + 1)) {
    const head = idKey(at < 0 ? where : where.slice(0, at));
    if (known.has(head)) return [head, at < 0 ? '' : where.slice(at + 2)];
    if (at < 0) return [null, where];
  }
}

/** "BC section IPE 360 to IPE 400; snow 0.65 to 0.9; and 3 more". The same words once. */
function said(touches: readonly Touch[]): string | null {
  const words = [...new Set(touches.map(wordsOf))];
  if (words.length === 0) return null;
  const more = words.length - mostNamed;
  return [...words.slice(0, mostNamed), ...(more > 0 ? [`and ${more.toLocaleString('en-GB')} more`] : [])].join('; ');
}

function wordsOf({ rest, difference: { sheet, what, before, after } }: Touch): string {
  const subject = rest === '' ? '' : `${rest} `;
  if (what === null) return `${subject}${before === null ? 'added to' : 'taken from'} ${sheet}`;
  return `${subject}${what} ${before ?? '(blank)'} to ${after ?? '(blank)'}`;
}
