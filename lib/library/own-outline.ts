import { sectionOutline, type SectionOutline } from '@/lib/library/section-outline';
import type { Section } from '@/lib/model/frame';

/** A section's outline in mm by its shape and dimensions; null where it is given by its properties alone. */
export function outlineOfSection({ shape, dimensions }: Pick<Section, 'shape' | 'dimensions'>): SectionOutline | null {
  if (shape === null || dimensions === null) return null;
  const mm = (si: number | null): number => (si ?? 0) * 1000;
  const { h, b, tw, tf, r, t, d } = dimensions;
  switch (shape) {
    case 'I':
    case 'channel':
      return sectionOutline({ shape, h: mm(h), b: mm(b), tw: mm(tw), tf: mm(tf), r: mm(r) });
    case 'rhs':
      return sectionOutline({ shape, h: mm(h), b: mm(b), t: mm(t), ro: mm(r), ri: Math.max(0, mm(r) - mm(t)) });
    case 'chs':
      return sectionOutline({ shape, d: mm(d), t: mm(t) });
    case 'bar': {
      const [x, y] = [mm(b) / 2, mm(h) / 2];
      return { path: `M${-x} ${-y}H${x}V${y}H${-x}Z`, width: mm(b), depth: mm(h) };
    }
    case 'round': {
      const n = mm(d) / 2;
      return { path: `M${-n} 0A${n} ${n} 0 1 1 ${n} 0A${n} ${n} 0 1 1 ${-n} 0Z`, width: mm(d), depth: mm(d) };
    }
  }
}
