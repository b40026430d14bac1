/** What stands in place of an intake where reading was given up: no frame, and one problem that says why. */
import { createHash } from 'node:crypto';
import type { InputIdentity, Intake } from '@/lib/intake/intake';
import { defaultSettings, settingWords, type SettingName, type SettingOrigins } from '@/lib/model/settings';

export function unreadIntake(
  files: InputIdentity['files'],
  why: { readonly code: 'unreadable' | 'too-large'; readonly message: string },
): Intake {
  const silent = { source: 'default', cell: null } as const;
  const names = Object.keys(settingWords) as SettingName[];
  return {
    input: identity(files),
    settings: defaultSettings,
    origins: Object.fromEntries(names.map((name) => [name, silent])) as SettingOrigins,
    frames: [],
    problems: [
      {
        severity: 'error',
        code: why.code,
        sheet: null,
        file: files.length === 1 ? (files[0]?.name ?? null) : null,
        row: null,
        column: null,
        cell: null,
        frames: [],
        found: null,
        message: why.message,
        stopsAll: true,
      },
    ],
    sheets: [],
    rows: [],
  };
}

/** SHA-256 of one file is the file's; of several that of the lines `sha256 name` sorted by name. */
function identity(files: InputIdentity['files']): InputIdentity {
  const [first] = files;
  if (!first) throw new RangeError('Expected at least one file');
  const lines = [...files].sort((a, b) => (a.name < b.name ? -1 : 1)).map(({ sha256, name }) => `${sha256} ${name}\n`);
  const sha256 = files.length === 1 ? first.sha256 : createHash('sha256').update(lines.join('')).digest('hex');
  return { name: first.name, sha256, files };
}
