/** Rows as they are kept → intake: the same frames and problems as reading the files gave, without the files. */
import type { InputIdentity, Intake } from '@/lib/intake/intake';
import { type IntakeOptions, readInput } from '@/lib/intake/read-input';
import { sheetsFromRows, type StoredInput } from '@/lib/intake/rows/input-rows';
import type { Problem } from '@/lib/problems/problem';

export interface RowsToRead extends StoredInput {
  readonly identity: InputIdentity;
  /** What reading the files found wrong with files as such (see `isOfFile`). */
  readonly problems: readonly Problem[];
}

/** A changed row's settings say who changed them (`SettingOrigin.changedBy`). Never throws on what is in the rows. */
export function readRows({ identity, problems, ...input }: RowsToRead, options: IntakeOptions = {}): Intake {
  return readInput({ sheets: sheetsFromRows(input), problems, identity }, options);
}

/** A problem of a file or a sheet of it that could not be read: rows cannot say it again. */
export function isOfFile({ code, row, cell }: Problem): boolean {
  return (code === 'unreadable' || code === 'too-large') && row === null && cell === null;
}
