/** Content of one page or form: operators of the PDF imaging model, x to the right and y down from the top left corner, points. */
import { ink, type Ink } from './ink';
import type { Face } from './face';

export interface Pen {
  readonly colour?: Ink;
  readonly width?: number;
  readonly dash?: readonly number[];
  readonly round?: boolean;
}
export interface TextStyle {
  readonly face: Face;
  readonly size: number;
  readonly colour?: Ink;
  /** Where x stands in the text. Default start. */
  readonly anchor?: 'start' | 'middle' | 'end';
  /** Clockwise as seen, degrees. */
  readonly turn?: number;
  /** The sheet is laid bare behind the text, so far around it. */
  readonly halo?: number;
}

/** A number as PDF writes it: two decimals, never an exponent. */
export const num = (value: number): string => (Number.isFinite(value) ? String(Math.round(value * 100) / 100) : '0');
const fine = (value: number): string => String(Math.round(value * 1e5) / 1e5);

const rgb = (name: Ink): string => {
  const hex = ink[name];
  return [1, 3, 5].map((i) => fine(parseInt(hex.slice(i, i + 2), 16) / 255)).join(' ');
};

export class Canvas {
  private readonly out: string[] = [];
  /** Fonts that the content names. */
  readonly faces = new Set<Face>();

  /** Everything so far. */
  content(): string {
    return this.out.join('\n');
  }

  op(operators: string): void {
    this.out.push(operators);
  }

  /** What `draw` draws, moved and enlarged; nothing of its state stays. */
  placed(x: number, y: number, scale: number, draw: () => void): void {
    this.op(`q ${fine(scale)} 0 0 ${fine(scale)} ${num(x)} ${num(y)} cm`);
    draw();
    this.op('Q');
  }

  line(x1: number, y1: number, x2: number, y2: number, pen: Pen = {}): void {
    this.op(`${this.pen(pen)} ${num(x1)} ${num(y1)} m ${num(x2)} ${num(y2)} l S`);
  }

  rect(x: number, y: number, width: number, height: number, look: { readonly fill?: Ink; readonly pen?: Pen }): void {
    this.shape(`${num(x)} ${num(y)} ${num(width)} ${num(height)} re`, look);
  }

  circle(x: number, y: number, r: number, look: { readonly fill?: Ink; readonly pen?: Pen }): void {
    const k = r * 0.5523;
    const to = (...points: number[]) => `${points.map(num).join(' ')} c`;
    this.shape(
      [
        `${num(x + r)} ${num(y)} m`,
        to(x + r, y + k, x + k, y + r, x, y + r),
        to(x - k, y + r, x - r, y + k, x - r, y),
        to(x - r, y - k, x - k, y - r, x, y - r),
        to(x + k, y - r, x + r, y - k, x + r, y),
        'h',
      ].join(' '),
      look,
    );
  }

  /** Paints path operators. */
  shape(operators: string, { fill, pen }: { readonly fill?: Ink; readonly pen?: Pen }): void {
    if (operators === '') return;
    this.op(`${fill ? `${rgb(fill)} rg ` : ''}${pen ? `${this.pen(pen)} ` : ''}${operators} ${fill ? (pen ? 'B' : 'f') : 'S'}`);
  }

  /** Draws within a path only. */
  clipped(operators: string, draw: () => void): void {
    this.op(`q ${operators} W n`);
    draw();
    this.op('Q');
  }

  /** One line of text on its baseline. */
  text(
    text: string,
    x: number,
    y: number,
    { face, size, colour = 'ink', anchor = 'start', turn = 0, halo = 0 }: TextStyle,
  ): void {
    if (text === '') return;
    this.faces.add(face);
    const back = anchor === 'start' ? 0 : face.width(text, size) * (anchor === 'end' ? 1 : 0.5);
    const [c, s] = [Math.cos((turn * Math.PI) / 180), Math.sin((turn * Math.PI) / 180)];
    const at = `${fine(c)} ${fine(s)} ${fine(s)} ${fine(-c)} ${num(x - back * c)} ${num(y - back * s)} Tm`;
    const shown = face.show(text);
    const font = `/${face.font.id} ${fine(size)} Tf`;
    if (halo > 0) {
      const [width, high] = [face.width(text, size) + 2 * halo, size * 0.74 + 2 * halo];
      const corner = `${fine(c)} ${fine(s)} ${fine(-s)} ${fine(c)} ${num(x - back * c)} ${num(y - back * s)} cm`;
      this.op(`q ${corner} ${rgb('white')} rg ${num(-halo)} ${num(halo - high)} ${num(width)} ${num(high)} re f Q`);
    }
    this.op(`BT ${rgb(colour)} rg ${font} 0 Tr ${at} ${shown} ET`);
  }

  private pen({ colour = 'ink', width = 0.75, dash = [], round = false }: Pen): string {
    return `${rgb(colour)} RG ${fine(width)} w [${dash.map(num).join(' ')}] 0 d ${round ? '1 J 1 j' : '0 J 0 j'}`;
  }
}
