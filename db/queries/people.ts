import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { OfficeRole } from '@/db/schema';

/** Someone who can sign in, whatever the office: for the sign-in only. */
export interface Account {
  readonly id: number;
  readonly name: string;
  readonly email: string;
  readonly passwordHash: string;
  /** The offices they belong to, the first joined first. */
  readonly offices: readonly { readonly id: number; readonly name: string; readonly role: OfficeRole }[];
}

export interface PersonOfOffice {
  readonly id: number;
  readonly name: string;
  readonly email: string;
  readonly role: OfficeRole;
  readonly since: string;
}

/** Case of the address does not matter. */
export async function findAccount(db: Db, email: string): Promise<Account | undefined> {
  const person = await db.selectFrom('person').selectAll().where('email', '=', email.trim()).executeTakeFirst();
  if (!person) return undefined;
  const offices = await db
    .selectFrom('membership')
    .innerJoin('office', 'office.id', 'membership.office')
    .select(['office.id', 'office.name', 'membership.role'])
    .where('membership.person', '=', person.id)
    .where('membership.ended_at', 'is', null)
    .orderBy('membership.created_at')
    .orderBy('office.id')
    .execute();
  return { id: person.id, name: person.name, email: person.email, passwordHash: person.password_hash, offices };
}

export async function listPeople(db: Db, office: number): Promise<PersonOfOffice[]> {
  return peopleOf(db, office).orderBy('person.name').orderBy('person.id').execute();
}

export async function findPerson(db: Db, office: number, person: number): Promise<PersonOfOffice | undefined> {
  return peopleOf(db, office).where('person.id', '=', person).executeTakeFirst();
}

/**
 * Adds a person to an office.
 *
 * @returns undefined where the address is already someone's, in whatever office
 */
export async function insertPerson(
  db: Db,
  office: number,
  person: { readonly email: string; readonly name: string; readonly passwordHash: string; readonly role: OfficeRole },
): Promise<number | undefined> {
  return db.transaction().execute((within) => insertPersonWithin(within, office, person));
}

/** The same, in a transaction that is open already. */
export async function insertPersonWithin(
  within: Db,
  office: number,
  person: { readonly email: string; readonly name: string; readonly passwordHash: string; readonly role: OfficeRole },
): Promise<number | undefined> {
  const created_at = instant();
  const row = await within
    .insertInto('person')
    .values({ email: person.email.trim(), name: person.name, password_hash: person.passwordHash, created_at })
    .onConflict((conflict) => conflict.column('email').doNothing())
    .returning('id')
    .executeTakeFirst();
  if (!row) return undefined;
  await within
    .insertInto('membership')
    .values({ office, person: row.id, role: person.role, created_at, ended_at: null })
    .execute();
  return row.id;
}

/** Failed sign-in attempts for an account, or from an address, since an instant. */
export async function countFailedAttempts(
  db: Db,
  by: { readonly email: string } | { readonly address: string },
  since: string,
): Promise<number> {
  const query = db
    .selectFrom('sign_in_attempt')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .where('succeeded', '=', 0)
    .where('at', '>=', since);
  const one = 'email' in by ? query.where('email', '=', by.email.trim()) : query.where('address', '=', by.address);
  return (await one.executeTakeFirstOrThrow()).n;
}

export async function insertSignInAttempt(
  db: Db,
  attempt: { readonly email: string; readonly address: string; readonly succeeded: boolean },
): Promise<void> {
  const { email, address, succeeded } = attempt;
  await db
    .insertInto('sign_in_attempt')
    .values({ email: email.trim(), address, at: instant(), succeeded: succeeded ? 1 : 0 })
    .execute();
}

function peopleOf(db: Db, office: number) {
  return db
    .selectFrom('membership')
    .innerJoin('person', 'person.id', 'membership.person')
    .select(['person.id', 'person.name', 'person.email', 'membership.role', 'membership.created_at as since'])
    .where('membership.office', '=', office)
    .where('membership.ended_at', 'is', null);
}
