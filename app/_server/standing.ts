import 'server-only';
import { db } from '@/db/client';
import { findStanding, type PersonStanding } from '@/db/queries/standing';
import type { Person } from '@/lib/access/may';
import { ApiError, notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';

/** Someone of the lead's own office, disabled or not. @throws {ApiError} not-found, for another office's person as for none */
export async function requireStanding(lead: Person, person: string): Promise<PersonStanding> {
  const id = idInput.safeParse(person);
  const found = id.success ? await findStanding(db(), lead.office, id.data) : undefined;
  if (found === undefined) throw notFound('person');
  return found;
}

export const lastLead = (): ApiError =>
  new ApiError('conflict', 'The office would be left without a lead, so nothing was changed. Make someone else a lead first.');
