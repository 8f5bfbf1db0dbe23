/**
 * The part of pdfkit 0.20 that this house draws with. The package ships no usable types, and the published ones lag it.
 */
declare module 'pdfkit' {
  type TextOptions = {
    readonly lineBreak: false;
    readonly baseline: 'alphabetic';
    readonly features?: { readonly [tag: string]: boolean };
  };

  export class Struct {
    add(child: Struct | (() => void)): this;
    end(): void;
  }

  export default class PDFDocument {
    constructor(options: {
      readonly autoFirstPage: false;
      readonly font: string | null;
      readonly pdfVersion: '1.7';
      readonly lang: string;
      readonly displayTitle: boolean;
      readonly tagged?: boolean;
      readonly compress?: boolean;
      readonly info: { readonly [key: string]: string | Date };
    });
    readonly outline: { addItem(title: string): unknown };
    registerFont(name: string, source: Uint8Array): this;
    addPage(options: { readonly size: readonly [number, number]; readonly margin: number }): this;
    font(name: string): this;
    fontSize(size: number): this;
    widthOfString(text: string, options?: { readonly features?: { readonly [tag: string]: boolean } }): number;
    text(text: string, x: number, y: number, options: TextOptions): this;
    markContent(tag: 'Span', options: { readonly actual: string }): this;
    markContent(tag: 'Artifact', options: { readonly type: 'Layout' }): this;
    struct(
      type: string,
      options?: { readonly title?: string; readonly alt?: string; readonly scope?: 'Column' },
    ): Struct;
    addStructure(structure: Struct): this;
    endMarkedContent(): this;
    save(): this;
    restore(): this;
    scale(factor: number): this;
    rotate(degrees: number, options: { readonly origin: readonly [number, number] }): this;
    moveTo(x: number, y: number): this;
    lineTo(x: number, y: number): this;
    closePath(): this;
    rect(x: number, y: number, width: number, height: number): this;
    circle(x: number, y: number, radius: number): this;
    clip(rule?: 'even-odd'): this;
    fill(rule?: 'even-odd'): this;
    stroke(): this;
    fillColor(colour: string): this;
    strokeColor(colour: string): this;
    lineWidth(width: number): this;
    lineCap(cap: 'butt' | 'round'): this;
    lineJoin(join: 'miter' | 'round'): this;
    dash(pattern: readonly number[], options?: { readonly phase: number }): this;
    undash(): this;
    on(event: 'data', heard: (chunk: Uint8Array) => void): this;
    on(event: 'end', heard: () => void): this;
    on(event: 'error', heard: (fault: Error) => void): this;
    end(): void;
  }
}
