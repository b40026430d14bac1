/** A few sections and a steel grade that the invented office keeps as its own. */
import type { Db } from '@/db/open';
import { insertOwnVersions } from '@/db/queries/own-parts';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import { readOwnRecord } from '@/lib/intake/own/read-own-records';

type Seeded = readonly [kind: OwnKind, name: string, cells: Readonly<Record<string, string>>, note: string];

const plate = { shape: 'I', h: '620', b: '240', tw: '8' };

const seeded: readonly Seeded[] = [
  ['section', 'PG 620', { ...plate, tf: '12' }, 'welded girder, workshop drawing 21. Invented for this demonstration'],
  ['section', 'PG 620', { ...plate, tf: '14' }, 'welded girder, workshop drawing 21 revision 1. Invented for this demonstration'],
  ['section', 'Box 180x120', { shape: 'rhs', h: '180', b: '120', t: '6', r: '12' }, 'folded and welded in the workshop'],
  [
    'material',
    'Mill 420',
    { E: '210000', G: '81000', fu: '520', density: '7850', expansion: '0.000012', 'fy by thickness': '420 MPa to 16 mm; 400 MPa to 40 mm' },
    'a mill’s certificate. Invented for this demonstration',
  ],
]; // prettier-ignore

/** @throws {Error} where one cannot be read, so that a seed that no longer fits is noticed */
export async function insertOwnSeeded(db: Db, office: number, person: number): Promise<void> {
  for (const [kind, name, cells, note] of seeded) {
    const { records, problems } = readOwnRecord(kind, { name, units: 'metric', cells }, note);
    const [read] = records;
    const resolved = read?.section ?? read?.material;
    if (!read || !resolved) throw new Error(`${name} cannot be kept: ${problems[0]?.message ?? 'it says nothing'}`);
    await insertOwnVersions(db, office, person, [{ kind, record: read.record, note, resolved }]);
  }
}
