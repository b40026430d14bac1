import type { Mark } from '@/lib/reports/marked-copy/marks';
import { beforeEnd, prefixOf, xmlText } from '@/lib/reports/xml-text';

const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const author = 'Tallyframe';

/** A comments part with nothing in it yet. */
export const plainComments = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<comments xmlns="${main}"><authors></authors><commentList></commentList></comments>`;

/** Adds the marks' notes to a sheet's comments; a cell that already has one gets the words after its own. */
export function withNotes(xml: string, marks: readonly Mark[]): string | null {
  const p = prefixOf(xml, 'comments');
  const authors = [...xml.matchAll(new RegExp(`<${p}author(?:\\s[^>]*)?(?:>[^<]*</${p}author\\s*>|/>)`, 'g'))].length;
  let patched = beforeEnd(xml, 'authors', `<${p}author>${author}</${p}author>`);
  const fresh: string[] = [];
  const noted = notedCells(xml);
  for (const mark of marks) {
    const words = (text: string): string => `<${p}r><${p}t xml:space="preserve">${xmlText(text)}</${p}t></${p}r>`;
    const own = new RegExp(`(<${p}comment\\s[^>]*ref="${mark.address}"[^>]*>[\\s\\S]*?)(</${p}text\\s*>)`);
    if (patched !== null && noted.has(mark.address)) {
      patched = patched.replace(own, (_, before: string, end: string) => `${before}${words(`\n\n${mark.note}`)}${end}`);
    } else {
      fresh.push(
        `<${p}comment ref="${mark.address}" authorId="${authors}"><${p}text>${words(mark.note)}</${p}text></${p}comment>`,
      );
    }
  }
  return patched === null ? null : beforeEnd(patched, 'commentList', fresh.join(''));
}

/** A drawing with nothing in it yet: older spreadsheets show a note by a shape in it. */
export const plainDrawing = `<xml xmlns:v="urn:schemas-microsoft-com:vml" xmlns:o="urn:schemas-microsoft-com:office:office" xmlns:x="urn:schemas-microsoft-com:office:excel"><o:shapelayout v:ext="edit"><o:idmap v:ext="edit" data="1"/></o:shapelayout><v:shapetype id="_x0000_t202" coordsize="21600,21600" o:spt="202" path="m,l,21600r21600,l21600,xe"><v:stroke joinstyle="miter"/><v:path gradientshapeok="t" o:connecttype="rect"/></v:shapetype></xml>`;

/** Adds the shapes of the notes to a sheet's drawing of them. */
export function withShapes(xml: string, marks: readonly Mark[]): string | null {
  const shapes = marks.map(
    ({ row, column }, i) =>
      `<v:shape xmlns:v="urn:schemas-microsoft-com:vml" xmlns:o="urn:schemas-microsoft-com:office:office" xmlns:x="urn:schemas-microsoft-com:office:excel" id="_x0000_s${90_000 + i}" type="#_x0000_t202" style="position:absolute;width:220pt;height:80pt;z-index:${i + 1};visibility:hidden" fillcolor="#ffffe1" o:insetmode="auto"><v:fill color2="#ffffe1"/><v:shadow on="t" color="black" obscured="t"/><v:path o:connecttype="none"/><v:textbox style="mso-direction-alt:auto"><div style="text-align:left"></div></v:textbox><x:ClientData ObjectType="Note"><x:MoveWithCells/><x:SizeWithCells/><x:Anchor>${column + 1}, 15, ${Math.max(0, row - 2)}, 10, ${column + 5}, 15, ${row + 3}, 4</x:Anchor><x:AutoFill>False</x:AutoFill><x:Row>${row - 1}</x:Row><x:Column>${column}</x:Column></x:ClientData></v:shape>`,
  );
  const end = /<\/xml\s*>\s*$/.exec(xml);
  return end ? xml.slice(0, end.index) + shapes.join('') + xml.slice(end.index) : null;
}

/** Cells that a comments part already has a note for. */
export function notedCells(xml: string): ReadonlySet<string> {
  return new Set([...xml.matchAll(/<(?:\w+:)?comment\s[^>]*ref="([A-Z]+\d+)"/g)].map((m) => m[1] ?? ''));
}
