import { createHash } from 'node:crypto';
import { engineVersion } from '@/lib/analysis/engine-version';
import { describe, expect, it } from 'vitest';
import { defaultSettings } from '@/lib/model/settings';
import { canonicalJson, frameHash } from '@/lib/results/frame-hash';
import { cantileverFrame } from '@/lib/results/cantilever-frame';

describe('the content address of a frame', () => {
  const frame = cantileverFrame('F1');
  const address = frameHash(frame, defaultSettings);

  it('leaves name, title, group, number off and note outside', () => {
    const other = cantileverFrame('F2', { title: 'Sign', group: 'north', count: 12, note: 'as built' });
    expect(frameHash(other, { ...defaultSettings, title: 'Gantry', material: 'S355' })).toBe(address);
  });

  it('does not depend on the order in which the model was put together', () => {
    const turned = Object.fromEntries(Object.entries(frame).reverse()) as unknown as typeof frame;
    expect(frameHash(turned, defaultSettings)).toBe(address);
  });

  it('is the SHA-256 of the canonical JSON of engine, model and settings', () => {
    const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = frame;
    const { title: _heading, material: _material, ...elastic } = defaultSettings;
    const { gammaM0: _0, gammaM1: _1, nationalAnnex: _annex, interaction: _factors, loadHeight: _height, ...settings } = elastic;
    const text = canonicalJson({ model, settings, engine: engineVersion });
    expect(address).toBe(createHash('sha256').update(text).digest('hex'));
    expect(frameHash({ ...frame }, { ...defaultSettings })).toBe(address);
  });

  it.each([
    ['a load', cantileverFrame('F1', { nodeLoads: [{ case: 1, node: 1, Fx_N: 0, Fy_N: -2001, Mz_Nm: 0 }] })],
    ['a support', cantileverFrame('F1', { supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 1e9, angle_rad: 0 }] })],
    ['a tension-only member', { ...frame, members: frame.members.map((one) => ({ ...one, tensionOnly: true })) }],
    ['a combination', cantileverFrame('F1', { combinations: [] })],
    ['what the sheets leave unchecked', cantileverFrame('F1', { notChecked: ['no combinations'] })],
  ])('changes with %s', (_what, changed) => {
    expect(frameHash(changed, defaultSettings)).not.toBe(address);
  });

  it('takes the partial factors in only where EN 1993-1-1 reads them', () => {
    const eurocode = { ...defaultSettings, strengthCheck: 'EN 1993-1-1' as const };
    const factored = { gammaM1: 1.1, interaction: 'Annex A' as const };
    expect(frameHash(frame, { ...defaultSettings, ...factored })).toBe(address);
    expect(frameHash(frame, { ...eurocode, ...factored })).not.toBe(frameHash(frame, eurocode));
    expect(frameHash(frame, { ...eurocode, nationalAnnex: 'NA' })).toBe(frameHash(frame, eurocode));
  });

  it.each([
    { stressFactor: 0.66 },
    { nearLimit: 0.95 },
    { stability: 'by others' as const },
    { deflectionRatio: 'none' as const },
    { analysis: 'second order' as const },
    { imperfections: 'EN 1993-1-1' as const },
    { imperfections: 'AISC 360' as const },
    { stiffnessReduction: 'AISC 360' as const },
    { shearDeformation: true },
    { strengthCheck: 'AISC 360-22 ASD' as const },
  ])('changes with the setting %j', (change) => {
    expect(frameHash(frame, { ...defaultSettings, ...change })).not.toBe(address);
  });
});

describe('canonical JSON', () => {
  it('takes keys for what they are, line ends included', () => {
    expect(canonicalJson({ a: 1, 'b\nc': 2 })).toBe('{"a":1,"b\\nc":2}');
    expect(canonicalJson({ 'a\nb': 1, c: 2 })).toBe('{"a\\nb":1,"c":2}');
  });

  it('orders keys, leaves out what is undefined and reads −0 as 0', () => {
    expect(canonicalJson({ b: [-0, 1.5, null], a: { d: '"x"', c: undefined }, '"': {} })).toBe(
      '{"\\"":{},"a":{"d":"\\"x\\""},"b":[0,1.5,null]}',
    );
  });
});
