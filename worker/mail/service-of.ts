/** Which mail service the environment asks for: the hosted one where it holds a key, else the local one. */
import { hostedService } from '@/lib/mail/hosted-service';
import type { MailService } from '@/lib/mail/mail-service';
import { keptFolder } from './kept-letters';
import { startLocalService } from './local-service';

type Environment = Readonly<Record<string, string | undefined>>;

/** False: letters are kept on this machine and reach nobody. */
export const isMailHosted = (env: Environment): boolean => (env['MAIL_KEY'] ?? '') !== '';

/** @throws {Error} where there is a key but no sender */
export async function serviceOf(env: Environment, dataDir: string): Promise<MailService> {
  const from = env['MAIL_FROM'] ?? '';
  if (!isMailHosted(env)) {
    const { url, key } = await startLocalService({ folder: keptFolder(dataDir) });
    return hostedService({ key, url, from: from === '' ? 'Tallyframe <letters@tallyframe.example>' : from });
  }
  if (from === '') throw new Error('MAIL_FROM must be set beside MAIL_KEY, like “Tallyframe <letters@office.example>”');
  const url = env['MAIL_URL'] ?? '';
  return hostedService({ key: env['MAIL_KEY']!, from, ...(url !== '' && { url }) });
}
