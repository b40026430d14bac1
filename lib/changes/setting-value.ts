/** What a value chosen on screen means: it is read by the reader of the Setup sheet itself, so both take and refuse the same. */
import { typedSetting } from '@/lib/changes/setting-text';
import type { RawPart } from '@/lib/intake/files/raw-sheet';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { Reader } from '@/lib/intake/reader';
import { sheetDefinitions } from '@/lib/intake/sheet-definitions';
import { readSetup } from '@/lib/intake/sheets/setup';
import { settingWords, type SettingName, type Settings } from '@/lib/model/settings';

export type SettingReading =
  /** `settings` holds the value; `typed` is how it is written on the sheet. */
  | { readonly settings: Settings; readonly typed: string; readonly refused: null }
  /** A sentence that says what is wrong and what to do. */
  | { readonly settings: null; readonly typed: null; readonly refused: string };

/** Reads a setting's value as if it stood in Setup; refused with the reader's own words. */
export function readSetting(name: SettingName, value: string): SettingReading {
  if (value.trim() === '') return refusal(`Give a value for ${settingWords[name]}.`);
  const definition = sheetDefinitions.get('Setup');
  if (!definition) throw new RangeError('Expected a definition of Setup');
  const problems = new ProblemList();
  const sheet = { name: 'Setup', parts: [setupPart(settingWords[name], value)] };
  const { settings, origins } = readSetup(readTable(sheet, definition, 'metric', problems), {}, new Reader(problems), problems);
  const wrong = problems.list().find(({ severity }) => severity === 'error');
  if (wrong) return refusal(wrong.message);
  if (origins[name].source !== 'sheet') return refusal(`${settingWords[name]} cannot be ${value}.`);
  return { settings, typed: typedOf(name, settings, value), refused: null };
}

const refusal = (refused: string): SettingReading => ({ settings: null, typed: null, refused });

/** A value that stands for silence (`as listed`) is written as it was given. */
function typedOf(name: SettingName, settings: Settings, value: string): string {
  const typed = typedSetting(name, settings);
  return typed === '' ? value.trim() : typed;
}

function setupPart(word: string, value: string): RawPart {
  const cell = (text: string) => ({ kind: 'text' as const, text });
  const rows = [
    { row: 1, cells: [cell('setting'), cell('value')] },
    { row: 2, cells: [cell(word), cell(value)] },
  ];
  return { name: 'Setup', file: 'Setup.csv', order: 0, decimalMark: null, rows };
}

/** True where a value says what the settings say already. */
export function saysTheSame(settings: Settings, name: SettingName, value: string): boolean {
  const read = readSetting(name, value);
  return read.refused === null && read.settings[name] === settings[name];
}
