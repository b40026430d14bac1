import type { RangeName } from './library';

/**
 * A designation as typed, brought to one form: capitals, no blanks, dashes or slashes, X between figures, fractions and mixed
 * numbers as decimals, no zeros that say nothing. `305 × 165 x 40` → `305X165X40`, `HSS 3-1/2 x 2 x .250` → `HSS3.5X2X0.25`.
 */
export function designationKey(text: string): string {
  return text
    .replace(/\s*([¼½¾⅛⅜⅝⅞])/g, ' $1')
    .normalize('NFKC')
    .toUpperCase()
    .replace(/[×*]/g, 'X')
    .replace(/⁄/g, '/')
    .replace(/(\d),(\d)/g, '$1.$2')
    .replace(/(?:(\d+)[\s-]+)?(?<![\d.])(\d+)\/(\d+)/g, (_, whole = '0', over, under) =>
      String(Number(whole) + Number(over) / Number(under)),
    )
    .replace(/[\s_\-–—/]/g, '')
    .replace(/(?<!\d)\./g, '0.')
    .replace(/\.(\d*?)0+(?!\d)/g, (_, digits: string) => (digits === '' ? '' : `.${digits}`))
    .replace(/^UK(B|C|PFC)(?=\d)|UK(B|C|PFC)$/, (_, before?: string, after?: string) => seriesOf[before ?? after ?? ''] ?? '')
    .replace(/^UNP(?=\d)/, 'UPN');
}

const seriesOf: Readonly<Record<string, string>> = { B: 'UB', C: 'UC', PFC: 'PFC' };

/** Series that people also write after the size. */
const sizeFirst: ReadonlySet<string> = new Set(['UB', 'UC', 'PFC', 'W', 'HP', 'S', 'C', 'MC']);

/** How a designation of a range may be typed: letters before or after the size, walls as fractions or decimals. */
export function keysOf(designation: string, range: RangeName): readonly string[] {
  const key = designationKey(designation);
  if (range === 'HSS round' || range === 'HSS rectangular' || range === 'HSS square') return hssKeys(key);
  const [, letters = '', size = '', after = ''] = /^([A-Z]+?)(\d[\dX.]*?)([A-Z]*)$/.exec(key) ?? [];
  if (sizeFirst.has(letters)) return [key, `${size}${letters}`];
  if (letters === 'HE') return [key, `HE${after}${size}`];
  if (letters.startsWith('IPE')) {
    const variant = letters.slice('IPE'.length);
    return variant === '' ? [key] : [key, `IPE${size}${variant}`, `${variant}IPE${size}`];
  }
  const hollow = /^(HF|CF)([SRC]HS)$/.exec(letters);
  if (!hollow) return [key];
  const [, how = '', kind = ''] = hollow;
  return plainHollowKeys(kind, size).flatMap((plain) => [`${how}${plain}`, `${plain}${how}`]);
}

/** The keys of a hollow section without its letters of manufacture: `SHS100X100X5`, `SHS100X5`, `RHS100X100X5`. */
export function plainHollowKeys(kind: string, size: string): readonly string[] {
  const [h = '', , t = ''] = size.split('X');
  return kind === 'SHS' ? [`SHS${size}`, `SHS${h}X${t}`, `RHS${size}`] : [`${kind}${size}`];
}

/** Walls of sixteenths are written with three decimals, rounded up or down, or with four. */
function hssKeys(key: string): readonly string[] {
  const at = key.lastIndexOf('X') + 1;
  const wall = Number(key.slice(at));
  const sixteenths = Math.round(wall * 16) / 16;
  const close = Math.abs(wall - sixteenths) < 0.0006 ? [sixteenths] : [];
  const forms = close.flatMap((exact) => [exact, Math.floor(exact * 1000) / 1000, Math.round(exact * 1000) / 1000]);
  return [...new Set([wall, ...forms])].map((form) => `${key.slice(0, at)}${form}`);
}
