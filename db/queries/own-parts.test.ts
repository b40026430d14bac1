import { describe, expect, it } from 'vitest';
import {
  findOwnPart,
  insertOwnVersions,
  insertRevisionParts,
  listOwnParts,
  listOwnThings,
  listOwnUses,
  listOwnVersions,
  listRevisionParts,
  retireOwnPart,
} from '@/db/queries/own-parts';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read } from '@/db/testing/sample';
import { readOwnRecord } from '@/lib/intake/own/read-own-records';

const bar = (name: string, h: string, note = '') => {
  const [one] = readOwnRecord('section', { name, units: 'metric', cells: { shape: 'bar', h, b: '20' } }, note).records;
  return { kind: 'section' as const, record: one!.record, note, resolved: one!.section! };
};

describe('an office’s own sections', () => {
  it('are kept version by version; the same again makes none', async () => {
    const { db } = await newDatabase();
    const own = await office(db, 'Northlight');
    const [first] = await insertOwnVersions(db, own.office, own.person, [bar('Flat 100', '100')]);
    expect(first).toMatchObject({ version: 1, isNew: true });
    expect(await insertOwnVersions(db, own.office, own.person, [bar('flat 100', '100')])).toMatchObject([
      { version: 1, isNew: false },
    ]);
    expect(await insertOwnVersions(db, own.office, own.person, [bar('FLAT 100', '110', 'list')])).toMatchObject([
      { id: first!.id, name: 'Flat 100', version: 2, isNew: true },
    ]);
    const versions = await listOwnVersions(db, own.office, first!.id);
    expect(versions.map(({ version, cells, note }) => [version, cells['h'], note])).toEqual([[2, '110', 'list'], [1, '100', '']]); // prettier-ignore
    expect((await findOwnPart(db, own.office, 'section', first!.id))?.section?.dimensions?.h).toBe(0.11);
    expect(await findOwnPart(db, own.office, 'material', first!.id)).toBeUndefined();
  });

  it('are retired and offered again, and never seen by another office', async () => {
    const { db } = await newDatabase();
    const [own, other] = [await office(db, 'Northlight'), await office(db, 'Southgate')];
    const [{ id } = { id: 0 }] = await insertOwnVersions(db, own.office, own.person, [bar('Flat 100', '100')]);
    expect(await retireOwnPart(db, other.office, 'section', id, other.person)).toBe(false);
    expect(await retireOwnPart(db, own.office, 'section', id, own.person)).toBe(true);
    expect(await retireOwnPart(db, own.office, 'section', id, own.person)).toBe(false);
    expect(await listOwnThings(db, own.office)).toMatchObject([{ name: 'Flat 100', retired: true }]);
    await insertOwnVersions(db, own.office, own.person, [bar('Flat 100', '100')]);
    expect(await listOwnParts(db, own.office, 'section')).toMatchObject([{ version: 1, retiredAt: null }]);
    expect(await listOwnParts(db, other.office, 'section')).toEqual([]);
    expect(await listOwnThings(db, other.office)).toEqual([]);
    expect(await findOwnPart(db, other.office, 'section', id)).toBeUndefined();
    expect(await listOwnVersions(db, other.office, id)).toEqual([]);
  });

  it('know the revisions that are made of them', async () => {
    const database = await newDatabase();
    const { db, raw } = database;
    const [own, other] = [await office(db, 'Northlight'), await office(db, 'Southgate')];
    const [{ id } = { id: 0 }] = await insertOwnVersions(db, own.office, own.person, [bar('Flat 100', '100')]);
    const revision = await read(database, own, intakeOf([portal('F1', 10)]));
    const part = { kind: 'section' as const, origin: 'office' as const, version: 1, note: '', frames: 1, own: 'FLAT 100' };
    const standard = {
      kind: 'section' as const,
      name: 'IPE 300',
      origin: 'library' as const,
      version: null,
      note: null,
      own: null,
      frames: 1,
    };
    insertRevisionParts(raw, own.office, revision.id, [{ ...part, name: 'arm' }, standard]);
    insertRevisionParts(raw, own.office, revision.id, [{ ...part, name: 'arm' }, standard]);
    expect(await listOwnUses(db, own.office, id)).toMatchObject([{ letter: 'A', version: 1, name: 'arm', frames: 1 }]);
    expect(await listRevisionParts(db, own.office, revision.id)).toMatchObject([
      { name: 'arm', own: 'Flat 100' },
      { name: 'IPE 300', own: null },
    ]);
    expect(await listOwnUses(db, other.office, id)).toEqual([]);
    expect(await listRevisionParts(db, other.office, revision.id)).toEqual([]);
  });
});
