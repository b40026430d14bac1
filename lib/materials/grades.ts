/** Strength up to and including each thickness in mm. */
export type Steps = readonly (readonly [upTo_mm: number, MPa: number])[];

export interface Grade {
  readonly name: string;
  readonly standard: 'EN' | 'ASTM';
  /** Least yield strength by nominal thickness. */
  readonly steps: Steps;
  /** Of boxes, where they differ (ASTM A500). */
  readonly box?: Steps;
  /** Least tensile strength. */
  readonly fu: Steps;
}

/** MPa. */
export const KSI = 6.894757293168361;

/** EN 10025-2:2019 (S450: 2004), least yield and tensile strength of its table of mechanical properties. */
const rolled: readonly Grade[] = [
  {
    name: 'S235',
    standard: 'EN',
    steps: [[16, 235], [40, 225], [100, 215], [150, 195], [200, 185], [250, 175]],
    fu: [[100, 360], [150, 350], [250, 340]],
  },
  {
    name: 'S275',
    standard: 'EN',
    steps: [[16, 275], [40, 265], [63, 255], [80, 245], [100, 235], [150, 225], [200, 215], [250, 205]],
    fu: [[2.999, 430], [100, 410], [150, 400], [250, 380]],
  },
  {
    name: 'S355',
    standard: 'EN',
    steps: [[16, 355], [40, 345], [63, 335], [80, 325], [100, 315], [150, 295], [200, 285], [250, 275]],
    fu: [[2.999, 510], [100, 470], [250, 450]],
  },
  {
    name: 'S450',
    standard: 'EN',
    steps: [[16, 450], [40, 430], [63, 410], [80, 390], [150, 380]],
    fu: [[100, 550], [150, 530]],
  },
]; // prettier-ignore

/** EN 10210-1 and, up to 40 mm, EN 10219-1: hollow sections S235JRH, S275J0H, S355J2H … (from memory). */
const hollow: readonly Grade[] = [
  {
    name: 'S235H',
    standard: 'EN',
    steps: [[16, 235], [40, 225], [100, 215], [120, 195]],
    fu: [[100, 360], [120, 350]],
  },
  {
    name: 'S275H',
    standard: 'EN',
    steps: [[16, 275], [40, 265], [63, 255], [80, 245], [100, 235], [120, 225]],
    fu: [[3, 430], [100, 410], [120, 400]],
  },
  {
    name: 'S355H',
    standard: 'EN',
    steps: [[16, 355], [40, 345], [63, 335], [80, 325], [100, 315], [120, 295]],
    fu: [[3, 510], [100, 470], [120, 450]],
  },
]; // prettier-ignore

const ksi = (value: number, upTo_mm = Infinity): Steps => [[upTo_mm, value * KSI]];

/**
 * ASTM, shapes and hollow sections: A36, A992, A572 50, A500 B and C, A53 B as tabulated in Mamlouk and Zaniewski, Materials for
 * Civil and Construction Engineers, Table 3.2; the other grades of A572 from memory (60 and 65 up to flanges of 2 in).
 */
const american: readonly Grade[] = [
  { name: 'A36', standard: 'ASTM', steps: ksi(36), fu: ksi(58) },
  { name: 'A992', standard: 'ASTM', steps: ksi(50), fu: ksi(65) },
  { name: 'A572 Gr. 42', standard: 'ASTM', steps: ksi(42), fu: ksi(60) },
  { name: 'A572 Gr. 50', standard: 'ASTM', steps: ksi(50), fu: ksi(65) },
  { name: 'A572 Gr. 55', standard: 'ASTM', steps: ksi(55), fu: ksi(70) },
  { name: 'A572 Gr. 60', standard: 'ASTM', steps: ksi(60, 50.8), fu: ksi(75, 50.8) },
  { name: 'A572 Gr. 65', standard: 'ASTM', steps: ksi(65, 50.8), fu: ksi(80, 50.8) },
  { name: 'A500 Gr. B', standard: 'ASTM', steps: ksi(42), box: ksi(46), fu: ksi(58) },
  { name: 'A500 Gr. C', standard: 'ASTM', steps: ksi(46), box: ksi(50), fu: ksi(62) },
  { name: 'A53 Gr. B', standard: 'ASTM', steps: ksi(35), fu: ksi(60) },
];

/** Capitals without blanks and dashes, without "ASTM" and "grade": `ASTM A572 Gr. 50` → `A57250`, `S355 J2H` → `S355H`. */
function gradeKey(name: string): string {
  const key = name
    .normalize('NFKC')
    .toUpperCase()
    .replace(/[\s_.-]/g, '')
    .replace(/^ASTM/, '')
    .replace(/(?<=\d)GR(ADE)?(?=[\dA-Z])/, '');
  const [, plain = key, , tube = ''] = /^(S\d{3})(JR|J0|J2|K2)?(H?)(\+(N|AR|M))?$/.exec(key) ?? [];
  return plain === key ? key : `${plain}${tube}`;
}

const byKey = new Map([...rolled, ...hollow, ...american].map((grade) => [gradeKey(grade.name), grade]));

/** Keys that a near miss is compared with, and the name that is suggested; a standard without its grade suggests one. */
export const gradeNames: readonly (readonly [key: string, name: string])[] = [
  ...[...byKey].map(([key, { name }]) => [key, name] as const),
  ['A572', 'A572 Gr. 50'],
  ['A500', 'A500 Gr. B'],
];

/** The grade of a name, however typed; else the key it was looked up by. A53 alone is its grade B. */
export function gradeNamed(name: string): Grade | string {
  const key = gradeKey(name);
  return byKey.get(key === 'A53' ? 'A53B' : key) ?? key;
}
