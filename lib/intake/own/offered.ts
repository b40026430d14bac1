import { idKey } from '@/lib/intake/ids';
import type { OwnThing } from '@/lib/intake/own/own-thing';
import type { Entry } from '@/lib/intake/problem-list';
import type { Row } from '@/lib/intake/table';

interface Offer<T> {
  /** Null where the batch's own rows hold it already. */
  readonly thing: OwnThing | null;
  readonly row: Row;
  /** Null where its row is wrong (told). */
  readonly value: T | null;
  readonly entries: readonly Entry[];
}

/** The office's own things of one kind, by name; which of them a batch takes is kept. */
export class Offered<T> {
  private readonly byKey = new Map<string, Offer<T>>();
  private readonly retired: ReadonlySet<string>;
  private readonly via = new WeakMap<object, Row>();
  readonly taken = new Set<OwnThing>();

  /** @param offers a later one of a name takes the place of an earlier one */
  constructor(offers: readonly (readonly [name: string, offer: Offer<T>])[], things: readonly OwnThing[]) {
    for (const [name, offer] of offers) this.byKey.set(idKey(name), offer);
    this.retired = new Set(things.filter((thing) => thing.retired).map(({ name }) => idKey(name)));
  }

  /** The thing of a name, which the batch's rows then hold; null where none is offered. */
  take(name: string): Offer<T> | null {
    const offer = this.byKey.get(idKey(name)) ?? null;
    if (offer?.thing) this.taken.add(offer.thing);
    return offer;
  }

  /** Remembers that a row of the batch's only names one of the office's. */
  named(value: object, { row }: Offer<T>): void {
    this.via.set(value, row);
  }

  /** The office's row that a thing was taken by another name from. */
  viaRow(value: object): Row | null {
    return this.via.get(value) ?? null;
  }

  isRetired(name: string): boolean {
    return this.retired.has(idKey(name));
  }

  names(): string[] {
    return [...this.byKey.values()].flatMap(({ thing }) => (thing ? [thing.name] : []));
  }
}
