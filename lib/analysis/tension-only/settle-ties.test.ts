import { describe, expect, it } from 'vitest';
import { settleTies, type TieTrial } from './settle-ties';

const forces = (...values: number[]): TieTrial<string> => ({
  ok: true,
  solution: 'found',
  forces: Float64Array.from(values),
  nothing: 1e-6,
});

describe('which ties are slack', () => {
  it('are none where all are pulled', () => {
    expect(settleTies([2, 5], () => forces(3, 4))).toEqual({ ok: true, solution: 'found', slack: [], passes: 1 });
  });

  it('are those pressed, and those without force', () => {
    const found = settleTies([2, 5, 7], (slack) => (slack.length ? forces(3, -4, -0.1) : forces(3, -4, 1e-7)));
    expect(found).toMatchObject({ ok: true, slack: [5, 7], passes: 2 });
  });

  it('take up again what would be stretched once another has let go', () => {
    const found = settleTies([0, 1], (slack) => {
      if (slack.length === 0) return forces(-10, -2);
      return slack.includes(1) ? forces(-8, 5) : forces(-8, 5);
    });
    expect(found).toMatchObject({ ok: true, slack: [0] });
  });

  it('change one by one where the frame can’t stand with all that are pressed let go at once', () => {
    const tried: string[] = [];
    const found = settleTies([0, 1], (slack) => {
      tried.push(slack.join());
      if (slack.length === 2) return { ok: false, why: 'it can move', caught: true };
      return slack.length === 0 ? forces(-10, -2) : forces(-8, 5);
    });
    expect(found).toMatchObject({ ok: true, slack: [0], passes: 4 });
    expect(tried).toEqual(['', '0,1', '', '0']);
  });

  it('find no set that settles: one met before, with the members that kept changing', () => {
    const found = settleTies([0, 3], (slack) => (slack.includes(3) ? forces(1, 1) : forces(1, -1)));
    expect(found).toMatchObject({ ok: false, members: [3], why: 'repeated' });
  });

  it('stop after 50 passes', () => {
    const ties = Array.from({ length: 60 }, (_, i) => i);
    // each pass lets one more go
    const found = settleTies(ties, (slack) => forces(...ties.map((i) => (i < slack.length ? -1 : i === slack.length ? -1 : 1))));
    expect(found).toMatchObject({ ok: false, passes: 50, why: 'passes' });
  });

  it('say why a set could not be analysed', () => {
    const found = settleTies([4], (slack) => (slack.length ? { ok: false, why: 'node B can slide', caught: false } : forces(-1)));
    expect(found).toEqual({ ok: false, members: [4], passes: 4, why: { trial: 'node B can slide' } });
  });

  it('keep one without force where the frame would move freely, and some tie would catch it either way', () => {
    const without = (caught: boolean) =>
      settleTies([0, 1], (slack) => {
        if (slack.length === 2) return { ok: false, why: 'it can move', caught };
        return slack.length === 0 ? forces(-10, -10) : forces(-10, 0);
      });
    expect(without(true)).toMatchObject({ ok: true, slack: [0] });
    expect(without(false)).toMatchObject({ ok: false, members: [0, 1], why: { trial: 'it can move' } });
  });

  it('are taken up where the frame gives way without them: the one that is pulled the most as it does', () => {
    const found = settleTies(
      [0, 1, 2],
      (slack) => {
        return slack.length === 3 ? { ok: false, why: 'unstable', caught: false, pulls: [-2, 0.5, 1] } : forces(-3, -1, 4);
      },
      [0, 1, 2],
    );
    expect(found).toMatchObject({ ok: true, slack: [0, 1] });
    const lost = settleTies([0], () => ({ ok: false, why: 'unstable', caught: false, pulls: [-1] }), [0]);
    expect(lost).toMatchObject({ ok: false, why: { trial: 'unstable' } });
  });

  it('change one by one as often as there are many of them', () => {
    const ties = Array.from({ length: 120 }, (_, i) => i);
    // all at once it can move; then each that is let go presses the next
    const found = settleTies(ties, (slack) =>
      slack.length > 100
        ? { ok: false, why: 'it can move', caught: false }
        : forces(
            ...ties.map((i) =>
              i < 100 ? (i <= slack.length ? -1 - 1 / (1 + i) : slack.length < 1 ? -1 : 1) : slack.length < 1 ? -1 : 1,
            ),
          ),
    );
    expect(found).toMatchObject({ ok: true });
    expect(found.passes).toBeGreaterThan(50);
  });

  it('hand over from one that is pressed to the slack one that catches the frame as it shortens', () => {
    const free = { ok: false, why: 'it can move', caught: true, stretches: [1, -1] } as const;
    const of: Record<string, ReturnType<typeof forces>> = { '': forces(-5, -1), '0': forces(-1, -3), '1': forces(2, -1) };
    expect(settleTies([0, 1], (slack) => of[slack.join()] ?? free)).toMatchObject({ ok: true, slack: [1] });
  });

  it('never keep one that is pressed', () => {
    const found = settleTies([0], (slack) => (slack.length ? { ok: false, why: 'it can move', caught: true } : forces(-1)));
    expect(found).toMatchObject({ ok: false, members: [0] });
  });
});
