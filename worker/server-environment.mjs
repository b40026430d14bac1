/** What the server needs from its environment, with what can be settled without asking. */
import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));

/**
 * The environment with PORT (3000), DATA_DIR (`data` in the project, made if missing), NEXTAUTH_URL (from PORT) and
 * NEXTAUTH_SECRET: the given one, else one generated once and kept in DATA_DIR, readable by its owner only.
 */
export function serverEnvironment() {
  const PORT = process.env.PORT ?? '3000';
  if (!/^\d{1,5}$/.test(PORT) || Number(PORT) > 65535) {
    console.error(`PORT must be a port number, like 3000; found “${PORT}”.`);
    process.exit(1);
  }
  const DATA_DIR = resolve(root, process.env.DATA_DIR ?? 'data');
  mkdirSync(DATA_DIR, { recursive: true });
  return {
    ...process.env,
    PORT,
    DATA_DIR,
    NEXTAUTH_URL: process.env.NEXTAUTH_URL ?? `http://localhost:${PORT}`,
    NEXTAUTH_SECRET: process.env.NEXTAUTH_SECRET ?? keptSecret(join(DATA_DIR, 'secret')),
    NEXT_TELEMETRY_DISABLED: '1',
  };
}

function keptSecret(file) {
  if (existsSync(file)) {
    const kept = readFileSync(file, 'utf8').trim();
    if (kept.length >= 32) return kept;
  }
  const secret = randomBytes(32).toString('hex');
  writeFileSync(file, `${secret}\n`, { mode: 0o600 });
  return secret;
}
