/** Files as sent → intake: reading bytes, then the rules of the sheets. */
import type { ReadOptions } from '@/lib/intake/files/raw-sheet';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile, Intake } from '@/lib/intake/intake';
import { type IntakeOptions, readInput } from '@/lib/intake/read-input';

/** Never throws on what is in the files: an unreadable one is a problem. */
export async function readIntake(files: readonly InputFile[], options: IntakeOptions & ReadOptions = {}): Promise<Intake> {
  return readInput(await readFiles(files, options), options);
}
