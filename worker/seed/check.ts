/** Sends a revision of the invented office to check, as an office would; and checks it, or leaves the checker half-way. */
import { insertAcceptances, findMarkedFrame, listToAccept, updateSeen } from '@/db/queries/checking-marks';
import { listToSee } from '@/db/queries/checking-list';
import { passRevision, sendToCheck } from '@/db/queries/checking-acts';
import { insertQuery } from '@/db/queries/checking-queries';
import { findRevisionById } from '@/db/queries/revisions';
import type { Db } from '@/db/open';

interface Named {
  readonly id: number;
  readonly name: string;
}

const accepted: Readonly<Record<'over' | 'not checked', string>> = {
  over: 'Looked at with the fabricator: the member is stiffened on site as drawn, and holds by hand.',
  'not checked': 'Held by the cladding rails; checked by hand beside this.',
};

/**
 * @param how far the checker got: "begun" = some frames seen and a query raised, "passed" = all of it
 * @throws {Error} where a step is refused, so that a seed that no longer fits is noticed
 */
export async function checkSeeded(
  db: Db,
  {
    office,
    revision,
    by,
    checker,
    how,
  }: { office: number; revision: number; by: Named; checker: Named; how: 'begun' | 'passed' },
): Promise<void> {
  const now = async () => (await findRevisionById(db, office, revision))!;
  const done = (refused: string | number | null): void => {
    if (typeof refused === 'string') throw new Error(`The seed could not be checked: ${refused}`);
  };
  done(await sendToCheck(db, await now(), by, 'Loads as agreed on site. Please look at the long spans first.'));
  const list = await listToSee(db, office, revision);
  const seen = how === 'passed' ? list : list.slice(0, 6);
  for (const { index } of seen) {
    const found = await findMarkedFrame(db, office, revision, index);
    if (!found || found.engine === null) throw new Error(`Expected frame ${index} of revision ${revision} to be solved`);
    const frame = { ...found, engine: found.engine };
    done(await updateSeen(db, await now(), frame, checker, true));
    if (how === 'begun') {
      if (index === list[2]?.index) {
        const asked = { subject: null, check: null, text: 'Is there a haunch at the eaves that the sheet leaves out?' };
        done(await insertQuery(db, await now(), frame, checker, asked));
      }
      continue;
    }
    const toAccept = await listToAccept(db, revision, index);
    for (const verdict of ['over', 'not checked'] as const) {
      const items = toAccept.filter((one) => one.verdict === verdict).map(({ item }) => item);
      const reason = accepted[verdict];
      if (items.length > 0) done(await insertAcceptances(db, await now(), frame, checker, { items, reason, alike: false }));
    }
  }
  if (how === 'passed') done(await passRevision(db, await now(), checker, 'Agrees with my own figures.'));
}
