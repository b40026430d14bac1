import type { Draft } from '@/lib/intake/draft';
import type { Offered } from '@/lib/intake/own/offered';
import { versionOf } from '@/lib/intake/own/own-sheets';
import type { OwnKind, PartOrigin } from '@/lib/intake/own/own-thing';
import { type Row, rawCell } from '@/lib/intake/table';
import type { Section } from '@/lib/model/frame';

/** Gathers where the sections and materials of frames come from, and how many frames are made of each. */
export class PartOrigins {
  private readonly known = new Map<object | string, PartOrigin>();
  private readonly counts = new Map<PartOrigin, number>();

  constructor(private readonly sections: Offered<Section>) {}

  see({ sections, sectionRows, materials, materialRows }: Draft): void {
    for (const [i, section] of sections.entries())
      this.count(section, 'section', section.name, this.sections.viaRow(section) ?? sectionRows[i] ?? null);
    // a material is one for each thickness: its name stands for all
    const names = new Map(materials.map(({ name }, i) => [name, materialRows[i] ?? null]));
    for (const [name, row] of names) this.count(row ?? `material ${name}`, 'material', name, row);
  }

  list(): PartOrigin[] {
    return [...this.counts].map(([part, frames]) => ({ ...part, frames }));
  }

  private count(by: object | string, kind: OwnKind, name: string, row: Row | null): void {
    let part = this.known.get(by);
    if (!part) this.known.set(by, (part = { kind, name, ...originOf(row), frames: 0 }));
    this.counts.set(part, (this.counts.get(part) ?? 0) + 1);
  }
}

function originOf(row: Row | null): Omit<PartOrigin, 'kind' | 'name' | 'frames'> {
  if (!row) return { origin: 'library', version: null, note: null, own: null };
  const own = versionOf(row);
  if (own) {
    const named = rawCell(row, row.part.definition.name === 'Sections' ? 'section' : 'material');
    return { origin: 'office', ...own, own: named?.text ?? null };
  }
  const said = rawCell(row, 'source')?.text.trim() ?? '';
  const place = `${row.part.raw.name} row ${row.raw.row}`;
  return { origin: 'sheet', version: null, note: said === '' ? place : `${place}: ${said}`, own: null };
}
