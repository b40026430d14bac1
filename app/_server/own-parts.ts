import 'server-only';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { findOwnPart, insertOwnVersions, listOwnParts, type OwnPart } from '@/db/queries/own-parts';
import type { Person } from '@/lib/access/may';
import { ApiError, notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';
import { ownPath } from '@/lib/api/own-inputs';
import { idKey } from '@/lib/intake/ids';
import type { OwnKind, OwnRecord } from '@/lib/intake/own/own-thing';
import { ownDefinition } from '@/lib/intake/own/own-sheets';
import { type OwnRecordRead, readOwnRecord } from '@/lib/intake/own/read-own-records';

export const ownWords: Readonly<Record<OwnKind, string>> = { section: 'section', material: 'grade' };

/** @throws {ApiError} not-found for an address of no such kind */
export function requireOwnKind(path: string): OwnKind {
  const kind = ownPath.safeParse(path);
  if (!kind.success) throw notFound('page');
  return kind.data;
}

/** @throws {ApiError} not-found, for another office's as for none */
export async function requireOwnPart(person: Person, kind: OwnKind, part: string): Promise<OwnPart> {
  const id = idInput.safeParse(part);
  const found = id.success ? await findOwnPart(db(), person.office, kind, id.data) : undefined;
  if (!found) throw notFound(ownWords[kind]);
  return found;
}

/**
 * Keeps what a form says as the next version.
 *
 * @param edits the one that is edited, by name; null = a new one
 * @throws {ApiError} bad-request naming the fields by column; conflict where a new one bears the name of one there is
 */
export async function keepOwn(
  person: Person,
  kind: OwnKind,
  record: OwnRecord,
  { note, edits }: { readonly note: string; readonly edits: string | null },
): Promise<{ id: number; version: number }> {
  if (edits === null) {
    const same = (await listOwnParts(db(), person.office, kind)).find(({ name }) => idKey(name) === idKey(record.name));
    if (same && same.retiredAt === null) {
      const message = `There is a ${ownWords[kind]} ${same.name} already. Edit it, or give this one another name.`;
      throw new ApiError('conflict', message, { fields: { name: [message] } });
    }
  }
  const unknown = Object.keys(record.cells).find((column) => !ownDefinition(kind).columns.has(column));
  if (unknown !== undefined) throw new ApiError('bad-request', `${unknown} is no figure of a ${ownWords[kind]}.`);
  const { records, problems } = readOwnRecord(kind, record, note);
  const errors = problems.filter(({ severity }) => severity === 'error');
  const [read] = records;
  if (errors.length > 0 || !read) {
    const fields: Record<string, string[]> = {};
    for (const { column, message } of errors) (fields[fieldOf(kind, column)] ??= []).push(sentence(message));
    throw new ApiError('bad-request', sentence(errors[0]?.message ?? 'Give its figures'), { fields });
  }
  const [kept] = await keepAll(person, [read], edits);
  if (!kept) throw new Error('Expected one version');
  return kept;
}

/** Keeps them all, with an entry of activity for each that is new. */
export async function keepAll(person: Person, records: readonly OwnRecordRead[], edits: string | null = null) {
  const kept = await insertOwnVersions(
    db(),
    person.office,
    person.id,
    records.flatMap(({ kind, record, note, section, material }) => {
      const resolved = section ?? material;
      return resolved ? [{ kind, record: { ...record, name: edits ?? record.name }, note, resolved }] : [];
    }),
  );
  const fresh = kept.filter(({ isNew }) => isNew);
  const kind = ownWords[records[0]?.kind ?? 'section'];
  const [only] = fresh;
  if (only && fresh.length === 1) {
    const detail = { [kind]: only.name, version: only.version };
    await insertActivity(db(), person.office, { what: `changed the office’s own ${kind}s`, person: person.id, detail });
  } else if (fresh.length > 1) {
    const detail = { versions: fresh.length };
    await insertActivity(db(), person.office, { what: `imported ${kind}s of the office’s own`, person: person.id, detail });
  }
  return kept;
}

/** A column as a form calls it: `tf [mm]` is tf, the name is name. */
function fieldOf(kind: OwnKind, heading: string | null): string {
  const name = (heading ?? '').replace(/\s*\[[^\]]*\]$/, '');
  return name === kind || name === '' ? 'name' : name;
}

const sentence = (text: string): string => `${text.slice(0, 1).toUpperCase()}${text.slice(1)}${/[.?]$/.test(text) ? '' : '.'}`;
