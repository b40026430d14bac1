import { describe, expect, it } from 'vitest';
import { canBeAnswered, canBeMarked, isFrozen, moveOf, whyNotMove, type CheckingAct } from './checking-states';

const states = [
  'reading', 'read', 'running', 'run', 'to check', 'checked', 'issued', 'returned', 'stopped', 'failed', 'superseded', 'withdrawn',
]; // prettier-ignore
const acts: readonly CheckingAct[] = ['send', 'return', 'pass'];

describe('a revision with its checker', () => {
  it.each<[CheckingAct, string[], string]>([
    ['send', ['run', 'returned', 'stopped'], 'to check'],
    ['return', ['to check', 'checked'], 'returned'],
    ['pass', ['to check'], 'checked'],
  ])('%s leads from %j to %s, and from no other state', (act, from, to) => {
    expect(states.filter((state) => whyNotMove(state, act) === null)).toEqual(states.filter((state) => from.includes(state)));
    expect(moveOf(act).to).toBe(to);
    expect([...moveOf(act).from].sort()).toEqual([...from].sort());
  });

  it('says why not, and names the state or what to do', () => {
    for (const act of acts)
      for (const state of states)
        if (whyNotMove(state, act) !== null) expect(whyNotMove(state, act), `${act} ${state}`).toMatch(/^[A-Z].*\.$/);
    expect(whyNotMove('read', 'send')).toMatch(/Run it first/);
    expect(whyNotMove('running', 'send')).toMatch(/still running/);
    expect(whyNotMove('issued', 'return')).toMatch(/withdraw/);
  });

  it('is frozen once it is with the checker, and marked only there', () => {
    expect(states.filter(isFrozen)).toEqual(['to check', 'checked', 'issued', 'superseded', 'withdrawn']);
    expect(states.filter(canBeMarked)).toEqual(['to check']);
    expect(states.filter(canBeAnswered)).toEqual(['to check', 'returned']);
  });
});
