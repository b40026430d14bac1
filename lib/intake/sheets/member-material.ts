import type { Draft } from '@/lib/intake/draft';
import { forNobody } from '@/lib/intake/reader';
import type { UnknownMaterial } from '@/lib/intake/sheets/materials';
import { type Row, rawCell } from '@/lib/intake/table';
import type { Section } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

/**
 * Index of a member's material in its frame: what Members says, else Sections, else Setup, else an error.
 * Undefined where there is none (told).
 */
export function resolveMaterial(
  draft: Draft,
  row: Row,
  found: { readonly section: Section; readonly row: Row | null },
): number | undefined {
  const { reader, settings, settingPlaces, problems } = draft.batch;
  const own = reader.id(row, 'material', draft.reading);
  if (own === undefined) return undefined;
  const unknown = (name: string, { suggestion, retired }: UnknownMaterial): { code: 'unknown-material'; message: string } => ({
    code: 'unknown-material',
    message: retired ? say.retired(name) : say.unknownMaterial(name, suggestion),
  });
  if (own !== null)
    return materialIndex(draft, own, found.section, (s) => reader.tell(row, 'material', unknown(own, s), draft.reading));
  const sectionRow = found.row;
  const ofSection = sectionRow && rawCell(sectionRow, 'material') ? reader.id(sectionRow, 'material', forNobody) : null;
  if (sectionRow && ofSection) {
    const reading = { ...forNobody, frame: draft.entry.id };
    return materialIndex(draft, ofSection, found.section, (s) =>
      reader.tell(sectionRow, 'material', unknown(ofSection, s), reading),
    );
  }
  const byDefault = settings.material;
  if (byDefault === null) {
    reader.tell(row, 'material', { code: 'unknown-material', message: say.materialMissing() }, draft.reading);
    return undefined;
  }
  return materialIndex(draft, byDefault, found.section, (s) => {
    const place = settingPlaces.get('material');
    if (place) problems.add(place, unknown(byDefault, s), draft.entry.id);
    else reader.tell(row, 'material', unknown(byDefault, s), draft.reading);
  });
}

function materialIndex(
  draft: Draft,
  name: string,
  section: Section,
  tell: (unknown: UnknownMaterial) => void,
): number | undefined {
  const { materials, problems } = draft.batch;
  const found = materials.find(name);
  if ('suggestion' in found) {
    tell(found);
    return undefined;
  }
  for (const entry of found.entries) problems.touch(entry, draft.entry.id);
  if (!found.source) return undefined;
  const material = materials.resolve(found.source, section.properties.t_m, section.shape);
  const at = draft.materials.indexOf(material);
  if (at >= 0) return at;
  draft.materialRows.push(found.row);
  return draft.materials.push(material) - 1;
}
