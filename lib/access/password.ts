/** Passwords: argon2id, OWASP's second set of costs (19 MiB, two passes). Server-side only. */
import { hash, verify } from '@node-rs/argon2';

const costs = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

export function hashPassword(password: string): Promise<string> {
  return hash(password, costs);
}

/** False also for what is not a hash at all. */
export async function verifyPassword(hashed: string, password: string): Promise<boolean> {
  try {
    return await verify(hashed, password);
  } catch {
    return false;
  }
}

let unused: Promise<string> | undefined;

/** Takes as long as looking at a real account's password, so that the time says nothing about who has one. */
export async function verifyNobody(password: string): Promise<false> {
  unused ??= hashPassword('nobody has this password');
  await verifyPassword(await unused, password);
  return false;
}
