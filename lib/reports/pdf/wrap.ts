import type { Face } from './face';

/** A text in lines no wider than a width: broken between words, and within a word only where it is wider than a line. */
export function wrap(text: string, face: Face, size: number, width: number): string[] {
  const lines: string[] = [];
  for (const paragraph of text.split('\n')) {
    let line = '';
    for (const word of paragraph.split(' ')) {
      const longer = line === '' ? word : `${line} ${word}`;
      if (face.width(longer, size) <= width) {
        line = longer;
        continue;
      }
      if (line !== '') lines.push(line);
      line = word;
      while (face.width(line, size) > width) {
        const fits = fitting(line, face, size, width);
        if (fits.length === line.length) break;
        lines.push(fits);
        line = line.slice(fits.length);
      }
    }
    lines.push(line);
  }
  return lines;
}

/** The longest start of a word that fits, one letter at least. */
function fitting(word: string, face: Face, size: number, width: number): string {
  let fits = '';
  for (const letter of word) {
    if (fits !== '' && face.width(fits + letter, size) > width) break;
    fits += letter;
  }
  return fits;
}

/** A text cut to a width, "…" where something is left out: only for what is written whole elsewhere. */
export function cut(text: string, face: Face, size: number, width: number): string {
  if (face.width(text, size) <= width) return text;
  return `${fitting(text, face, size, width - face.width('…', size)).trimEnd()}…`;
}
