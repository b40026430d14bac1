import { describe, expect, it } from 'vitest';
import { Turns } from './turns';

const run = (office: number, name: string, chunks: number) => ({ office, name, chunks });
type Run = ReturnType<typeof run>;

async function order(runs: readonly Run[]): Promise<string> {
  const turns = new Turns<Run>();
  for (const each of runs) turns.add(each);
  const served: string[] = [];
  for (;;) {
    const piece = await turns.next((work) => (work.chunks-- > 0 ? work.name : null));
    if (piece === null) return served.join('');
    served.push(piece);
  }
}

describe('chunks of runs', () => {
  it('alternate between offices while several have some', async () => {
    expect(await order([run(1, 'a', 4), run(2, 'b', 2), run(3, 'c', 3)])).toBe('abcabcaca');
  });

  it('come in the order asked for within an office, which gains nothing by asking twice', async () => {
    expect(await order([run(1, 'a', 2), run(1, 'A', 2), run(2, 'b', 4)])).toBe('abab' + 'AbAb');
  });

  it('of an office that comes later are next after the one in hand', async () => {
    const turns = new Turns<Run>();
    const first = run(7, 'a', 9);
    turns.add(first);
    const take = (work: Run): string | null => (work.chunks-- > 0 ? work.name : null);
    expect([await turns.next(take), await turns.next(take)].join('')).toBe('aa');
    turns.add(run(3, 'b', 9));
    expect([await turns.next(take), await turns.next(take), await turns.next(take)].join('')).toBe('bab');
    turns.remove(first);
    expect([await turns.next(take), await turns.next(take)].join('')).toBe('bb');
  });
});
