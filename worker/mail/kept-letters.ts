/** Letters that the local service keeps instead of delivering them. */
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

export interface KeptLetter {
  readonly id: string;
  readonly at: string;
  readonly office: number;
  readonly kind: string;
  readonly from: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

/** The folder of kept letters beside a database. */
export const keptFolder = (dataDir: string): string => join(/* turbopackIgnore: true */ dataDir, 'letters');

/** An office's kept letters, the newest first. */
export function listKeptLetters(folder: string, office: number): KeptLetter[] {
  if (!existsSync(folder)) return [];
  return readdirSync(folder)
    .filter((name) => name.endsWith('.json'))
    .flatMap((name) => {
      try {
        return [JSON.parse(readFileSync(join(/* turbopackIgnore: true */ folder, name), 'utf8')) as KeptLetter];
      } catch {
        return []; // one that is being written at this moment
      }
    })
    .filter((letter) => letter.office === office)
    .sort((one, other) => other.at.localeCompare(one.at));
}
