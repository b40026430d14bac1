import { type DecimalMark, decimalMarkShown } from '@/lib/units/read-number';

/** Enough of them settle a file; looking at more would only take time. */
const enough = 2_000;

/** Counts the numbers of one file that can be read one way only. */
export class DecimalMarks {
  private comma = 0;
  private point = 0;

  see(text: string): void {
    if (this.comma + this.point >= enough) return;
    const start = text.charCodeAt(0);
    // a digit, a sign, a blank or a mark: texts that begin otherwise are no numbers
    if (start > 57 && start !== 0x2212 && start !== 0xa0) return;
    if (!text.includes(',') && !text.includes('.')) return;
    const mark = decimalMarkShown(text);
    if (mark === ',') this.comma += 1;
    else if (mark === '.') this.point += 1;
  }

  /** The mark that all of them show; null where there are none or they differ. */
  agreed(): DecimalMark | null {
    if (this.comma > 0) return this.point > 0 ? null : ',';
    return this.point > 0 ? '.' : null;
  }

  /** The mark that most of them show. */
  most(): DecimalMark | null {
    if (this.comma > this.point) return ',';
    return this.point > 0 ? '.' : null;
  }
}
