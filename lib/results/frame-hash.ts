/** Content address of a frame: what decides its results, and nothing else. */
import { createHash } from 'node:crypto';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { engineVersion } from '@/lib/analysis/engine-version';

/**
 * SHA-256 (hex) over the frame's model, loads, resolved properties, combinations and limits, the settings that matter
 * to its results, and the engine's version. Name, title, group, number off and note stay outside, so that frames which
 * differ only in these share their results.
 */
export function frameHash(frame: Frame, settings: Settings): string {
  const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = frame;
  // Title and default material say nothing more about a resolved frame.
  const { title: _heading, material: _material, ...matter } = settings;
  return createHash('sha256')
    .update(canonicalJson({ engine: engineVersion, settings: matter, model }))
    .digest('hex');
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
  for (const key of Object.keys(fields).sort()) {
    const field = fields[key];
    if (field !== undefined) text += `${text === '' ? '{' : ','}${JSON.stringify(key)}:${canonicalJson(field)}`;
  }
  return text === '' ? '{}' : `${text}}`;
}
