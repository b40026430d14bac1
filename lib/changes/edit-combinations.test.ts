import { describe, expect, it } from 'vitest';
import { applyChanges, setKey } from '@/lib/changes/apply-changes';
import { type Change, changeSchema, type ListCombinationsChange } from '@/lib/changes/change';
import { ChangeRefused } from '@/lib/changes/change-refused';
import { changeLine, changeWords, officeCombinationsWords } from '@/lib/changes/change-words';
import { type OfficeSet, rulesOf } from '@/lib/combinations/office-set';
import { readRows } from '@/lib/intake/rows/read-rows';
import { readSheets, sound, type TestCell, type TestSheets } from '@/lib/intake/sheets-of';
import type { Frame } from '@/lib/model/frame';
import { defaultSettings } from '@/lib/model/settings';

const identity = { name: 'batch.xlsx', sha256: '0'.repeat(64), files: [] };
const edit = (more: Partial<ListCombinationsChange> = {}): ListCombinationsChange => ({
  kind: 'list combinations', leaveOut: [], factors: [], ...more,
}); // prettier-ignore

const wide: TestCell[][] = [['combination', 'purpose', 'dead', 'wind'], ['U1', 'strength', 1.35, null], ['U2', 'strength', 1, '±1.5'], ['S1', 'service', 1, 1]]; // prettier-ignore
const long: TestCell[][] = [['combination', 'purpose', 'case', 'factor'], ['U1', 'strength', 'dead', 1.35], ['U2', 'strength', 'dead', 1], ['U2', 'strength', 'wind', '±1.5'], ['S1', 'service', 'dead', 1], ['S1', 'service', 'wind', 1]]; // prettier-ignore

function batch(combinations: TestCell[][] | null, setup: TestCell[][] = [], cases: TestCell[][] = []): TestSheets {
  const sheets: TestSheets = sound();
  sheets['Setup']?.push(...setup);
  sheets['Load cases'] = [['case', 'kind', 'self weight'], ['dead', 'dead', 1], ['wind', 'wind', null], ...cases];
  if (combinations) sheets['Combinations'] = combinations;
  else delete sheets['Combinations'];
  return sheets;
}

/** "U1 strength 1.35 dead" of a frame, in order. */
const words = (frame: Frame | null | undefined): string[] =>
  (frame?.combinations ?? []).map(({ name, purpose, terms }) =>
    [name, purpose, ...terms.map((term) => `${term.factor} ${frame?.cases[term.case]?.name ?? ''}`)].join(' '),
  );

function changed(sheets: TestSheets, change: Change, sets: ReadonlyMap<string, OfficeSet> = new Map(), csv = false) {
  const before = readSheets(sheets, { csv });
  const after = applyChanges(before, [change], 'Ana Lyst', sets);
  const read = readRows({ ...after, identity, problems: [] });
  expect(read.problems.filter(({ severity }) => severity === 'error')).toEqual([]);
  return { read, words: words(read.frames[1]?.frame) };
}

describe.each([
  ['a column a case', wide],
  ['a row a term', long],
])('listed combinations with %s', (_, sheet) => {
  it.each([false, true])('take other factors, go, and are joined by new ones (text file: %s)', (csv) => {
    const { words: now } = changed(
      batch(sheet),
      edit({
        factors: [
          { combination: 'u1', case: 'dead', factor: 1.2 },
          { combination: 'U1', case: 'wind', factor: -0.9 },
        ],
        leaveOut: ['S1'],
        add: [{ name: 'Crane day', purpose: 'service', terms: [{ case: 'WIND', factor: 0.3 }] }],
      }),
      new Map(),
      csv,
    );
    expect(now).toEqual([
      'U1 strength 1.2 dead -0.9 wind',
      'U2 (+) strength 1 dead 1.5 wind',
      'U2 (−) strength 1 dead -1.5 wind',
      'Crane day service 0.3 wind',
    ]);
  });

  it('of a ± row are written out where one of its signs is changed or left out', () => {
    const { words: now } = changed(
      batch(sheet),
      edit({ leaveOut: ['U2 (+)'], factors: [{ combination: 'U2 (−)', case: 'wind', factor: -1.4 }] }),
    );
    expect(now).toEqual(['U1 strength 1.35 dead', 'S1 service 1 dead 1 wind', 'U2 (−) strength 1 dead -1.4 wind']);
  });
});

describe('combinations changed on screen', () => {
  it('are refused with a sentence: unknown, taken, of no case, or what a limit leans on', () => {
    const refuse = (change: ListCombinationsChange, sheets = batch(wide)) => {
      try {
        changed(sheets, change);
      } catch (error) {
        if (error instanceof ChangeRefused) return error.message;
        throw error;
      }
      return 'taken';
    };
    const one = { name: 'U9', purpose: 'strength' as const, terms: [{ case: 'dead', factor: 1 }] };
    expect(refuse(edit({ leaveOut: ['U8'] }))).toContain('U8 is no combination of this revision');
    expect(refuse(edit({ add: [{ ...one, name: 'u1' }] }))).toContain('There is a combination u1 already');
    expect(refuse(edit({ add: [{ ...one, name: 'Dead' }] }))).toContain('name of a load case');
    expect(refuse(edit({ add: [{ ...one, terms: [{ case: 'storm', factor: 1 }] }] }))).toContain('storm is no load case');
    expect(refuse(edit({ add: [one] }))).toBe('taken');
    const limited: TestSheets = batch(wide);
    limited['Limits'] = [
      ['applies to', 'measure', 'ratio', 'combination'],
      ['*', 'deflection', 200, 'S1'],
    ];
    expect(refuse(edit({ leaveOut: ['S1'] }), limited)).toContain('Limits');
  });

  it('may be added while a set goes on generating; a generated one is changed only by writing them all', () => {
    const sheets = batch(null, [
      ['combination set', 'ASCE 7-22 LRFD'],
      ['stress factor', 1],
    ]);
    const add = [{ name: 'Mine', purpose: 'strength' as const, terms: [{ case: 'wind', factor: 2 }] }];
    const { read, words: now } = changed(sheets, edit({ generated: 'keep', add }));
    expect(read.settings.combinationSet).toBe('ASCE 7-22 LRFD');
    expect(now[0]).toBe('Mine strength 2 wind');
    expect(now).toContain('1.4 dead strength 1.4 dead');
    expect(() => changed(sheets, edit({ generated: 'keep', leaveOut: ['1.4 dead'] }))).toThrow(ChangeRefused);
    const before = { ...defaultSettings, combinationSet: 'ASCE 7-22 LRFD' };
    expect(changeLine(changeWords(edit({ generated: 'keep', add }), before))).toBe(
      'combinations: generated by ASCE 7-22 LRFD beside the listed → generated as before, Mine added',
    );
    expect(changeLine(changeWords(edit({ add, leaveOut: ['U1'] }), defaultSettings))).toBe(
      'combinations: as listed → as listed, 1 combination left out, Mine added',
    );
  });

  it('never drop a case for which the set had no rule, and its “not checked” with it', () => {
    const sheets = batch(
      null,
      [
        ['combination set', 'ASCE 7-22 LRFD'],
        ['stress factor', 1],
      ],
      [['warm', 'temperature', null]],
    );
    expect(() => changed(sheets, edit())).toThrow('No combination would hold warm (temperature)');
    const add = [{ name: 'Summer', purpose: 'strength' as const, terms: [{ case: 'dead', factor: 1 }, { case: 'warm', factor: 1.2 }] }]; // prettier-ignore
    expect(changed(sheets, edit({ add })).words).toContain('Summer strength 1 dead 1.2 warm');
  });

  it('are named by the schema where they make no sense', () => {
    const add = { name: 'x', purpose: 'strength', terms: [{ case: 'a', factor: 1 }, { case: 'a', factor: 2 }] }; // prettier-ignore
    expect(changeSchema.safeParse(edit({ add: [add as never] })).success).toBe(false);
    expect(changeSchema.safeParse({ kind: 'office combinations', set: 1, version: 1, listed: 'both' }).success).toBe(false);
  });
});

describe('an office’s own set put to a batch', () => {
  const office: OfficeSet = {
    name: 'Sheds', basedOn: 'EN 1990 6.10', level: 'factored', together: false, provenance: 'handbook',
    rules: [
      { from: 'H1', purpose: 'strength', suffix: '', rule: '1.3/0.9 dead + 1.6 wind' },
      { from: 'H2', purpose: 'service', suffix: 'service', rule: '1.0 dead + [1.0 wind]' },
    ],
  }; // prettier-ignore
  const put = (listed: 'keep' | 'replace'): Change => ({ kind: 'office combinations', set: 4, version: 2, listed });
  const sets = new Map([[setKey({ set: 4, version: 2 }), office]]);
  const made = [
    '1.3 dead + 1.6 wind strength 1.3 dead 1.6 wind',
    '0.9 dead + 1.6 wind strength 0.9 dead 1.6 wind',
    '1.0 dead (service) service 1 dead',
    '1.0 dead + 1.0 wind (service) service 1 dead 1 wind',
  ];

  it('writes its combinations in place of what was listed or generated, as rows that any reader takes', () => {
    expect(changed(batch(wide), put('replace'), sets).words).toEqual(made);
    const generated = batch(null, [
      ['combination set', 'EN 1990 6.10'],
      ['stress factor', 1],
    ]);
    const { read, words: now } = changed(generated, put('keep'), sets);
    expect(now).toEqual(made);
    expect(read.settings.combinationSet).toBeNull();
  });

  it('stands back for a listed one of the same factors', () => {
    const { words: now } = changed(batch(wide), put('keep'), sets);
    expect(now.slice(0, 4)).toEqual(words(readSheets(batch(wide)).frames[1]?.frame));
    expect(now.slice(4)).toEqual([made[0], made[1], made[2]]);
  });

  it('is refused where a case would be in no combination, a rule makes nothing, or the design code needs factored loads', () => {
    expect(() => changed(batch(null, [], [['warm', 'temperature', null]]), put('keep'), sets)).toThrow('puts warm (temperature)');
    const asd = new Map([[setKey({ set: 4, version: 2 }), { ...office, level: 'allowable' as const }]]);
    const code = batch(wide, [['strength check', 'EN 1993-1-1']]);
    expect(() => changed(code, put('keep'), asd)).toThrow('EN 1993-1-1 needs factored combinations');
    const seismic = { from: 'H', purpose: 'strength', suffix: '', rule: '1.0 dead + 1.0 seismic' } as const;
    const none = new Map([[setKey({ set: 4, version: 2 }), { ...office, rules: [seismic] }]]);
    expect(() => changed(batch(wide), put('keep'), none)).toThrow('makes no combination of these load cases');
    const bad = new Map([[setKey({ set: 4, version: 2 }), { ...office, rules: [{ ...seismic, rule: 'nothing' }] }]]);
    expect(() => changed(batch(wide), put('keep'), bad)).toThrow('has a rule that cannot be read');
    const many = new Map([[setKey({ set: 4, version: 2 }), { ...office, rules: rulesOf('EN 1990 6.10') }]]);
    const lots = Array.from({ length: 11 }, (_, i): TestCell[] => [`w${i}`, 'wind', null]);
    expect(() => changed(batch(wide, [], lots), put('keep'), many)).toThrow('at most 1,000');
    expect(() => changed(batch(wide), put('keep'))).toThrow(RangeError);
  });

  it('is said in words', () => {
    const change = put('replace');
    if (change.kind !== 'office combinations') throw new Error('kind');
    expect(changeLine(officeCombinationsWords(change, 'Sheds', defaultSettings))).toBe(
      'combinations: as listed → the office’s set Sheds, version 2, written into Combinations in place of what was listed',
    );
  });
});
