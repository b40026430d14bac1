/** Content laid down the sheets, one thing under another; a sheet that is full is followed by another with the same head. */
import type { Ink } from './ink';
import type { Canvas } from './canvas';
import type { Bookmark, PdfFile, PdfPage } from './pdf-file';
import type { FaceName } from './report-fonts';
import { drawSheet, zonesOf, type BlockFacts, type Paper, type SheetHead, type Zones } from './sheet';
import { wrap } from './wrap';

export interface TextLook {
  readonly face?: FaceName;
  readonly size?: number;
  readonly colour?: Ink;
  /** From line to line. */
  readonly leading?: number;
  readonly indent?: number;
}

export class Flow {
  readonly zones: Zones;
  /** Where the next thing begins. */
  y = 0;
  canvas!: Canvas;
  page!: PdfPage;
  /** Told of every sheet that is begun. */
  onSheet: ((page: PdfPage) => void) | null = null;
  /** A heading that waits for what follows. */
  private waiting: { readonly text: string; readonly note: string | null } | null = null;
  private head: SheetHead = { title: '', note: null, verdict: null, frame: null };
  /** Sheets of the contents, which are drawn last and stand behind the first one. */
  private behindFirst = 0;

  constructor(
    readonly file: PdfFile,
    paper: Paper,
    private readonly facts: BlockFacts,
  ) {
    this.zones = zonesOf(paper);
  }

  get x(): number {
    return this.zones.x;
  }
  get width(): number {
    return this.zones.width;
  }
  /** Height left on the sheet. */
  get room(): number {
    return this.zones.bottom - this.y;
  }
  /** Height of a whole sheet. */
  get whole(): number {
    return this.zones.bottom - this.zones.y;
  }
  /** Number of the page at hand. */
  get number(): number {
    return this.file.pages === 1 ? 1 : this.file.pages + this.behindFirst;
  }

  /** Keeps numbers free behind the first page. */
  reserve(pages: number): void {
    this.behindFirst = pages;
  }

  /** Begins a part on a sheet of its own. @param number the page's, where it isn't the next one */
  part(head: Partial<SheetHead> & { readonly title: string }, number?: number): void {
    if (this.waiting) this.need(0);
    this.head = { note: null, verdict: null, frame: null, ...head };
    this.sheet(this.head, number);
  }

  /** The same part on another sheet. */
  nextSheet(): void {
    const { title, note } = this.head;
    this.sheet({ ...this.head, title, note: note === null ? 'continued' : `${note}, continued` });
  }

  bookmark(title: string, under?: Bookmark): Bookmark {
    return this.file.bookmark(title, under);
  }

  /** Goes to another sheet where so much, under its heading if one waits, does not fit on this one. @returns true where it went */
  need(height: number): boolean {
    if (this.waiting) {
      const { text, note } = this.waiting;
      this.waiting = null;
      this.drawHeading(text, note, height);
      return false;
    }
    if (this.room >= height || this.y <= this.zones.y) return false;
    this.nextSheet();
    return true;
  }

  space(height: number): void {
    this.y = Math.min(this.y + height, this.zones.bottom);
  }

  /** A heading with a note beside or under it; it is drawn with what follows it, on the same sheet. */
  heading(text: string, note: string | null = null): void {
    this.need(0);
    this.waiting = { text, note };
  }

  private drawHeading(text: string, note: string | null, keep: number): void {
    const { sansBold, sans } = this.file.faces;
    const after = sansBold.width(text, 10.5) + 7;
    const beside = note === null || sans.width(note, 8.5) <= this.width - after;
    const under = beside ? [] : wrap(note, sans, 8.5, this.width);
    if (this.y > this.zones.y) this.space(7);
    this.need(17 + 11 * under.length + keep);
    this.y += 9;
    this.canvas.text(text, this.x, this.y, { face: sansBold, size: 10.5 });
    if (beside && note !== null) this.canvas.text(note, this.x + after, this.y, { face: sans, size: 8.5, colour: 'ink2' });
    this.y += 6;
    for (const line of under) {
      this.canvas.text(line, this.x, this.y + 7, { face: sans, size: 8.5, colour: 'ink2' });
      this.y += 11;
    }
  }

  /** Sentences, broken into lines and over sheets. */
  paragraph(text: string, { face = 'sans', size = 9, colour = 'ink', leading = size * 1.38, indent = 0 }: TextLook = {}): void {
    const cut = this.file.faces[face];
    const lines = wrap(text, cut, size, this.width - indent);
    lines.forEach((line, i) => {
      // two lines at least stay together
      this.need(leading * (i === 0 || i === lines.length - 2 ? Math.min(2, lines.length - i) : 1));
      this.canvas.text(line, this.x + indent, this.y + size * 0.95, { face: cut, size, colour });
      this.y += leading;
    });
  }

  /** Sentences each behind a dash. */
  list(items: readonly string[], look: TextLook = {}): void {
    const size = look.size ?? 9;
    for (const item of items) {
      this.need(size * 1.38);
      this.canvas.text('–', this.x, this.y + size * 0.95, { face: this.file.faces.sans, size, colour: 'ink2' });
      this.paragraph(item, { ...look, indent: 11 });
      this.space(1.5);
    }
  }

  private sheet(head: SheetHead, number?: number): void {
    this.page = this.file.begin();
    this.canvas = this.page.canvas;
    this.onSheet?.(this.page);
    drawSheet(this.file, this.canvas, this.zones, this.facts, head, number ?? this.number);
    this.y = this.zones.y;
  }
}
