import { existsSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { faceNames, type FaceName, type ReportFonts } from '@/lib/reports/pdf/report-fonts';

const files: Readonly<Record<FaceName, string>> = {
  sans: 'fira-sans-400.ttf',
  sansBold: 'fira-sans-600.ttf',
  sansItalic: 'fira-sans-400-italic.ttf',
  condensed: 'fira-sans-condensed-400.ttf',
  condensedMedium: 'fira-sans-condensed-500.ttf',
  condensedBold: 'fira-sans-condensed-600.ttf',
  mono: 'fira-mono-400.ttf',
};

let read: ReportFonts | null = null;

/** The fonts that ship with the application, for reports; read once. */
export function reportFonts(): ReportFonts {
  if (read) return read;
  const folder = fontFolder();
  read = Object.fromEntries(faceNames.map((name) => [name, readFileSync(join(folder, files[name]))])) as unknown as ReportFonts;
  return read;
}

/** Beside the source and beside a bundle of dist-worker alike. */
function fontFolder(): string {
  for (let at = dirname(fileURLToPath(import.meta.url)); ; at = dirname(at)) {
    const folder = join(at, 'components', 'fonts');
    if (existsSync(folder)) return folder;
    if (dirname(at) === at) throw new Error('The folder components/fonts is missing');
  }
}
