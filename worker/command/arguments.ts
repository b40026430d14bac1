/** What was asked for on the command line of `npm run --silent batch`. */
export interface BatchArguments {
  readonly files: readonly string[];
  readonly json: string | null;
  readonly xlsx: string | null;
  readonly csv: string | null;
  readonly report: string | null;
  readonly all: boolean;
}

export const usage = `Usage: npm run --silent batch -- FILE… [--json OUT] [--xlsx OUT] [--csv DIR] [--report OUT] [--all]

  FILE…         one .xlsx, one .zip, or one or several .csv (file name = sheet name)
  --json OUT    results as JSON, SI units
  --xlsx OUT    result workbook
  --csv DIR     the workbook's sheets, one CSV file each
  --report OUT  calculation report as PDF, a draft
  --all         JSON checks of every combination, not only the governing ones
  Without an output named, a short summary is printed.

Ends with 0 when every frame was solved, 1 when some were not, 2 when nothing could be read.`;

/** Reads the words after \`--\`; a sentence where they make no sense. */
export function readArguments(words: readonly string[]): BatchArguments | { readonly wrong: string } {
  const files: string[] = [];
  const out = new Map<string, string>();
  let all = false;
  let onlyFiles = false;
  for (let i = 0; i < words.length; i++) {
    const word = words[i]!;
    if (onlyFiles || !word.startsWith('-')) {
      files.push(word);
      continue;
    }
    if (word === '--') onlyFiles = true;
    else if (word === '--all') all = true;
    else {
      const [name = '', joined] = splitOnce(word);
      if (!['--json', '--xlsx', '--csv', '--report'].includes(name)) return { wrong: `${word} is not an option.` };
      const value = joined ?? words[++i];
      if (value === undefined || value === '' || (joined === undefined && value.startsWith('--')))
        return { wrong: `${name} needs ${name === '--csv' ? 'a folder' : 'a file'} to write to.` };
      if (out.has(name)) return { wrong: `${name} is given twice.` };
      out.set(name, value);
    }
  }
  if (files.length === 0) return { wrong: 'No file is named.' };
  return {
    files,
    json: out.get('--json') ?? null,
    xlsx: out.get('--xlsx') ?? null,
    csv: out.get('--csv') ?? null,
    report: out.get('--report') ?? null,
    all,
  };
}

function splitOnce(word: string): [string, string | undefined] {
  const at = word.indexOf('=');
  return at < 0 ? [word, undefined] : [word.slice(0, at), word.slice(at + 1)];
}
