import { mkdirSync } from 'node:fs';
import path from 'node:path';
import Sqlite from 'better-sqlite3';
import { Kysely, SqliteDialect } from 'kysely';
import { WritingDialect } from '@/db/writing-dialect';
import type { DB } from '@/db/schema';

export type RawDatabase = Sqlite.Database;
export type Db = Kysely<DB>;

export interface OpenDatabase {
  /** For everything but bulk work. */
  readonly db: Db;
  /** The driver itself, for bulk inserts and exports in a worker thread. */
  readonly raw: RawDatabase;
  readonly close: () => Promise<void>;
}

/** The server is several bundles, each with its own copy of this module: what one opens the others must know. */
const holder = globalThis as typeof globalThis & { tallyframeDrivers?: WeakMap<Db, RawDatabase> };
const drivers = (holder.tallyframeDrivers ??= new WeakMap<Db, RawDatabase>());

/** The driver beneath an open database, for reads whose statements are kept prepared. @throws {RangeError} for a transaction */
export function driverOf(db: Db): RawDatabase {
  const raw = drivers.get(db);
  if (!raw) throw new RangeError('Expected a database given by openDatabase, got something else (a transaction?)');
  return raw;
}

/**
 * Opens a database file, for the server, a worker thread, the command line or a test.
 * One writer at a time, many readers: others wait up to 10 s for the writer's short transactions.
 *
 * @throws {Error} of the driver where the file cannot be opened, or with `readonly` does not exist
 */
export function openDatabase(file: string, { readonly = false }: { readonly?: boolean } = {}): OpenDatabase {
  if (!readonly) mkdirSync(path.dirname(file), { recursive: true });
  const raw = new Sqlite(file, { timeout: 10_000, readonly, fileMustExist: readonly });
  if (!readonly) raw.pragma('journal_mode = WAL');
  raw.pragma('synchronous = NORMAL');
  raw.pragma('foreign_keys = ON');
  // A run writes the same index pages over and over: fewer, larger checkpoints write each of them to the file once.
  raw.pragma('wal_autocheckpoint = 16000');
  raw.pragma('journal_size_limit = 67108864');
  raw.pragma('cache_size = -32000');
  raw.pragma('temp_store = MEMORY');
  const db = new Kysely<DB>({ dialect: readonly ? new SqliteDialect({ database: raw }) : new WritingDialect(raw) });
  drivers.set(db, raw);
  return { db, raw, close: () => db.destroy() };
}
