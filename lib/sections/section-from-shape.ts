import type { PropertySource, Section, SectionProperties, Shape, ShapeDimensions } from '@/lib/model/frame';
import { propertiesOfBar, propertiesOfRound } from './bar-section';
import { propertiesOfChannel } from './channel-section';
import { propertiesOfChs, propertiesOfRhs } from './hollow-section';
import { propertiesOfI } from './i-section';

/** The shapes a sheet may name; a bar with `d` alone is round. */
export const shapeWords = ['I', 'channel', 'rhs', 'chs', 'bar'] as const;
export type ShapeWord = (typeof shapeWords)[number];

type DimensionName = keyof ShapeDimensions;

/** A section derived from its shape: everything but its name. */
export type ShapedSection = Omit<Section, 'name' | 'designation'>;

/** Why dimensions make no section: which are missing, or (all given) which one cannot be, in words with its name. */
interface ShapeTrouble {
  readonly missing: readonly DimensionName[];
  readonly impossible: { readonly dimension: DimensionName; readonly why: string } | null;
}

/**
 * The properties of a section given by its shape and dimensions in m, in closed form.
 *
 * I and channel: h b tw tf, r (root radius, blank = 0). rhs: h b t, r (outer corner radius, blank = 1.5 t; inner = outer − t).
 * chs: d t. bar: h b for a rectangle, or d for a round. Dimensions that the shape does not use are ignored (null in the result).
 * For a channel W minor is the smaller of the two. Returns the trouble where a dimension is missing or cannot be.
 * @throws {RangeError} for a dimension that is not a finite number above zero (r: not below), the caller's mistake.
 */
export function sectionFromShape(
  shape: ShapeWord,
  dims: Partial<ShapeDimensions>,
  made: Section['made'] = null,
): { readonly section: ShapedSection } | { readonly trouble: ShapeTrouble } {
  const given = (name: DimensionName): boolean => typeof dims[name] === 'number';
  for (const name of ['h', 'b', 'tw', 'tf', 't', 'd', 'r'] as const) {
    const value = dims[name] ?? null;
    if (value !== null && !(Number.isFinite(value) && (name === 'r' ? value >= 0 : value > 0)))
      throw new RangeError(`sectionFromShape: expected ${name} above zero in m, got ${value}`);
  }
  const round = shape === 'bar' && given('d') && !given('h') && !given('b');
  const missing = needs(shape, round).filter((name) => !given(name));
  if (missing.length > 0) return { trouble: { missing, impossible: null } };

  const { h = 0, b = 0, tw = 0, tf = 0, t = 0, d = 0 } = dims as Record<DimensionName, number>;
  const r = dims.r ?? (shape === 'rhs' ? 1.5 * t : 0);
  const impossible = whatCannotBe(shape, { h, b, tw, tf, t, d, r });
  if (impossible) return { trouble: { missing: [], impossible } };

  const none: ShapeDimensions = { h: null, b: null, tw: null, tf: null, r: null, t: null, d: null };
  switch (shape) {
    case 'I':
      return { section: derived('I', { ...none, h, b, tw, tf, r }, propertiesOfI(h, b, tw, tf, r), made) };
    case 'channel':
      return { section: derived('channel', { ...none, h, b, tw, tf, r }, propertiesOfChannel(h, b, tw, tf, r), made) };
    case 'rhs':
      return { section: derived('rhs', { ...none, h, b, t, r }, propertiesOfRhs(h, b, t, r), made) };
    case 'chs':
      return { section: derived('chs', { ...none, d, t }, propertiesOfChs(d, t), made) };
    case 'bar':
      return round
        ? { section: derived('round', { ...none, d }, propertiesOfRound(d), made) }
        : { section: derived('bar', { ...none, h, b }, propertiesOfBar(h, b), made) };
  }
}

function needs(shape: ShapeWord, round: boolean): readonly DimensionName[] {
  if (shape === 'I' || shape === 'channel') return ['h', 'b', 'tw', 'tf'];
  if (shape === 'rhs') return ['h', 'b', 't'];
  if (shape === 'chs') return ['d', 't'];
  return round ? ['d'] : ['h', 'b'];
}

function whatCannotBe(shape: ShapeWord, of: Record<DimensionName, number>): ShapeTrouble['impossible'] {
  const { h, b, tw, tf, t, d, r } = of;
  if (shape === 'I' || shape === 'channel') {
    const clear = shape === 'I' ? (b - tw) / 2 : b - tw;
    if (2 * tf >= h) return { dimension: 'tf', why: 'two flanges are as deep as the section' };
    if (clear <= 0) return { dimension: 'tw', why: 'the web is as wide as the flange' };
    if (r > clear || 2 * r > h - 2 * tf) return { dimension: 'r', why: 'the root radius does not fit between the flanges' };
  }
  if (shape === 'rhs') {
    if (2 * t >= Math.min(h, b)) return { dimension: 't', why: 'two walls are as thick as the section' };
    if (2 * r > Math.min(h, b)) return { dimension: 'r', why: 'the corner radius is more than half of a side' };
  }
  if (shape === 'chs' && 2 * t >= d) return { dimension: 't', why: 'two walls are as thick as the section' };
  return null;
}

/** A section with properties derived from its dimensions. */
export function derived(
  shape: Shape,
  dimensions: ShapeDimensions,
  properties: SectionProperties,
  made: Section['made'],
): ShapedSection {
  return { shape, made, dimensions, properties, sources: sourcesOf(properties, 'derived') };
}

/** The same source for every property that is known. */
export function sourcesOf(properties: SectionProperties, source: PropertySource): Section['sources'] {
  const sources: Partial<Record<keyof SectionProperties, PropertySource>> = {};
  for (const key of Object.keys(properties) as (keyof SectionProperties)[]) if (properties[key] !== null) sources[key] = source;
  return sources;
}
