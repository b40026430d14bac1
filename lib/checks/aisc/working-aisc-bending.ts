import { symbol, text, type WorkingLine } from '../working-parts';
import { lateralBuckling } from './working-aisc-lateral';
import { localBuckling } from './working-aisc-local';
import { availableLine, equals, F_y, line, plateLine, times, type Sheet } from './working-aisc-parts';

const M_n = symbol('M', 'n');
const M_p = symbol('M', 'p');

/** Bending by F2, F3, F6, F7 or F8. */
export function bendingLines(sheet: Sheet): readonly WorkingLine[] {
  const clause = sheet.word('clause') ?? '';
  return [
    line('required strength', sheet.given([symbol('M', 'r'), 'Mr', 'moment'])),
    plastic(sheet, clause),
    ...plateLine(sheet, clause === 'F8' ? 'wall D/t' : 'flange', 'flange', 'Table B4.1b'),
    ...plateLine(sheet, 'web', 'web', 'Table B4.1b'),
    ...localBuckling(sheet, clause),
    ...lateralBuckling(sheet, clause),
    line('nominal strength, the smallest', [M_n, equals, ...sheet.shown('Mn', 'moment')], clause),
    availableLine(sheet, 'M', ['Mn', 'Mc'], 'moment'),
  ];
}

function plastic(sheet: Sheet, clause: string): WorkingLine {
  const product = [F_y, symbol('Z'), equals, ...sheet.shown('Fy', 'stress'), times, ...sheet.shown('Z', 'modulus')];
  const capped =
    clause === 'F6' ? [text('≤ 1.6'), F_y, symbol('S'), equals, text('1.6 ·'), ...sheet.shown('Fy', 'stress'), times, ...sheet.shown('S', 'modulus'), text(':'), M_p] : []; // prettier-ignore
  const source = clause === 'F3' ? '(F2-1)' : `(${clause}-1)`;
  return line('plastic moment', [M_p, equals, ...product, ...capped, equals, ...sheet.shown('Mp', 'moment')], source);
}
