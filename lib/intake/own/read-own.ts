/** What an office offers to a batch beside the sheets: its own sections and materials, and those that the rows hold already. */
import type { RawSheet } from '@/lib/intake/files/raw-sheet';
import { Offered } from '@/lib/intake/own/offered';
import { ownDefinition, ownSheets } from '@/lib/intake/own/own-sheets';
import type { OwnKind, OwnThing } from '@/lib/intake/own/own-thing';
import { idKey } from '@/lib/intake/ids';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { Reader } from '@/lib/intake/reader';
import { Materials, type MaterialRow } from '@/lib/intake/sheets/materials';
import { Sections } from '@/lib/intake/sheets/sections';
import type { Table } from '@/lib/intake/table';
import type { Section } from '@/lib/model/frame';
import type { System } from '@/lib/units/quantity';

interface OwnRead {
  readonly sections: Offered<Section>;
  readonly materials: Offered<MaterialRow>;
  /** Of the sheets that the rows hold. */
  readonly tables: readonly Table[];
}

/**
 * A version that the batch's rows hold wins over the office's latest: an edit never changes what was read.
 *
 * @param held sheets of the office's own among the batch's, by what they hold
 */
export function readOwn(
  held: Readonly<Record<OwnKind, readonly RawSheet[]>>,
  things: readonly OwnThing[],
  system: System,
  reader: Reader,
  problems: ProblemList,
): OwnRead {
  // they were sound when they were saved: whatever is to be said of them was said then
  const aside = new ProblemList();
  const asideReader = new Reader(aside);
  const tables: Table[] = [];
  const offers = <T>(
    kind: OwnKind,
    read: (table: Table, reader: Reader, problems: ProblemList) => readonly Found<T>[],
  ): Offered<T> => {
    const own = things.filter((thing) => thing.kind === kind);
    const byKey = new Map(own.filter(({ retired }) => !retired).map((thing) => [idKey(thing.name), thing]));
    const definition = ownDefinition(kind);
    const latest = ownSheets([...byKey.values()], 0).flatMap((sheet) =>
      read(readTable(sheet, definition, system, aside), asideReader, aside).flatMap((one) => {
        const thing = byKey.get(idKey(one.name));
        return thing && one.value && one.row ? [[one.name, { ...one, thing, row: one.row }] as const] : [];
      }),
    );
    const kept = held[kind].flatMap((sheet) => {
      const table = readTable(sheet, definition, system, problems);
      tables.push(table);
      return read(table, reader, problems).flatMap((one) =>
        one.row ? [[one.name, { ...one, thing: null, row: one.row }] as const] : [],
      );
    });
    return new Offered([...latest, ...kept], own);
  };
  return {
    sections: offers('section', (table, by, to) =>
      new Sections(table, by, to).rows().map(([name, { section, row, entries }]) => ({ name, value: section, row, entries })),
    ),
    materials: offers('material', (table, by, to) =>
      new Materials(table, by, to).rows().map(([name, { source, row, entries }]) => ({ name, value: source, row, entries })),
    ),
    tables,
  };
}

interface Found<T> extends Pick<Parameters<Offered<T>['named']>[1], 'value' | 'entries'> {
  readonly name: string;
  readonly row: Table['rows'][number] | null;
}
