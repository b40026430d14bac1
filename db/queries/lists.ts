/** Signatures for those who code against them; bodies follow in this folder. */
import type { Db } from '@/db/open';
import type { Row, RowPage, View } from '@/lib/tables/view';

export interface PageAsked {
  readonly limit: number;
  /** A cursor that a page gave as `next`. */
  readonly after?: string;
  /** A cursor that a page gave as `previous`. */
  readonly before?: string;
}

export interface Facet {
  readonly value: string;
  readonly count: number;
}

/** @returns undefined where the revision is not the office's */
export declare function listRows(
  db: Db,
  office: number,
  revision: number,
  view: View,
  asked: PageAsked,
): Promise<RowPage | undefined>;

/** Every row of a view in its order, for an export; holds a page at a time. */
export declare function iterateRows(db: Db, office: number, revision: number, view: View): AsyncGenerator<Row>;

/** Distinct values of a column that is filtered by values, with rows each. Empty for one that is not. */
export declare function listFacets(
  db: Db,
  office: number,
  revision: number,
  table: View['table'],
  column: string,
): Promise<Facet[]>;
