import 'server-only';
import path from 'node:path';
import { type Db, type OpenDatabase, openDatabase, type RawDatabase } from '@/db/open';

/** Pages and instrumentation are separate bundles, so the one open database stands on globalThis. */
const holder = globalThis as typeof globalThis & { tallyframeDatabase?: OpenDatabase };

/** Where the database of this server is. */
export function databaseFile(): string {
  const folder = process.env.DATA_DIR ?? './data';
  return path.resolve(/* turbopackIgnore: true */ process.cwd(), folder, 'tallyframe.sqlite');
}

const database = (): OpenDatabase => (holder.tallyframeDatabase ??= openDatabase(databaseFile()));

/** The server's database, opened at first use. */
export const db = (): Db => database().db;

/** Its driver, for what `db/` offers on the raw driver. */
export const raw = (): RawDatabase => database().raw;
