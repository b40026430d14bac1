import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { OfficeRole } from '@/db/schema';
import { insertActivity } from './activity';
import { endLinks, findLink, insertLink, useLink } from './links';
import { putInOutbox } from './outbox';
import { insertPersonWithin } from './people';
import { assignProjects } from './standing';

export interface Invitation {
  readonly id: number;
  readonly email: string;
  readonly role: OfficeRole;
  readonly invitedBy: string;
  readonly createdAt: string;
  /** When its latest link ends. */
  readonly expiresAt: string;
  readonly projects: readonly number[];
}

interface Invited {
  readonly email: string;
  readonly role: OfficeRole;
  readonly projects: readonly number[];
}

/** Whoever invites, with the secret from which links are made. */
interface Inviting {
  readonly person: { readonly id: number; readonly name: string; readonly officeName: string };
  readonly serverSecret: string;
}

/**
 * Invites someone: the invitation, its link and the letter, all or none.
 *
 * @returns 'of the office' where the address is someone's there already, disabled or not; 'invited' where it has an open invitation
 */
export async function insertInvitation(
  db: Db,
  office: number,
  { email, role, projects }: Invited,
  by: Inviting,
): Promise<number | 'of the office' | 'invited'> {
  return db.transaction().execute(async (within) => {
    const known = await within
      .selectFrom('membership')
      .innerJoin('person', 'person.id', 'membership.person')
      .select('person.id')
      .where('membership.office', '=', office)
      .where('person.email', '=', email)
      .executeTakeFirst();
    if (known) return 'of the office';
    const row = await within
      .insertInto('invitation')
      .values({ office, email, role, invited_by: by.person.id, created_at: instant(), ended_at: null, ended_as: null })
      .onConflict((conflict) => conflict.doNothing())
      .returning('id')
      .executeTakeFirst();
    if (!row) return 'invited';
    if (projects.length > 0) {
      await within
        .insertInto('invitation_project')
        .columns(['invitation', 'project'])
        .expression((eb) =>
          eb
            .selectFrom('project')
            .select((one) => [one.val(row.id).as('invitation'), 'project.id'])
            .where('office', '=', office)
            .where('id', 'in', [...projects]),
        )
        .execute();
    }
    await sendInvitation(within, office, { id: row.id, email, role }, by);
    await insertActivity(within, office, { what: 'invited a person', person: by.person.id, detail: { email, role } });
    return row.id;
  });
}

/** Sends an open invitation again, with a new link; the earlier one ends. @returns false where there is none of that id */
export async function resendInvitation(db: Db, office: number, invitation: number, by: Inviting): Promise<boolean> {
  return db.transaction().execute(async (within) => {
    const found = (await listInvitations(within, office)).find((one) => one.id === invitation);
    if (!found) return false;
    await sendInvitation(within, office, found, by);
    const detail = { email: found.email };
    await insertActivity(within, office, { what: 'sent an invitation again', person: by.person.id, detail });
    return true;
  });
}

async function sendInvitation(
  within: Db,
  office: number,
  { id, email, role }: { readonly id: number; readonly email: string; readonly role: OfficeRole },
  { person, serverSecret }: Inviting,
): Promise<void> {
  const link = await insertLink(within, office, { invitation: id }, serverSecret);
  const { name: by, officeName } = person;
  await putInOutbox(within, office, email, { kind: 'invitation', by, officeName, role, link });
}

/** @returns false where the office has no open invitation of that id */
export async function revokeInvitation(db: Db, office: number, invitation: number, person: number): Promise<boolean> {
  return db.transaction().execute(async (within) => {
    const row = await within
      .updateTable('invitation')
      .set({ ended_at: instant(), ended_as: 'revoked' })
      .where('office', '=', office)
      .where('id', '=', invitation)
      .where('ended_at', 'is', null)
      .returning('email')
      .executeTakeFirst();
    if (!row) return false;
    await endLinks(within, { invitation });
    await insertActivity(within, office, { what: 'revoked an invitation', person, detail: { email: row.email } });
    return true;
  });
}

/** An office's open invitations, the newest first. */
export async function listInvitations(db: Db, office: number): Promise<Invitation[]> {
  const rows = await db
    .selectFrom('invitation')
    .innerJoin('person', 'person.id', 'invitation.invited_by')
    .innerJoin('single_use_link as link', 'link.invitation', 'invitation.id')
    .select((eb) => [
      'invitation.id',
      'invitation.email',
      'invitation.role',
      'person.name as invitedBy',
      'invitation.created_at as createdAt',
      eb.fn.max('link.expires_at').as('expiresAt'),
    ])
    .where('invitation.office', '=', office)
    .where('invitation.ended_at', 'is', null)
    .groupBy('invitation.id')
    .orderBy('invitation.id', 'desc')
    .execute();
  const projects = await db
    .selectFrom('invitation_project')
    .innerJoin('invitation', 'invitation.id', 'invitation_project.invitation')
    .select(['invitation_project.invitation', 'invitation_project.project'])
    .where('invitation.office', '=', office)
    .execute();
  return rows.map((row) => ({
    ...row,
    projects: projects.filter((one) => one.invitation === row.id).map((one) => one.project),
  }));
}

/** What the holder of an invitation's secret is invited to. */
export async function findInvitation(
  db: Db,
  secret: string,
): Promise<{ readonly email: string; readonly role: OfficeRole; readonly officeName: string; readonly by: string } | undefined> {
  const link = await findLink(db, 'invitation', secret);
  if (!link) return undefined;
  return db
    .selectFrom('invitation')
    .innerJoin('office', 'office.id', 'invitation.office')
    .innerJoin('person', 'person.id', 'invitation.invited_by')
    .select(['invitation.email', 'invitation.role', 'office.name as officeName', 'person.name as by'])
    .where('invitation.id', '=', link.invitation)
    .where('invitation.ended_at', 'is', null)
    .executeTakeFirst();
}

class Taken extends Error {}

/**
 * Makes whoever holds an invitation's secret a person of the office, once.
 *
 * @returns their address; 'ended' for a link that does not work (any more); 'taken' where the address signs in elsewhere already
 */
export async function acceptInvitation(
  db: Db,
  secret: string,
  { name, passwordHash }: { readonly name: string; readonly passwordHash: string },
): Promise<{ readonly email: string } | 'ended' | 'taken'> {
  try {
    return await db.transaction().execute(async (within) => {
      const link = await findLink(within, 'invitation', secret);
      if (!link || link.invitation === null || !(await useLink(within, link.id))) return 'ended';
      const row = await within
        .updateTable('invitation')
        .set({ ended_at: instant(), ended_as: 'accepted' })
        .where('id', '=', link.invitation)
        .where('ended_at', 'is', null)
        .returning(['email', 'role', 'office'])
        .executeTakeFirst();
      if (!row) return 'ended';
      const { email, role, office } = row;
      const person = await insertPersonWithin(within, office, { email, name, role, passwordHash });
      // The link stays as it was: nothing of this transaction stands.
      if (person === undefined) throw new Taken();
      const projects = await within
        .selectFrom('invitation_project')
        .select('project')
        .where('invitation', '=', link.invitation)
        .execute();
      await assignProjects(within, office, person, projects.map((one) => one.project)); // prettier-ignore
      await insertActivity(within, office, { what: 'accepted an invitation', person, detail: { role } });
      return { email };
    });
  } catch (thrown) {
    if (thrown instanceof Taken) return 'taken';
    throw thrown;
  }
}
