/** The mark of the product as cells of a table: mail programs show neither SVG nor, unasked, pictures from elsewhere. */

const size = 32;
const rowsFrom = 2;
const rowsTo = 30;

/** Whether the mark's ink covers the middle of a cell: four uprights, and a brace at 30° that passes in front with a gap. */
function inked(x: number, y: number): boolean {
  const [px, py] = [x + 0.5, y + 0.5];
  // Distance from the brace, a line through (1, 24.66) and (31, 7.34).
  const distance = Math.abs((px - 1) * 0.5 + (py - 24.66) * (Math.sqrt(3) / 2));
  if (px > 0.5 && px < 31.5 && distance < 1.5) return true;
  if (distance < 3) return false;
  return py > 3 && py < 29 && [5.5, 12.5, 19.5, 26.5].some((at) => Math.abs(px - at) < 1.5);
}

/** A table of 32 × 28 cells of one pixel, runs of one colour in one cell. */
export function letterMark(): string {
  const rows: string[] = [];
  for (let y = rowsFrom; y < rowsTo; y++) {
    const cells: string[] = [];
    for (let x = 0; x < size;) {
      const ink = inked(x, y);
      let run = 1;
      while (x + run < size && inked(x + run, y) === ink) run++;
      cells.push(`<td colspan="${run}" width="${run}" height="1"${ink ? ' class="m" bgcolor="#12212d"' : ''}></td>`);
      x += run;
    }
    rows.push(`<tr>${cells.join('')}</tr>`);
  }
  const columns = `<tr>${'<td width="1" height="1"></td>'.repeat(size)}</tr>`;
  return (
    `<table role="presentation" width="${size}" cellpadding="0" cellspacing="0" border="0" aria-hidden="true" ` +
    `style="border-collapse:collapse;table-layout:fixed;width:${size}px;font-size:0;line-height:0">${columns}${rows.join('')}</table>`
  );
}
