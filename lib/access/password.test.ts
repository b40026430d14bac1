import { describe, expect, it } from 'vitest';
import { hashPassword, verifyNobody, verifyPassword } from './password';

describe('a password', () => {
  it('is kept only as an argon2id hash, salted anew each time', async () => {
    const [one, two] = await Promise.all([hashPassword('eaves and apex'), hashPassword('eaves and apex')]);
    expect(one).toMatch(/^\$argon2id\$/);
    expect(one).not.toBe(two);
    expect(await verifyPassword(one, 'eaves and apex')).toBe(true);
    expect(await verifyPassword(one, 'eaves and apeX')).toBe(false);
  });

  it('is wrong where there is no account or the hash is spoilt', async () => {
    expect(await verifyNobody('nobody has this password')).toBe(false);
    expect(await verifyPassword('spoilt', 'x')).toBe(false);
  });
});
