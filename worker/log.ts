/** Log lines of the server's work: JSON on standard output, never with a password, a token or what a sheet holds. */
import { pino } from 'pino';

const logger = pino({ name: 'tallyframe', base: null });

export function log(message: string, { error, ...facts }: Readonly<Record<string, unknown>>): void {
  if (error === undefined) logger.info(facts, message);
  else logger.error({ ...facts, err: error }, message);
}
