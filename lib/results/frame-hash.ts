/** Content address of a frame: what decides its results, and nothing else. */
import { createHash } from 'node:crypto';
import type { Frame } from '@/lib/model/frame';
import { settingMatters, type SettingName, type Settings } from '@/lib/model/settings';
import { engineVersion } from '@/lib/analysis/engine-version';

/**
 * SHA-256 (hex) over the frame's model, loads, resolved properties, combinations and limits, the settings that matter
 * to its results, and the engine's version. Name, title, group, number off and note stay outside, so that frames which
 * differ only in these share their results.
 */
export function frameHash(frame: Frame, settings: Settings): string {
  const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = frame;
  return createHash('sha256')
    .update(`{"engine":${JSON.stringify(engineVersion)},"model":${modelJson(model)},"settings":${kept(settings, matterJson)}}`)
    .digest('hex');
}

/** Title and default material say nothing more about a resolved frame, nor do a design code's settings without that code. */
function matterJson(settings: Settings): string {
  const { title: _title, material: _material, nationalAnnex: _annex, ...rest } = settings;
  const matter = Object.entries(rest).filter(([name]) => settingMatters(name as SettingName, settings));
  return canonicalJson(Object.fromEntries(matter));
}

/** Canonical JSON of a model; what frames of a batch share (sections, cases, combinations …) is written once for all. */
function modelJson(model: Omit<Frame, 'id' | 'title' | 'group' | 'count' | 'note'>): string {
  let text = '';
  for (const key of Object.keys(model).sort() as (keyof typeof model)[]) {
    const field = model[key];
    if (field === undefined) continue;
    text += `${text === '' ? '{' : ','}${JSON.stringify(key)}:${shared.has(key) ? listJson(field as readonly object[]) : canonicalJson(field)}`;
  }
  return `${text}}`;
}

const shared: ReadonlySet<string> = new Set<keyof Frame>(['sections', 'materials', 'cases', 'combinations', 'limits']);
const listJson = (list: readonly object[]): string => `[${list.map((one) => kept(one, canonicalJson)).join(',')}]`;

const texts = new WeakMap<object, string>();
function kept<T extends object>(value: T, make: (value: T) => string): string {
  let text = texts.get(value);
  if (text === undefined) texts.set(value, (text = make(value)));
  return text;
}

/** JSON with keys in order of their names: the same text for the same content, however it was put together. */
export function canonicalJson(value: unknown): string {
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : 'null';
  if (value === null || typeof value !== 'object') return JSON.stringify(value) ?? 'null';
  if (Array.isArray(value)) {
    let text = '[';
    for (let i = 0; i < value.length; i++) text += (i ? ',' : '') + canonicalJson(value[i]);
    return `${text}]`;
  }
  const fields = value as Readonly<Record<string, unknown>>;
  let text = '';
  for (const key of inOrder(fields)) {
    const field = fields[key];
    if (field !== undefined) text += `${text === '' ? '{' : ','}${quoted(key)}:${canonicalJson(field)}`;
  }
  return text === '' ? '{}' : `${text}}`;
}

// the few sorts of records that frames are made of are put in order once
const orders = new Map<string, readonly string[]>();
const quotes = new Map<string, string>();
const most = 2000;

function inOrder(fields: Readonly<Record<string, unknown>>): readonly string[] {
  const keys = Object.keys(fields);
  const name = keys.join('\n');
  const order = orders.get(name);
  // a key may hold the line's end itself: as many keys, all of them this record's, are this record's
  if (order?.length === keys.length && order.every((key) => Object.hasOwn(fields, key))) return order;
  if (orders.size >= most) orders.clear();
  const made = keys.sort();
  orders.set(name, made);
  return made;
}

function quoted(key: string): string {
  let text = quotes.get(key);
  if (text === undefined) {
    if (quotes.size >= most) quotes.clear();
    quotes.set(key, (text = JSON.stringify(key)));
  }
  return text;
}
