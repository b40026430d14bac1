import 'server-only';
import path from 'node:path';
import { databaseFile } from '@/db/client';
import { keptFolder, listKeptLetters, type KeptLetter } from '@/worker/mail/kept-letters';
import { isMailHosted } from '@/worker/mail/service-of';

/**
 * An office’s letters that are kept on this machine, as a lead may read them; null where the hosted service delivers them.
 * A letter with a link for a new password is only for whom it is written to: with it one signs in as them.
 */
export function keptLetters(reader: { readonly office: number; readonly email: string }): KeptLetter[] | null {
  if (isMailHosted(process.env)) return null;
  const letters = listKeptLetters(keptFolder(path.dirname(databaseFile())), reader.office);
  return letters.filter(({ kind, to }) => kind !== 'password reset' || to === reader.email);
}
