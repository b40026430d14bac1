import { getDocument, VerbosityLevel } from 'pdfjs-dist/legacy/build/pdf.mjs';

interface OutlineRead {
  readonly title: string;
  /** From 1. */
  readonly page: number;
  readonly items: readonly OutlineRead[];
}
export interface PdfRead {
  /** Text of each page, in the order it is drawn. */
  readonly pages: readonly string[];
  readonly sizes: readonly (readonly [number, number])[];
  readonly outline: readonly OutlineRead[];
  /** Pages that links of the second page lead to. */
  readonly links: readonly number[];
  readonly info: object;
}

/** A PDF taken apart by another library than the one that made it. For tests. */
export async function readPdf(bytes: Uint8Array): Promise<PdfRead> {
  const pdf = await getDocument({ data: new Uint8Array(bytes), verbosity: VerbosityLevel.ERRORS, useSystemFonts: false }).promise;
  type Destination = Parameters<typeof pdf.getPageIndex>[0];
  type Item = Awaited<ReturnType<typeof pdf.getOutline>>[number];
  const pageOf = async (dest: Item['dest']): Promise<number> =>
    (await pdf.getPageIndex((dest as unknown[])[0] as Destination)) + 1;
  const outlineOf = async (items: readonly Item[]): Promise<OutlineRead[]> =>
    Promise.all(items.map(async ({ title, dest, items: under }) => ({ title, page: await pageOf(dest), items: await outlineOf(under as Item[]) }))); // prettier-ignore
  const pages: string[] = [];
  const sizes: [number, number][] = [];
  const links: number[] = [];
  for (let number = 1; number <= pdf.numPages; number++) {
    const page = await pdf.getPage(number);
    const { items } = await page.getTextContent();
    pages.push(
      linesOf(
        items.flatMap((item) =>
          'str' in item && item.str.trim() !== '' ? [{ text: item.str, y: Number(item.transform[5]) }] : [],
        ),
      ),
    );
    const { width, height } = page.getViewport({ scale: 1 });
    sizes.push([Math.round(width), Math.round(height)]);
    if (number === 2)
      for (const { dest } of (await page.getAnnotations()) as readonly { dest: Item['dest'] }[]) links.push(await pageOf(dest));
  }
  const { info } = await pdf.getMetadata();
  const outline = await outlineOf(await pdf.getOutline());
  await pdf.destroy();
  return { pages, sizes, outline, links, info };
}

/** Pieces in the order they are drawn: what stands on one baseline is a line. */
function linesOf(pieces: readonly { readonly text: string; readonly y: number }[]): string {
  return pieces
    .map(({ text, y }, i) => (i === 0 ? '' : Math.abs(pieces[i - 1]!.y - y) < 0.5 ? ' ' : '\n') + text.trim())
    .join('');
}

/** Frames on the contents with the page that stands behind each. */
export function contentsPlaces(text: string): Map<string, number> {
  return new Map([...text.matchAll(/^(\S+)(?: .*)? (\d+)$/gm)].map(([, id = '', page]) => [id, Number(page)]));
}
