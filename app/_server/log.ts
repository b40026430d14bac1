import 'server-only';
import pino from 'pino';

/**
 * Structured lines on standard output. They carry ids, never a password, a token, a cookie or what stands in a sheet;
 * the redaction is a second fence behind not logging such things at all.
 */
export const log = pino({
  level: process.env.LOG_LEVEL ?? 'info',
  base: null,
  redact: { paths: ['*.password', '*.token', '*.cookie', 'password', 'token', 'cookie'], censor: '(left out)' },
});
