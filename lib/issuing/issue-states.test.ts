import { describe, expect, it } from 'vitest';
import { afterAct, issueMoves, issueStates, wasHandedOver, type IssueAct, type IssueState } from './issue-states';

const acts = Object.keys(issueMoves) as IssueAct[];

describe('states of an issue', () => {
  it('moves by this table and no other way', () => {
    const moves = issueStates.flatMap((from) =>
      acts.flatMap((act) => {
        const to = afterAct(from, act);
        return to === null ? [] : [`${from}: ${act} → ${to}`];
      }),
    );
    expect(moves).toEqual([
      'making: give up making → failed',
      'making: hand over → issued',
      'issued: supersede → superseded',
      'issued: withdraw → withdrawn',
      'superseded: withdraw → withdrawn',
    ]);
  });

  it('never takes a withdrawal back, nor brings a superseded issue into force again', () => {
    expect(acts.map((act) => afterAct('withdrawn', act))).toEqual([null, null, null, null]);
    expect(acts.filter((act) => afterAct('superseded', act) === 'issued')).toEqual([]);
  });

  it('hands over only what was checked, and moves the revision with its issue', () => {
    expect(issueMoves['hand over'].revision).toEqual({ from: ['checked'], to: 'issued' });
    for (const act of ['supersede', 'withdraw'] as const) expect(issueMoves[act].revision?.to).toBe(issueMoves[act].to);
  });

  it('knows what clients have had in their hands', () => {
    const had = issueStates.filter((state: IssueState) => wasHandedOver(state));
    expect(had).toEqual(['issued', 'superseded', 'withdrawn']);
  });
});
