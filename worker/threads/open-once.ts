import { openDatabase, type OpenDatabase } from '@/db/open';

const opened = new Map<string, OpenDatabase>();

/** A thread's own connection to a database file, kept for its next task. */
export function openOnce(file: string): OpenDatabase {
  const known = opened.get(file);
  if (known) return known;
  const database = openDatabase(file);
  opened.set(file, database);
  return database;
}
