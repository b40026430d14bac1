import type { Check } from '@/lib/results/result';
import { fraction, symbol, text, type Printer, type WorkingLine } from '../working-parts';
import { flexuralLines, tensionLines, torsionalLines } from './working-aisc-axial';
import { bendingLines } from './working-aisc-bending';
import { roundShearLines, shearLines } from './working-aisc-shear';
import { slenderLines } from './working-aisc-slender';
import { equals, line, sheetOf, times, type Sheet } from './working-aisc-parts';

/** The calculation of one row of AISC 360-22, from the check's inputs only; null where the check is none of it. */
export function aiscWorking(check: Check, print: Printer): readonly WorkingLine[] | null {
  if (!check.reference.startsWith('AISC 360-22')) return null;
  const sheet = sheetOf(check, print);
  switch (sheet.word('clause')) {
    case 'D2':
      return tensionLines(sheet);
    case 'E3':
      return flexuralLines(sheet);
    case 'E4':
      return torsionalLines(sheet);
    case 'E7':
      return slenderLines(sheet);
    case 'F2':
    case 'F3':
    case 'F6':
    case 'F7':
    case 'F8':
      return bendingLines(sheet);
    case 'G2':
    case 'G4':
    case 'G6':
      return shearLines(sheet);
    case 'G5':
      return roundShearLines(sheet);
    case 'H1.1':
    case 'H1.2':
      return combinedLines(sheet);
    default:
      return [];
  }
}

function combinedLines(sheet: Sheet): readonly WorkingLine[] {
  const [P_r, P_c, M_r, M_c] = [symbol('P', 'r'), symbol('P', 'c'), symbol('M', 'r'), symbol('M', 'c')];
  const high = (sheet.number('axial') ?? 0) >= 0.2;
  const axial = [...sheet.shown('axial', 'number')];
  const bending = [...sheet.shown('bending', 'number')];
  return [
    line(
      `axial force, by ${sheet.word('axialClause') ?? ''}`,
      [fraction([P_r], [P_c]), equals, fraction(sheet.shown('Pr', 'force'), sheet.shown('Pc', 'force')), equals, ...axial],
    ),
    line(
      `bending, by ${sheet.word('bendingClause') ?? ''}`,
      [fraction([M_r], [M_c]), equals, fraction(sheet.shown('Mr', 'moment'), sheet.shown('Mc', 'moment')), equals, ...bending],
    ),
    high
      ? line(
          'together, from 0.2',
          [fraction([P_r], [P_c]), text('+'), fraction([text('8')], [text('9')]), fraction([M_r], [M_c]), equals, ...axial, text('+'), fraction([text('8')], [text('9')]), times, ...bending, equals, ...sheet.result('sum', 'number')],
          '(H1-1a)',
        )
      : line(
          'together, below 0.2',
          [fraction([P_r], [text('2'), P_c]), text('+'), fraction([M_r], [M_c]), equals, fraction(axial, [text('2')]), text('+'), ...bending, equals, ...sheet.result('sum', 'number')],
          '(H1-1b)',
        ),
  ]; // prettier-ignore
}
