import { describe, expect, it } from 'vitest';
import { deedWords, isIndependent, whyNotCheck, type Work } from './independence';

const work: readonly Work[] = [
  { id: 1, name: 'Ana', did: ['uploaded', 'ran', 'made', 'sent'] },
  { id: 2, name: 'Lea', did: ['ran'] },
  { id: 3, name: 'Cai', did: [] },
];

describe('who may check a revision', () => {
  it('is a checker or a lead who had no hand in it', () => {
    expect(whyNotCheck({ id: 3, role: 'checker' }, work)).toBeNull();
    expect(whyNotCheck({ id: 9, role: 'lead' }, work)).toBeNull();
    expect(isIndependent(9, work)).toBe(true);
    expect(isIndependent(3, work)).toBe(true);
  });

  it('is not a lead who ran a frame, nor a checker who once uploaded one', () => {
    expect(whyNotCheck({ id: 2, role: 'lead' }, work)).toBe(
      'You ran frames of it, so someone else has to check it. This binds the lead as well.',
    );
    expect(whyNotCheck({ id: 1, role: 'checker' }, work)).toMatch(
      /uploaded and ran frames of it, made this revision and sent it/,
    );
    expect(isIndependent(2, work)).toBe(false);
  });

  it('is no analyst and no client, whatever they did', () => {
    expect(whyNotCheck({ id: 9, role: 'analyst' }, work)).toMatch(/checker or the lead/);
    expect(whyNotCheck({ id: 9, role: 'client' }, work)).toMatch(/checker or the lead/);
  });

  it('says what someone did in words', () => {
    expect(deedWords(['uploaded'])).toBe('uploaded frames of it');
    expect(deedWords(['uploaded', 'changed', 'ran'])).toBe('uploaded, changed and ran frames of it');
    expect(deedWords(['sent'])).toBe('sent it to check');
    expect(deedWords([])).toBe('');
  });
});
