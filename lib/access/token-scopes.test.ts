import { describe, expect, it } from 'vitest';
import { acts } from './may';
import { scopeAllows } from './token-scopes';

describe('a personal token', () => {
  it('for reading changes nothing', () => {
    for (const act of acts) if (scopeAllows('read', act)) expect(act).toMatch(/^(read|take) /);
    expect(scopeAllows('read', 'run')).toBe(false);
  });

  it('for uploading and running does that, and reads', () => {
    for (const act of ['bring sheets in', 'run', 'read a batch', 'take results away'] as const) {
      expect(scopeAllows('upload and run', act), act).toBe(true);
    }
  });

  it('never reaches people, letters, limits or its own kind', () => {
    for (const act of ['add people', 'change people', 'read people', 'read letters', 'change limits', 'be oneself'] as const) {
      expect(scopeAllows('upload and run', act), act).toBe(false);
      expect(scopeAllows('read', act), act).toBe(false);
    }
  });
});
