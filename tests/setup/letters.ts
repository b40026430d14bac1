/** Letters that the tests' server keeps instead of sending them. */
import { keptFolder, listKeptLetters, type KeptLetter } from '@/worker/mail/kept-letters';

/** Waits for the newest letter to an address that a test wants. */
export async function letterTo({
  dataDir,
  office,
  to,
  kind,
  not = [],
}: {
  readonly dataDir: string;
  readonly office: number;
  readonly to: string;
  readonly kind: string;
  /** Ids of letters seen before. */
  readonly not?: readonly string[];
}): Promise<KeptLetter> {
  for (let tries = 0; tries < 100; tries++) {
    const letters = listKeptLetters(keptFolder(dataDir), office);
    const found = letters.find((one) => one.to === to && one.kind === kind && !not.includes(one.id));
    if (found) return found;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error(`No letter of kind “${kind}” came to ${to} within ten seconds`);
}

/** The one address in a letter, as a path of the server under test. */
export function linkIn(letter: KeptLetter): string {
  const found = /https?:\/\/[^\s/]+(\/\S*)/.exec(letter.text)?.[1];
  if (found === undefined) throw new Error(`There is no link in “${letter.subject}”`);
  return found;
}
