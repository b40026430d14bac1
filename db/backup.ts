import { mkdirSync } from 'node:fs';
import path from 'node:path';
import type { RawDatabase } from '@/db/open';

/**
 * Copies the database to a file with SQLite's own online backup, a few pages at a time: others go on reading and writing,
 * and the copy is of one moment.
 */
export async function backUp(raw: RawDatabase, file: string): Promise<void> {
  mkdirSync(path.dirname(file), { recursive: true });
  await raw.backup(file, { progress: () => 500 });
}
