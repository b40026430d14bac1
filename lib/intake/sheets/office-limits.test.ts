import { describe, expect, it } from 'vitest';
import { readSheets, sound, type TestCell } from '@/lib/intake/sheets-of';
import { namesCombination, type OfficeLimit } from '@/lib/model/office-limit';

const office: OfficeLimit[] = [
  { appliesTo: '*', measure: 'deflection', ratio: 180, source: 'IBC Table 1604.3' },
  { appliesTo: 'beam', measure: 'deflection', ratio: 360, source: '' },
  { appliesTo: 'column', measure: 'sway', ratio: 150, source: '' },
];

/** Limits of F2 (columns AB, CD, beam BC): "name measure n source". */
function limits(setup: TestCell[][], rows: TestCell[][] = []): string[] {
  const sheets = sound();
  sheets.Setup = [['setting', 'value'], ['material', 'S275'], ...setup];
  if (rows.length > 0) sheets['Limits'] = [['applies to', 'measure', 'ratio'], ...rows];
  const { frames } = readSheets(sheets, { officeLimits: office });
  return (frames[1]?.frame?.limits ?? []).map(({ name, measure, ratio, source }) => `${name} ${measure} ${ratio} ${source}`);
}

describe('the office’s limits', () => {
  it('hold where the sheets are silent, and say that they are the office’s', () => {
    expect(limits([])).toEqual([
      '* deflection 180 office (IBC Table 1604.3)',
      'beam deflection 360 office',
      'column sway 150 office',
    ]);
  });

  it('give way to whatever the sheets say for everything: a ratio in Setup, none, a row for *', () => {
    expect(limits([['deflection ratio', 250]])).toEqual(['* deflection 250 Setup B3', 'column sway 150 office']);
    expect(limits([['deflection ratio', 'none'], ['sway ratio', 'none']])).toEqual([]); // prettier-ignore
    expect(limits([], [['*', 'sway', 200]])).toContain('* sway 200 Limits row 2');
    expect(limits([], [['*', 'sway', 200]])).not.toContain('column sway 150 office');
  });

  it('give way to a row for the same role only', () => {
    expect(limits([], [['beam', 'deflection', 200]])).toEqual([
      'beam deflection 200 Limits row 2',
      '* deflection 180 office (IBC Table 1604.3)',
      'column sway 150 office',
    ]);
  });

  /** Limits of F2 with the office's and these combinations: "name measure figure combination to". */
  function more(own: OfficeLimit[], rows: TestCell[][] = []): string[] {
    const sheets = sound();
    sheets.Setup = [
      ['setting', 'value'],
      ['material', 'S275'],
    ];
    sheets.Combinations = [['combination', 'purpose', 'dead'], ['C1 (rare)', 'service', 1], ['C2 (frequent)', 'service', 0.5], ['U', 'strength', 1.35]]; // prettier-ignore
    if (rows.length > 0) sheets['Limits'] = [['applies to', 'measure', 'ratio', 'absolute', 'combination'], ...rows];
    const { frames, problems } = readSheets(sheets, { officeLimits: own });
    expect(problems.filter(({ severity }) => severity === 'error')).toEqual([]);
    return (frames[1]?.frame?.limits ?? []).map((limit) =>
      [limit.name, limit.measure, limit.ratio ?? limit.absolute_m, limit.combination, limit.direction ?? limit.toNode].join(' '),
    );
  }

  it('hold in the service combinations that they name, and in no strength combination', () => {
    const of = (combination: string, ratio: number): OfficeLimit => ({ appliesTo: 'beam', measure: 'deflection', ratio, combination, source: '' }); // prettier-ignore
    expect(more([of('* (frequent)', 300), of('c1 (RARE)', 200), of('U', 100), of('no such', 50)])).toEqual([
      'beam deflection 300 C2 (frequent) ',
      'beam deflection 200 C1 (rare) ',
    ]);
    expect(more([of('*', 300)], [['beam', 'deflection', 250, null, 'C1 (rare)']])).toEqual([
      'beam deflection 250 C1 (rare) ',
      'beam deflection 300 C2 (frequent) ',
    ]);
  });

  it('are of displacement and of spread too, by place, where the frame has that place', () => {
    const none = { ratio: null, source: '' };
    expect(
      more([
        { ...none, appliesTo: 'Eaves', measure: 'displacement', direction: 'x', absolute_m: 0.05 },
        { ...none, appliesTo: 'eaves', measure: 'spread', toPlace: 'EAVES', ratio: 500 },
        { ...none, appliesTo: 'apex', measure: 'displacement', absolute_m: 0.05 },
        { ...none, appliesTo: 'eaves', measure: 'spread', toPlace: 'apex', ratio: 500 },
        { ...none, appliesTo: 'beam', measure: 'displacement', absolute_m: 0.1 },
      ]),
    ).toEqual(['eaves displacement 0.05  x', 'eaves spread 500  eaves', 'beam displacement 0.1  ']);
    const all = { ...none, appliesTo: '*', measure: 'displacement', absolute_m: 0.05 } as const;
    expect(more([all], [['*', 'displacement', null, 30, null]])).toEqual(['* displacement 0.03  ']);
  });

  it.each([
    ['C1', 'c1', true], ['C1', 'C12', false], ['*', 'anything', true], ['C*', 'c1 (rare)', true], ['*(rare)', 'C1 (rare)', true],
    ['C* + *wind*', 'C1 + 0.9 wind (rare)', true], ['C* + *snow*', 'C1 + 0.9 wind (rare)', false], ['aa*a', 'aa', false], ['a*b*b', 'ab', false],
  ])('%s names %s: %s', (pattern, name, named) => {
    expect(namesCombination(pattern, name)).toBe(named);
  }); // prettier-ignore
});
