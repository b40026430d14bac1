import 'server-only';
import path from 'node:path';
import { databaseFile } from '@/db/client';
import { keptFolder, listKeptLetters, type KeptLetter } from '@/worker/mail/kept-letters';
import { isMailHosted } from '@/worker/mail/service-of';

/** An office’s letters that are kept on this machine; null where the hosted service delivers them. */
export function keptLetters(office: number): KeptLetter[] | null {
  return isMailHosted(process.env) ? null : listKeptLetters(keptFolder(path.dirname(databaseFile())), office);
}
