/** Rows of the files → frames and problems: the rules of sheets §2, §3, §5 and §7. */
import type { Batch, FrameEntry } from '@/lib/intake/batch';
import { FrameBuilder } from '@/lib/intake/build-frame';
import { isReadable, VariantReader } from '@/lib/intake/families/variants';
import type { RawSheet } from '@/lib/intake/files/raw-sheet';
import { familiesInUse, FrameList } from '@/lib/intake/frames';
import { nearest } from '@/lib/intake/distance';
import type { FrameRead, InputIdentity, Intake, SheetRead } from '@/lib/intake/intake';
import { isOfficePart, officeSheetKind, ownSheets } from '@/lib/intake/own/own-sheets';
import type { OwnThing } from '@/lib/intake/own/own-thing';
import { PartOrigins } from '@/lib/intake/own/part-origins';
import { readOwn } from '@/lib/intake/own/read-own';
import { ProblemList } from '@/lib/intake/problem-list';
import { forNobody, Reader } from '@/lib/intake/reader';
import { readTable } from '@/lib/intake/read-table';
import { inputRows } from '@/lib/intake/rows/input-rows';
import { cellAddress } from '@/lib/intake/files/cell-address';
import { sheetDefinitions, type SheetName, sheetNames } from '@/lib/intake/sheet-definitions';
import { LoadCases } from '@/lib/intake/sheets/load-cases';
import { Materials } from '@/lib/intake/sheets/materials';
import { Sections } from '@/lib/intake/sheets/sections';
import { readSetup } from '@/lib/intake/sheets/setup';
import { absentPlace, type Part, partPlace, rawCell, type Row, type Table } from '@/lib/intake/table';
import { BatchWarnings } from '@/lib/intake/warnings';
import { sheetKey } from '@/lib/intake/words';
import type { Frame } from '@/lib/model/frame';
import type { OfficeLimit } from '@/lib/model/office-limit';
import type { Settings } from '@/lib/model/settings';
import type { Problem } from '@/lib/problems/problem';
import * as say from '@/lib/problems/wording';

export interface RawInput {
  readonly sheets: readonly RawSheet[];
  readonly problems: readonly Problem[];
  readonly identity: InputIdentity;
}

export interface IntakeOptions {
  /** The office's own settings, where the Setup sheet is silent. */
  readonly office?: Partial<Settings>;
  /** The office's own limits on movement, where the sheets give none. */
  readonly officeLimits?: readonly OfficeLimit[];
  /** The office's own sections and materials: the sheets' come before them, the standard ranges behind. */
  readonly own?: readonly OwnThing[];
  /** Told of every frame whose rows make sense by themselves, with the rows its members stand on (lib/changes). */
  readonly onFrame?: (seen: FrameSeen) => void;
}

/** A frame as read, and where its members stand. */
export interface FrameSeen {
  readonly entry: FrameEntry;
  readonly frame: Frame;
  /** By member of the frame. */
  readonly memberRows: readonly Row[];
  readonly batch: Batch;
}

const byKey = new Map(sheetNames.map((name) => [sheetKey(name), name]));

/** Reads every sheet. Nothing throws on bad input: all that is wrong comes back as problems, and good frames come out. */
export function readInput(raw: RawInput, options: IntakeOptions = {}): Intake {
  const problems = new ProblemList();
  problems.take(raw.problems);
  const reader = new Reader(problems);
  const named = nameSheets(raw.sheets, problems);
  const table = (name: SheetName, system: 'metric' | 'us'): Table | undefined => {
    const sheet = named.get(name);
    const definition = sheetDefinitions.get(name);
    return sheet && definition ? readTable(sheet, definition, system, problems) : undefined;
  };
  const setupTable = table('Setup', 'metric');
  const setup = readSetup(setupTable, options.office ?? {}, reader, problems);
  const system = setup.settings.units;
  const tables = new Map<SheetName, Table>();
  for (const name of sheetNames) {
    const found = name === 'Setup' ? setupTable : table(name, system);
    if (found) tables.set(name, found);
  }
  // a file that could not be read may hold the sheet that seems missing
  if (!raw.problems.some((problem) => problem.severity === 'error')) tellMissingSheets(tables, raw.sheets, problems);

  const held = (kind: 'section' | 'material') => raw.sheets.filter(({ name }) => officeSheetKind(name) === kind);
  const own = readOwn({ section: held('section'), material: held('material') }, options.own ?? [], system, reader, problems);
  const sections = new Sections(tables.get('Sections'), reader, problems, { own: own.sections });
  const materials = new Materials(tables.get('Materials'), reader, problems, own.materials);
  const partOrigins = new PartOrigins(own.sections);
  const families = familiesInUse(tables, system, reader, problems);
  const frames = new FrameList(tables, families, reader, problems);
  frames.read(new VariantReader(families, sections, materials, reader, problems));
  const known = { framesByKey: frames.byKey, families };
  const loads = [tables.get('Node loads'), tables.get('Member loads'), tables.get('Settlements')];
  const cases = new LoadCases(tables.get('Load cases'), loads, known, [...families.values()], reader, problems);
  const batch: Batch = {
    problems, reader, system, settings: setup.settings, origins: setup.origins, settingPlaces: setup.places, tables, families,
    frames: frames.list, framesByKey: frames.byKey, sections, materials, ownSections: own.sections, cases, partOrigins, officeLimits: options.officeLimits ?? [],
  }; // prettier-ignore

  const read = readFrames(batch, options.onFrame);
  const { stopped } = problems;
  const parts = raw.sheets.flatMap((sheet) => sheet.parts);
  const taken = [...own.sections.taken, ...own.materials.taken];
  const added = ownSheets(taken, 1 + Math.max(-1, ...parts.map(({ order }) => order)), parts.map(({ name }) => name)); // prettier-ignore
  const sheets = [...raw.sheets, ...added];
  const kinds = added.map((sheet) => {
    const name = officeSheetKind(sheet.name) === 'section' ? 'Sections' : 'Materials';
    return readTable(sheet, sheetDefinitions.get(name)!, system, new ProblemList());
  });
  return {
    input: raw.identity,
    settings: setup.settings,
    origins: setup.origins,
    frames: read.map((each) => (problems.stopsAll || stopped.has(each.id) ? { id: each.id, frame: null } : each)),
    // what was said of the office's own when it was saved is not the sender's
    problems: problems.list().filter(({ severity, file, sheet }) => severity === 'error' || !isOfficePart({ file: file ?? '', name: sheet ?? '' })), // prettier-ignore
    sheets: sheetsRead(sheets, [...tables.values(), ...own.tables, ...kinds]),
    rows: inputRows(sheets),
    parts: partOrigins.list(),
  };
}

function readFrames(batch: Batch, onFrame?: (seen: FrameSeen) => void): FrameRead[] {
  const { problems } = batch;
  const builder = new FrameBuilder(batch);
  const warnings = new BatchWarnings(batch);
  const read: FrameRead[] = [];
  for (const entry of batch.frames) {
    if (!entry.run) continue;
    // a variant with a parameter wrong has said so at its cell, and so has a frame with a family's name
    const built = isReadable(entry) && !batch.families.has(entry.key) ? builder.build(entry) : null;
    const frame = built?.frame ?? null;
    if (frame) warnings.look(frame, batch.cases.for(entry).sound);
    if (built && !problems.stopped.has(entry.id)) onFrame?.({ entry, batch, ...built });
    read.push({ id: entry.id, frame: problems.stopped.has(entry.id) ? null : frame });
  }
  builder.finish();
  if (read.length > 0) warnings.finish();
  tellUnknownMaterials(batch);
  return read;
}

/** Names of materials that are nowhere, in Setup and Sections, where no member leans on them. */
function tellUnknownMaterials(batch: Batch): void {
  const { problems, reader, settings, settingPlaces, materials, tables } = batch;
  for (const row of tables.get('Sections')?.rows ?? []) {
    const name = rawCell(row, 'material') ? reader.id(row, 'material', forNobody) : null;
    const found = name ? materials.find(name) : null;
    if (!name || !found || !('suggestion' in found)) continue;
    reader.tell(row, 'material', { code: 'unknown-material', message: say.unknownMaterial(name, found.suggestion) }, forNobody);
  }
  if (settings.material !== null) {
    const found = materials.find(settings.material);
    const place = settingPlaces.get('material');
    if ('suggestion' in found && place) {
      problems.add(place, { code: 'unknown-material', message: say.unknownMaterial(settings.material, found.suggestion) }, null);
    }
  }
}

/** Sheets by the contract's names; others are told and left alone. */
function nameSheets(sheets: readonly RawSheet[], problems: ProblemList): Map<SheetName, RawSheet> {
  const named = new Map<SheetName, RawSheet>();
  for (const sheet of sheets) {
    if (officeSheetKind(sheet.name) !== null) continue;
    const name = byKey.get(sheetKey(sheet.name));
    if (name) {
      const before = named.get(name);
      named.set(name, before ? { ...before, parts: [...before.parts, ...sheet.parts] } : sheet);
      continue;
    }
    const near = nearest(sheetKey(sheet.name), [...byKey]);
    for (const part of sheet.parts) {
      if (part.rows.length === 0) continue;
      const fault = near
        ? ({ code: 'near-miss-column', message: say.nearMissSheet(part.name, near) } as const)
        : ({ code: 'column-ignored', message: say.sheetIgnored(part.name) } as const);
      problems.add(partPlace(part), fault, null);
    }
  }
  return named;
}

/** Needed: Nodes, Members and Supports, or Variants. */
function tellMissingSheets(tables: ReadonlyMap<SheetName, Table>, sheets: readonly RawSheet[], problems: ProblemList): void {
  if (tables.has('Variants') || sheets.length === 0) return;
  for (const name of ['Nodes', 'Members', 'Supports'] as const) {
    const table = tables.get(name);
    const empty = table?.parts.every((part) => part.raw.rows.length === 0) ?? true;
    if (!empty) continue;
    problems.add(
      absentPlace(name),
      { code: 'missing-sheet', message: say.missingSheet(name, table !== undefined), stopsAll: true },
      null,
    );
  }
}

function sheetsRead(sheets: readonly RawSheet[], tables: readonly Table[]): SheetRead[] {
  const parts = new Map<RawSheet['parts'][number], Part>();
  for (const table of tables) for (const part of table.parts) parts.set(part.raw, part);
  return sheets
    .flatMap((sheet) => sheet.parts)
    .sort((a, b) => a.order - b.order)
    .map((raw) => {
      const part = parts.get(raw);
      return {
        name: raw.name,
        file: raw.file,
        known: part?.definition.name ?? null,
        headingRow: part?.headingRow ?? null,
        rows: part ? part.dataRows.length : raw.rows.length,
        decimalMark: raw.decimalMark,
        headings: (part?.columns ?? []).map((column) => ({
          text: column.text,
          cell: cellAddress(part?.headingRow ?? 1, column.index),
          known: column.known,
        })),
      };
    });
}
