/** What of a revision's frames its clients see: stored rows, never computed again. */
import type { Db } from '@/db/open';

/** The sections of a frame's members by role, and its family's parameters. */
export interface FrameMakings {
  readonly sections: readonly { readonly role: string; readonly section: string }[];
  readonly parameters: readonly { readonly name: string; readonly value: number; readonly quantity: string }[];
}

/** @param frames places in sheet order, from 0: those of a page */
export async function listMakings(
  db: Db,
  office: number,
  revision: number,
  frames: readonly number[],
): Promise<ReadonlyMap<number, FrameMakings>> {
  if (frames.length === 0) return new Map();
  const own = await db
    .selectFrom('revision')
    .select('id')
    .where('id', '=', revision)
    .where('office', '=', office)
    .executeTakeFirst();
  if (!own) return new Map();
  const sections = await db
    .selectFrom('member_row')
    .select((eb) => ['frame', 'role', 'section', eb.fn.min('member').as('first')])
    .where('revision', '=', revision)
    .where('frame', 'in', [...frames])
    .groupBy(['frame', 'role', 'section'])
    .orderBy('frame')
    .orderBy('first')
    .execute();
  const parameters = await db
    .selectFrom('revision_frame')
    .innerJoin('frame_parameter', 'frame_parameter.version', 'revision_frame.version')
    .select((eb) => [
      'revision_frame.frame',
      'frame_parameter.name',
      'frame_parameter.quantity',
      eb.ref('frame_parameter.number').$notNull().as('value'),
    ])
    .where('revision_frame.revision', '=', revision)
    .where('revision_frame.frame', 'in', [...frames])
    .where('frame_parameter.number', 'is not', null)
    .execute();
  return new Map(
    frames.map((frame) => [
      frame,
      {
        sections: sections.filter((row) => row.frame === frame).map(({ role, section }) => ({ role, section })),
        parameters: parameters
          .filter((row) => row.frame === frame)
          .map(({ name, value, quantity }) => ({ name, value, quantity })),
      },
    ]),
  );
}
