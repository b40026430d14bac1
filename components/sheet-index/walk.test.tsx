import { describe, expect, it } from 'vitest';
import { createWalk } from './walk';

/** Frames 1 to 5 in a row; `draw` is called when the page that was gone to has come. */
function walker() {
  const walk = createWalk();
  const gone: string[] = [];
  const draw = (n: number) =>
    walk.drawn(
      { here: `f${n}`, next: n < 5 ? `f${n + 1}` : null, previous: n > 1 ? `f${n - 1}` : null, go: (href) => gone.push(href) },
      true,
    );
  return { walk, gone, draw };
}

describe('walking through a list of frames by keys', () => {
  it('goes back to where it began when k follows j before the next frame drew', () => {
    const { walk, gone, draw } = walker();
    draw(2);
    walk.step(1);
    walk.step(-1);
    expect(gone).toEqual(['f3']);
    draw(3);
    expect(gone).toEqual(['f3', 'f2']);
    draw(2);
    walk.step(-1);
    expect(gone).toEqual(['f3', 'f2', 'f1']);
  });

  it('goes two on when j is pressed twice, however late the first frame draws', () => {
    const { walk, gone, draw } = walker();
    draw(1);
    walk.step(1);
    walk.step(1);
    draw(2);
    draw(3);
    expect(gone).toEqual(['f2', 'f3']);
  });

  it('stops at the end of the list', () => {
    const { walk, gone, draw } = walker();
    draw(4);
    for (let i = 0; i < 4; i++) walk.step(1);
    draw(5);
    walk.step(-1);
    expect(gone).toEqual(['f5', 'f4']);
  });

  it('begins anew where a frame was come to in another way', () => {
    const { walk, gone, draw } = walker();
    draw(1);
    walk.step(1);
    walk.step(1);
    draw(4);
    expect(gone).toEqual(['f2']);
    walk.step(1);
    expect(gone).toEqual(['f2', 'f5']);
  });

  it('begins anew on the same frame, come back to after a step that led elsewhere', () => {
    const { walk, gone, draw } = walker();
    draw(1);
    walk.step(1);
    draw(1);
    walk.step(1);
    expect(gone).toEqual(['f2', 'f2']);
  });
});
