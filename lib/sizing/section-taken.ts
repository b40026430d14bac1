import type { Material, Section } from '@/lib/model/frame';

/** A section as members of a batch would have it after a change: each material resolved for its thickness and shape. */
export interface SectionTaken {
  readonly section: Section;
  /** By the material's name; a name that is missing cannot be had with this section. */
  readonly materials: Readonly<Record<string, Material>>;
}
