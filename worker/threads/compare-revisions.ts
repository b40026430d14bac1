/** In a thread: two revisions of a batch compared, and a page of what moved. */
import { fits } from '@/lib/results/compare';
import { hasCause } from '@/lib/results/compare-causes';
import { reactionMoved } from '@/lib/results/compare-reactions';
import { compareTotals } from '@/lib/results/compare-totals';
import type { CompareAsked, ComparedCell, ComparedPage, ComparedRows } from '@/lib/results/compared-page';
import { type Compared, comparedOf } from './compared';
import { openOnce } from './open-once';

/** Changes of inputs that are named whichever list is asked for. */
const someChanges = 6;

export interface CompareTask extends CompareAsked {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly before: number;
  readonly after: number;
}

/** @returns null where one of the revisions is not the office's, or they are not of one batch */
export async function compareRevisions({ file, office, before, after, ...asked }: CompareTask): Promise<ComparedPage | null> {
  const compared = comparedOf(openOnce(file), office, before, after);
  if (!compared) return null;
  const { list, rows } = await rowsOf(compared, asked);
  const [groups, cells] = [await compared.inputGroups(), await compared.inputs()];
  const shown = { list, rows: rows.slice(asked.offset, asked.offset + asked.limit) } as ComparedRows;
  return {
    totals: compareTotals(compared.frames, asked.by),
    inputs: { changes: groups.length, cells: cells.length, first: groups.slice(0, someChanges) },
    strip: asked.strip ? stripOf(compared) : null,
    page: shown,
    causes: await causesFor(compared, shown),
    matching: rows.length,
  };
}

/** By row of a list of frames or members; null for other lists. */
async function causesFor(compared: Compared, page: ComparedRows): Promise<(string | null)[] | null> {
  if (page.list !== 'frames' && page.list !== 'members') return null;
  const { ofFrame, ofMember } = await compared.causes();
  if (page.list === 'members') return page.rows.map(({ frame, id }) => ofMember(frame, id));
  return page.rows.map((pair) => (hasCause(pair) ? ofFrame(pair.id) : null));
}

async function rowsOf(compared: Compared, { list, show, by }: CompareAsked): Promise<ComparedRows> {
  switch (list) {
    case 'frames':
      return { list, rows: compared.framesByMovement().filter((pair) => fits(pair, show, by)) };
    case 'members':
      return { list, rows: compared.members().filter((pair) => fits(pair, show, by)) };
    case 'reactions':
      return { list, rows: compared.reactions().filter((pair) => show === 'all' || reactionMoved(pair, by)) };
    case 'inputs':
      return { list, rows: await compared.inputGroups() };
    case 'cells':
      return { list, rows: await compared.inputs() };
  }
}

function stripOf({ frames }: Compared): ComparedCell[] {
  const standing = (one: { verdict: ComparedStanding['verdict']; ratio: number | null } | null): ComparedStanding | null =>
    one && { verdict: one.verdict, ratio: one.ratio };
  return frames.map(({ id, before, after, carried }) => ({ id, carried, before: standing(before), after: standing(after) }));
}
type ComparedStanding = NonNullable<ComparedCell['before']>;
