import { describe, expect, it } from 'vitest';
import { RunMeter } from './progress';

const solved = (from: number, n: number) =>
  Array.from({ length: n }, (_, i) => ({ version: from + i, frame: `F${from + i}`, verdict: 'within' as const, ratio: 0.5 }));

describe('the meter of a run', () => {
  it('knows no rate before the first frames', () => {
    expect(new RunMeter(() => 0).rate).toBeNull();
  });

  it('tells the rate of the last seconds, not that of a slow beginning', () => {
    let time = 0;
    const meter = new RunMeter(() => time);
    time = 60_000;
    meter.add(solved(0, 1), 1);
    for (let i = 0; i < 10; i++) {
      time += 1000;
      meter.add(solved(0, 50), 50);
    }
    expect(meter.rate).toBeCloseTo(50, 6);
  });

  it('keeps the frames solved last, newest first', () => {
    const meter = new RunMeter(() => 0);
    meter.add(solved(1, 10), 10);
    meter.add(solved(11, 5), 5);
    expect(meter.last.map((each) => each.frame).slice(0, 6)).toEqual(['F15', 'F14', 'F13', 'F12', 'F11', 'F10']);
    expect(meter.last).toHaveLength(12);
  });
});
