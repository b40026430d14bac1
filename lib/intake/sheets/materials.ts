import { nearestAny } from '@/lib/intake/distance';
import { idKey } from '@/lib/intake/ids';
import { oneRowAKey } from '@/lib/intake/keyed-rows';
import type { Entry, ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Reader } from '@/lib/intake/reader';
import { type Row, rawCell, type Table } from '@/lib/intake/table';
import type { Offered } from '@/lib/intake/own/offered';
import { gradeFor, type GradeProperties, strength } from '@/lib/materials/grade-for';
import type { Steps } from '@/lib/materials/grades';
import { readYieldSteps } from '@/lib/materials/yield-steps';
import type { Material, PropertySource, Shape } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

const columns = {
  E_Pa: 'E', G_Pa: 'G', fy_Pa: 'fy', fu_Pa: 'fu', density_kg_m3: 'density', expansion_perK: 'expansion',
} as const; // prettier-ignore
type Property = keyof typeof columns;
const properties = Object.keys(columns) as Property[];

export interface MaterialRow {
  readonly name: string;
  /** Of the Materials sheet or of the office's own; null = a grade by its name. */
  readonly row: Row | null;
  readonly grade: string | null;
  /** Yield strength by thickness; null = a grade's, or typed. */
  readonly steps: Steps | null;
  readonly typed: Partial<Record<Property, number>>;
}

export interface FoundMaterial {
  /** Null where its row is wrong. */
  readonly source: MaterialRow | null;
  readonly row: Row | null;
  readonly entries: readonly Entry[];
}

/** What stands for a material that is nowhere. */
export interface UnknownMaterial {
  readonly suggestion: string | null;
  /** It was one of the office's own, and is no longer offered. */
  readonly retired?: boolean;
}

/** The batch's materials: those of the Materials sheet, else the office's own, else grades by their name. */
export class Materials {
  private readonly bySheet = new Map<string, FoundMaterial>();
  private readonly grades = new Map<string, FoundMaterial | UnknownMaterial>();
  private readonly resolved = new Map<MaterialRow, Map<string, Material>>();

  /** @param own the office's own */
  constructor(
    table: Table | undefined,
    reader: Reader,
    problems: ProblemList,
    private readonly own?: Offered<MaterialRow>,
  ) {
    const ided = (row: Row): { id: string; key: string } | undefined => {
      if (!reader.keeps(row, forNobody)) return undefined;
      const id = reader.needId(row, 'material', forNobody);
      return id === undefined ? undefined : { id, key: idKey(id) };
    };
    const conflicts = new Map<string, Entry[]>();
    const rows = (table?.rows ?? []).map((row) => ({ row, level: 0 }));
    const kept = oneRowAKey(rows, ided, (row, first, same) => {
      const told = problems.record(() => reader.tell(row, 'material', same
        ? { code: 'repeated-row', message: say.repeatedRow(first.raw.row) }
        : { code: 'conflicting-row', message: say.conflictingRow('material', first.raw.row) }, forNobody)); // prettier-ignore
      const key = idKey(reader.id(row, 'material', forNobody) ?? '');
      if (!same) conflicts.set(key, [...(conflicts.get(key) ?? []), ...told.entries]);
    });
    for (const { row, id, key } of kept) {
      const { value, entries } = problems.record(() => readMaterial(row, id, reader, own));
      this.bySheet.set(key, { source: value ?? null, row, entries: [...entries, ...(conflicts.get(key) ?? [])] });
    }
  }

  /** Every row of the Materials sheet, once a name, in order. */
  rows(): readonly (readonly [name: string, FoundMaterial])[] {
    return [...this.bySheet];
  }

  find(name: string): FoundMaterial | UnknownMaterial {
    const own = this.bySheet.get(idKey(name));
    if (own) return own;
    let found = this.grades.get(name);
    if (!found) {
      const office = this.own?.take(name);
      const grade = gradeFor(name, null);
      if (office) found = { source: office.value, row: office.row, entries: office.entries };
      else if ('properties' in grade)
        found = { source: { name, row: null, grade: name, steps: null, typed: {} }, row: null, entries: [] }; // prettier-ignore
      else if (this.own?.isRetired(name)) found = { suggestion: null, retired: true };
      else {
        const near = [...this.bySheet.keys(), ...(this.own?.names() ?? [])].map((key) => [idKey(key), key] as const);
        found = { suggestion: nearestAny(idKey(name), near) ?? grade.suggestion };
      }
      this.grades.set(name, found);
    }
    return found;
  }

  /** The material for a section's thickest part and shape; the same object for the same. */
  resolve(source: MaterialRow, thickness_m: number | null, shape: Shape | null): Material {
    const plain = this.kept(source, thickness_m, null);
    if (shape !== 'rhs') return plain;
    // only some grades yield otherwise in a box
    const box = this.kept(source, thickness_m, 'rhs');
    return box.fy_Pa === plain.fy_Pa ? plain : box;
  }

  private kept(source: MaterialRow, thickness_m: number | null, shape: Shape | null): Material {
    let bySection = this.resolved.get(source);
    if (!bySection) this.resolved.set(source, (bySection = new Map()));
    const key = `${thickness_m} ${shape}`;
    let material = bySection.get(key);
    if (!material) bySection.set(key, (material = materialOf(source, thickness_m, shape)));
    return material;
  }
}

function materialOf({ name, grade, typed, steps }: MaterialRow, thickness_m: number | null, shape: Shape | null): Material {
  const found = grade === null ? null : gradeFor(grade, thickness_m, shape);
  const held: GradeProperties | null = found && 'properties' in found ? found.properties : null;
  const sources: Partial<Record<Property, PropertySource>> = {};
  const value = (key: Property): number | null => {
    const stepped = key === 'fy_Pa' && steps !== null ? strength(steps, thickness_m) : undefined;
    // thicker than the last step: no strength is known, whatever a grade would say
    if (stepped === null) return null;
    const own = stepped ?? typed[key];
    if (own !== undefined) sources[key] = 'typed';
    else if (held && held[key] !== null) sources[key] = 'library';
    return own ?? held?.[key] ?? null;
  };
  const E_Pa = value('E_Pa');
  if (E_Pa === null) throw new RangeError(`Expected a grade or E for material ${name}`);
  return {
    name,
    grade: held?.grade ?? null,
    standard: held?.standard ?? null,
    E_Pa,
    G_Pa: value('G_Pa'),
    fy_Pa: value('fy_Pa'),
    fu_Pa: value('fu_Pa'),
    density_kg_m3: value('density_kg_m3'),
    expansion_perK: value('expansion_perK'),
    sources,
  };
}

function readMaterial(row: Row, name: string, reader: Reader, own: Offered<MaterialRow> | undefined): MaterialRow | undefined {
  let sound = !reader.faulty(row, forNobody);
  const grade = reader.id(row, 'grade', forNobody);
  if (grade === undefined) sound = false;
  const stepText = reader.text(row, 'fy by thickness', forNobody);
  const steps = stepText ? readYieldSteps(stepText) : null;
  if (stepText === undefined) sound = false;
  else if (stepText !== null && steps === null) {
    reader.tell(row, 'fy by thickness', { code: 'not-a-number', message: say.yieldSteps(stepText) }, forNobody);
    sound = false;
  }
  const typed: Partial<Record<Property, number>> = {};
  for (const key of properties) {
    const value = reader.number(row, columns[key], forNobody);
    if (value === undefined) sound = false;
    else if (value !== null) {
      if (value > 0 || (key === 'expansion_perK' && value === 0)) typed[key] = value;
      else {
        const text = rawCell(row, columns[key])?.text ?? '';
        reader.tell(row, columns[key], { code: 'not-positive', message: say.notPositive(columns[key], text) }, forNobody);
        sound = false;
      }
    }
  }
  if (steps !== null && typed.fy_Pa !== undefined) {
    reader.tell(row, 'fy by thickness', { code: 'conflicting-row', message: say.yieldTwice() }, forNobody);
    sound = false;
  }
  const office = grade ? own?.take(grade) : null;
  if (office && sound) {
    suspect(row, typed, reader);
    const { value } = office;
    if (!value) return undefined;
    const kept = typed.fy_Pa === undefined ? (steps ?? value.steps) : null;
    return { name, row, grade: value.grade, steps: kept, typed: { ...value.typed, ...typed } };
  }
  if (grade && !office) {
    const found = gradeFor(grade, null);
    if (!('properties' in found)) {
      reader.tell(row, 'grade', { code: 'unknown-grade', message: say.unknownGrade(grade, found.suggestion) }, forNobody);
      sound = false;
    }
  } else if (grade === null && typed.E_Pa === undefined && sound) {
    reader.tell(row, row.part.byName.has('E') ? 'E' : 'grade', { code: 'not-a-number', message: say.gradeOrE() }, forNobody);
    sound = false;
  }
  suspect(row, typed, reader);
  return sound && grade !== undefined ? { name, row, grade, steps, typed } : undefined;
}

function suspect(row: Row, typed: Partial<Record<Property, number>>, reader: Reader): void {
  const ask = (key: Property, odd: (value: number) => boolean, message: string): void => {
    const value = typed[key];
    if (value !== undefined && odd(value)) reader.tell(row, columns[key], { code: 'suspect-unit', message }, forNobody);
  };
  ask('E_Pa', (E) => E < 50e9 || E > 250e9, say.suspectE());
  ask('G_Pa', (G) => G < 15e9 || G > 100e9, say.suspectG());
  ask('density_kg_m3', (density) => density < 2000 || density > 9000, say.suspectDensity());
  ask('fy_Pa', (fy) => fy > 1000e6, say.suspectYield());
}
