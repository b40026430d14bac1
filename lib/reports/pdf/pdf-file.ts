/** A PDF that is written into a stream while its pages are drawn: of a page nothing stays but its place. */
import { once } from 'node:events';
import type { Writable } from 'node:stream';
import { finished } from 'node:stream/promises';
import { setImmediate as breathe } from 'node:timers/promises';
import PDFDocument from 'pdfkit';
import { Canvas, type TextStyle } from './canvas';
import { Face, type EmbeddedFont } from './face';
import { faceNames, type FaceName, type ReportFonts } from './report-fonts';

export interface FileFacts {
  readonly title: string;
  readonly author: string;
  readonly subject: string;
  readonly keywords: string;
  /** Date of the document; null = it names none. */
  readonly made: Date | null;
  /** Width and height, points. */
  readonly paper: readonly [number, number];
}

interface Reference {
  readonly id: number;
  readonly data: Record<string, unknown>;
  write(chunk: string): void;
  end(): void;
}
interface OutlineItem {
  readonly outlineData: Record<string, unknown>;
  addItem(title: string): OutlineItem;
}
/** What of the PDF library is used beyond its typed face: references, the tree of pages, fonts as they are embedded. */
interface Inner {
  readonly _root: { readonly data: { readonly Pages: { readonly data: { Kids: Reference[] } } } };
  readonly _font: EmbeddedFont;
  readonly info: Record<string, unknown>;
  readonly outline: OutlineItem;
  readonly page: {
    readonly dictionary: Reference;
    readonly fonts: Record<string, object>;
    readonly xobjects: Record<string, object>;
  };
  endMetadata: () => void;
  ref(data: Record<string, unknown>): Reference;
  annotate(x: number, y: number, width: number, height: number, options: Record<string, unknown>): void;
}

export interface PdfPage {
  readonly canvas: Canvas;
  /** Where links and bookmarks lead. */
  readonly place: Reference;
}
export type Bookmark = OutlineItem;

/** Enough of a page's top is shown at a bookmark. */
const atTop = (page: Pick<PdfPage, 'place'>) => [page.place, 'XYZ', null, null, null];
const noDate = new Date(Date.UTC(2000, 0, 1));

export class PdfFile {
  readonly faces: Readonly<Record<FaceName, Face>>;
  /** Pages begun so far. */
  pages = 0;
  private readonly doc: PDFKit.PDFDocument;
  private readonly inner: Inner;
  private readonly gone: Promise<void>;
  /** Drawn on every page, known when the last one is: how many there are. */
  private readonly total: Reference;
  private current: PdfPage | null = null;
  private slow = false;

  constructor(
    private readonly sink: Writable,
    fonts: ReportFonts,
    { title, author, subject, keywords, made, paper }: FileFacts,
  ) {
    this.doc = new PDFDocument({
      autoFirstPage: false,
      font: '',
      size: [...paper],
      margin: 0,
      pdfVersion: '1.7',
      lang: 'en-GB',
      displayTitle: true,
      info: {
        Title: title,
        Author: author,
        Subject: subject,
        Keywords: keywords,
        Creator: 'Tallyframe',
        CreationDate: made ?? noDate,
      },
    });
    this.inner = this.doc as unknown as Inner;
    // the library wants one, and would put today's
    if (made === null) {
      delete this.inner.info['CreationDate'];
      this.inner.endMetadata = () => undefined;
    }
    const open = (name: FaceName): Face => {
      this.doc.registerFont(name, Buffer.from(fonts[name]));
      this.doc.font(name);
      return new Face(this.inner._font);
    };
    this.faces = Object.fromEntries(faceNames.map((name) => [name, open(name)])) as Record<FaceName, Face>;
    this.total = this.inner.ref({ Type: 'XObject', Subtype: 'Form', BBox: [0, -20, 60, 20] });
    this.gone = finished(sink);
    // looked at where it is waited for
    this.gone.catch(() => undefined);
    this.doc.on('data', (bytes: Uint8Array) => {
      if (!sink.write(bytes)) this.slow = true;
    });
  }

  /** Begins a page; the one before it is finished. */
  begin(): PdfPage {
    this.finish();
    this.doc.addPage();
    this.pages += 1;
    this.current = { canvas: new Canvas(), place: this.inner.page.dictionary };
    return this.current;
  }

  /** A link from the page at hand to another that has been begun. */
  link(x: number, y: number, width: number, height: number, to: Pick<PdfPage, 'place'>): void {
    this.inner.annotate(x, y, width, height, { Subtype: 'Link', Dest: atTop(to) });
  }

  /** A bookmark to the page at hand, under another where one is given. */
  bookmark(title: string, under?: Bookmark): Bookmark {
    const item = (under ?? this.inner.outline).addItem(title);
    item.outlineData['Dest'] = atTop(this.current!);
    return item;
  }

  /** Has a bookmark lead to the page at hand. */
  aim(bookmark: Bookmark): void {
    bookmark.outlineData['Dest'] = atTop(this.current!);
  }

  /** Draws the number of all pages, which starts at x on a baseline. */
  drawTotal(canvas: Canvas, x: number, y: number): void {
    this.inner.page.xobjects['Total'] = this.total;
    canvas.placed(x, y, 1, () => canvas.op('/Total Do'));
  }

  /** Moves the last pages to stand after the first one. */
  moveBehindFirst(last: number): void {
    const pages = this.inner._root.data.Pages.data;
    const moved = pages.Kids.splice(pages.Kids.length - last, last);
    pages.Kids.splice(1, 0, ...moved);
  }

  /** Waits until what was written has been taken. @throws where whoever reads has gone */
  async keepPace(): Promise<void> {
    await breathe();
    if (!this.slow) {
      if (this.sink.destroyed) await this.gone;
      return;
    }
    this.slow = false;
    await Promise.race([once(this.sink, 'drain'), this.gone]);
  }

  /** Ends the file and the stream. */
  async end(totalStyle: TextStyle): Promise<void> {
    this.finish();
    const canvas = new Canvas();
    // its space before it, that text taken out of the file has it too
    canvas.text(` ${this.pages}`, 0, 0, totalStyle);
    const { id } = totalStyle.face.font;
    this.total.data['Resources'] = { Font: { [id]: totalStyle.face.font.ref() } };
    this.total.write(canvas.content());
    this.total.end();
    this.doc.on('end', () => this.sink.end());
    this.doc.end();
    await this.gone;
  }

  private finish(): void {
    if (!this.current) return;
    const { canvas } = this.current;
    for (const face of canvas.faces) this.inner.page.fonts[face.font.id] = face.font.ref();
    this.doc.addContent(canvas.content());
    this.current = null;
  }
}
