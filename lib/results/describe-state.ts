import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

/** "1.35 dead + 1.5 snow" */
export function describeState(frame: Frame, state: ResultState): string {
  const terms = frame.cases.flatMap((one, index) => {
    const factor = state.factors[index] ?? 0;
    return factor === 0 ? [] : [{ factor, name: one.name }];
  });
  return terms
    .map(({ factor, name }, index) => {
      const size = Number(Math.abs(factor).toPrecision(6));
      const sign = factor < 0 ? '−' : index === 0 ? '' : '+';
      return `${sign}${index === 0 ? '' : ' '}${size === 1 ? '' : `${size} `}${name}`;
    })
    .join(' ');
}
