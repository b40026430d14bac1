/** In a thread: a table of an office's own sections or grades, as the files say it; nothing is stored. */
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile } from '@/lib/intake/intake';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import { type OwnRecordsRead, readOwnFiles } from '@/lib/intake/own/read-own-records';
import { ownDefinition } from '@/lib/intake/own/own-sheets';
import type { Problem } from '@/lib/problems/problem';
import * as say from '@/lib/problems/wording';
import type { System } from '@/lib/units/quantity';

export interface OwnTableTask {
  readonly kind: OwnKind;
  readonly files: readonly InputFile[];
  readonly units: System;
}

const deadline_s = 30;

export async function readOwnTable({ kind, files, units }: OwnTableTask): Promise<OwnRecordsRead> {
  const until = performance.now() + 1000 * deadline_s;
  const read = await readFiles(files, { shouldStop: () => performance.now() > until, stopsAfter: `${deadline_s} s` });
  const found = readOwnFiles(kind, read.sheets, units);
  if (found) return { ...found, problems: [...read.problems, ...found.problems] };
  const { name } = ownDefinition(kind);
  const missing: Problem = {
    severity: 'error', code: 'missing-sheet', sheet: name, file: null, row: null, column: null, cell: null, frames: [],
    found: null, message: say.tableMissing(name), stopsAll: true,
  }; // prettier-ignore
  return { records: [], problems: read.problems.length > 0 ? read.problems : [missing] };
}
