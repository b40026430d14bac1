import { readRuleSet } from '@/lib/combinations/read-rule-set';
import { nearest } from '@/lib/intake/distance';
import { idText } from '@/lib/intake/ids';
import type { Place, ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Reader } from '@/lib/intake/reader';
import { absentPlace, placeOf, type Row, type Table } from '@/lib/intake/table';
import { meansOff, ratioText, readYesNo, wordKey } from '@/lib/intake/words';
import { cellAddress } from '@/lib/intake/files/cell-address';
import {
  defaultSettings,
  type SettingName,
  type SettingOrigin,
  type SettingOrigins,
  type Settings,
  settingWords,
} from '@/lib/model/settings';
import * as say from '@/lib/problems/wording';

export interface Setup {
  readonly settings: Settings;
  readonly origins: SettingOrigins;
  readonly places: ReadonlyMap<SettingName, Place>;
}

const names = Object.keys(settingWords) as SettingName[];
const byKey = new Map(names.map((name) => [wordKey(settingWords[name]), name]));

type Values = { -readonly [K in SettingName]?: Settings[K] };

/** Reads the Setup sheet. What it is silent about is the office's, else the default; it wins over the office. */
export function readSetup(table: Table | undefined, office: Partial<Settings>, reader: Reader, problems: ProblemList): Setup {
  const given = new Map<SettingName, Row>();
  const values: Values = {};
  for (const row of table?.rows ?? []) {
    const typed = reader.text(row, 'setting', forNobody);
    if (typed === undefined) continue;
    if (typed === null) {
      problems.add(placeOf(row, 'setting'), { code: 'missing-id', message: say.missingId('setting'), stopsAll: true }, null);
      continue;
    }
    const name = byKey.get(wordKey(typed));
    if (!name) {
      const near = nearest(wordKey(typed), names.map((each) => [wordKey(settingWords[each]), settingWords[each]] as const)); // prettier-ignore
      problems.add(placeOf(row, 'setting'), { code: 'near-miss-column', message: say.unknownSetting(typed, near) }, null);
      continue;
    }
    const before = given.get(name);
    if (before) {
      const same = valueText(row) === valueText(before);
      const fault = same
        ? ({ code: 'repeated-row', message: say.repeatedRow(before.raw.row) } as const)
        : ({ code: 'conflicting-row', message: say.settingTwice(settingWords[name], before.raw.row), stopsAll: true } as const);
      problems.add(placeOf(row, 'value'), fault, null);
      continue;
    }
    if (readValue(name, row, values, reader, problems)) given.set(name, row);
  }
  const places = new Map([...given].map(([name, row]) => [name, placeOf(row, 'value')] as const));
  const origins = Object.fromEntries(names.map((name) => [name, originOf(name, given.get(name), office)])) as SettingOrigins;
  const settings: Settings = { ...defaultSettings, ...definedOnly(office), ...values };
  tellFirstOrder(settings, origins, places, problems);
  tellLevel(settings, places, problems);
  return { settings, origins, places };
}

/** Imperfections or a stiffness reduction where nobody said that the analysis is of the first order: allowed, and said. */
function tellFirstOrder(
  settings: Settings,
  origins: SettingOrigins,
  places: ReadonlyMap<SettingName, Place>,
  problems: ProblemList,
): void {
  if (settings.analysis !== 'first order' || origins.analysis.source === 'sheet') return;
  for (const name of ['imperfections', 'stiffnessReduction'] as const) {
    const place = places.get(name);
    if (!place || settings[name] === 'none') continue;
    problems.add(place, { code: 'default-used', message: say.firstOrderTaken(settingWords[name]) }, null);
  }
}

/** A design code with combinations of another level of safety: factored loads it needs and has not, or has and counts twice. */
function tellLevel(settings: Settings, places: ReadonlyMap<SettingName, Place>, problems: ProblemList): void {
  const { strengthCheck, combinationSet } = settings;
  if (combinationSet === null || strengthCheck === 'elastic stress') return;
  const level = readRuleSet(combinationSet).set?.level ?? 'factored';
  const needs = strengthCheck === 'AISC 360-22 ASD' ? 'allowable' : 'factored';
  if (level === needs) return;
  const place = places.get('combinationSet') ?? places.get('strengthCheck') ?? absentPlace('Setup');
  const message = say.setOfAnotherLevel(combinationSet, strengthCheck, needs);
  if (needs === 'factored') problems.add(place, { code: 'conflicting-row', message, stopsAll: true }, null);
  else problems.add(place, { code: 'stress-factor', message }, null);
}

const valueText = (row: Row): string =>
  idText(row.raw.cells[row.part.byName.get('value')?.index ?? -1]?.text ?? '').toLowerCase();

function definedOnly(office: Partial<Settings>): Partial<Settings> {
  return Object.fromEntries(Object.entries(office).filter(([, value]) => value !== undefined && value !== null));
}

function originOf(name: SettingName, row: Row | undefined, office: Partial<Settings>): SettingOrigin {
  if (row) {
    const column = row.part.byName.get('value')?.index ?? 0;
    const { changedBy } = row.raw;
    const cell = `${row.part.raw.name} ${cellAddress(row.raw.row, column)}`;
    return { source: 'sheet', cell, ...(changedBy === undefined ? {} : { changedBy }) };
  }
  return { source: office[name] === undefined || office[name] === null ? 'default' : 'office', cell: null };
}

/** Reads one value; false where it is blank (silent) or wrong (told). */
function readValue(name: SettingName, row: Row, values: Values, reader: Reader, problems: ProblemList): boolean {
  const tell = (code: 'unknown-word' | 'not-positive' | 'out-of-range', message: string): false => {
    problems.add(placeOf(row, 'value'), { code, message, stopsAll: true }, null);
    return false;
  };
  const recorded = problems.record(() => reader.text(row, 'value', forNobody));
  if (recorded.value === undefined) {
    // an error value here leaves a setting unknown: nothing may run on a guess
    problems.stopEverything(recorded.entries);
    return false;
  }
  const text = recorded.value;
  if (text === null) return false;
  const word = <T extends string>(words: readonly T[]): T | null => {
    const found = words.find((each) => wordKey(each) === wordKey(text)) ?? null;
    if (!found) tell('unknown-word', say.unknownWord(settingWords[name], text, words));
    return found;
  };
  const orNone = <T extends string>(words: readonly T[]): T | 'none' | null => (meansOff(text) ? 'none' : word(words));
  const number = (): number | null => {
    const { value, entries } = problems.record(() => reader.number(row, 'value', forNobody));
    if (value !== undefined && value !== null) return value;
    problems.stopEverything(entries);
    return null;
  };
  const set = <K extends SettingName>(key: K, value: Settings[K] | null): boolean => {
    if (value === null) return false;
    values[key] = value;
    return true;
  };
  switch (name) {
    case 'title':
    case 'material':
    case 'nationalAnnex':
      return set(name, text);
    case 'gammaM0':
    case 'gammaM1': {
      const value = number();
      if (value === null) return false;
      return value > 0 ? set(name, value) : tell('not-positive', say.notPositive(settingWords[name], text));
    }
    case 'interaction':
      return set(name, word(['Annex B', 'Annex A']));
    case 'loadHeight':
      return set(name, word(['shear centre', 'top flange', 'bottom flange']));
    case 'units':
      return set(name, word(['metric', 'us']));
    case 'analysis':
      return set(name, word(['first order', 'second order']));
    case 'strengthCheck':
      return set(name, word(['elastic stress', 'AISC 360-22 LRFD', 'AISC 360-22 ASD', 'EN 1993-1-1']));
    case 'stability':
      return set(name, word(['screened', 'by others']));
    case 'imperfections':
      return set(name, orNone(['none', 'EN 1993-1-1', 'AISC 360']));
    case 'stiffnessReduction':
      return set(name, orNone(['none', 'AISC 360']));
    case 'shearDeformation': {
      const answer = meansOff(text) ? false : readYesNo(text);
      if (answer === null) return tell('unknown-word', say.unknownWord(settingWords[name], text, ['no', 'yes']));
      return set(name, answer);
    }
    case 'combinationSet':
      if (!meansOff(text) && wordKey(text) !== 'aslisted') {
        const read = readRuleSet(text);
        return read.set ? set(name, read.set.name) : tell('unknown-word', read.wrong);
      }
      values.combinationSet = null;
      return true;
    case 'stressFactor':
    case 'nearLimit': {
      const value = number();
      if (value === null) return false;
      if (value <= 0) return tell('not-positive', say.notPositive(settingWords[name], text));
      if (value > 1) return tell('out-of-range', say.atMostOne(settingWords[name], text));
      return set(name, value);
    }
    case 'deflectionRatio':
    case 'swayRatio': {
      if (meansOff(text) && text !== '0') return set(name, 'none');
      const n = ratioText(text);
      const value = n === text ? number() : Number(n.replace(',', '.'));
      if (value === null) return false;
      return value > 0 ? set(name, value) : tell('not-positive', say.notPositive(settingWords[name], text));
    }
  }
}
