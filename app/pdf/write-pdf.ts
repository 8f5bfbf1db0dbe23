import PDFDocument, { type Struct } from 'pdfkit';
import type { Document, Mark, Page, Stroke } from '../../core/sheet/drawing.ts';
import { hatchLines } from '../../core/sheet/hatch.ts';
import { type TextRun, visualRuns } from '../../core/sheet/text-runs.ts';
import { type FontName, fontBytes } from './fonts.ts';
import { type Part, pageParts } from './tag-page.ts';

/** Points of a PDF in one millimetre. */
const POINTS = 72 / 25.4;
/** Stands where no font of ours has the letter. */
const REPLACEMENT = '\ufffd';

type Options = {
  /** Written into the file as its date of creation: handed in, so that the same drawing gives the same bytes. */
  readonly created: Date;
  /** False leaves the page contents readable, for tests. */
  readonly compress?: boolean;
};

/**
 * A drawing document as a PDF: vectors true to scale, text as text in embedded subset fonts, one bookmark a page, title and
 * language stated, and tagged: headings, paragraphs, tables and figures with their words, in reading order. It is not checked
 * against PDF/UA and does not claim it. Page contents are written in millimetres under one scale, so that they can be checked by
 * eye.
 */
export function writePdf(document: Document, options: Options): Promise<Uint8Array> {
  const pdf = new PDFDocument({
    autoFirstPage: false,
    font: null,
    pdfVersion: '1.7',
    lang: document.language,
    displayTitle: true,
    tagged: true,
    compress: options.compress ?? true,
    info: {
      Title: document.title,
      ...(document.author === '' ? {} : { Author: document.author }),
      Creator: 'Shadewright',
      Producer: 'Shadewright',
      CreationDate: options.created,
    },
  });
  const chunks: Uint8Array[] = [];
  const done = new Promise<Uint8Array>((resolve, reject) => {
    pdf.on('data', (chunk) => chunks.push(chunk));
    pdf.on('error', reject);
    pdf.on('end', () => resolve(new Uint8Array(Buffer.concat(chunks))));
  });
  const whole = pdf.struct('Document', { title: document.title });
  pdf.addStructure(whole);
  const pen = new Pen(pdf, whole);
  for (const page of document.pages) pen.page(page);
  whole.end();
  pdf.end();
  return done;
}

/** A stretch of text in one font, ready to be written. */
type TextPiece = {
  readonly font: FontName;
  readonly text: string;
  readonly says: string | null;
  readonly features: { readonly features?: { readonly [tag: string]: boolean } };
};

/** Draws the marks of the display list, one kind a method. */
class Pen {
  readonly #pdf: PDFDocument;
  readonly #known = new Set<FontName>();

  readonly #whole: Struct;

  constructor(pdf: PDFDocument, whole: Struct) {
    this.#pdf = pdf;
    this.#whole = whole;
  }

  page(page: Page): void {
    this.#pdf.addPage({ size: [page.width * POINTS, page.height * POINTS], margin: 0 });
    this.#pdf.outline.addItem(page.title);
    this.#pdf.save().scale(POINTS).lineJoin('miter').lineCap('butt');
    this.#part(pageParts(page), this.#whole);
    this.#pdf.restore();
  }

  /** Draws a part inside the element that it is of. */
  #part(part: Part, parent: Struct): void {
    const marks = part.marks ?? [];
    if (part.tag === 'Artifact') {
      this.#pdf.markContent('Artifact', { type: 'Layout' });
      for (const mark of marks) this.#mark(mark);
      this.#pdf.endMarkedContent();
      return;
    }
    const element = this.#pdf.struct(part.tag, {
      ...(part.title === undefined ? {} : { title: part.title }),
      ...(part.alt === undefined ? {} : { alt: part.alt }),
      ...(part.tag === 'TH' ? { scope: 'Column' as const } : {}),
    });
    parent.add(element);
    if (marks.length > 0)
      element.add(() => {
        for (const mark of marks) this.#mark(mark);
      });
    for (const inner of part.parts ?? []) this.#part(inner, element);
    element.end();
  }

  #mark(mark: Mark): void {
    if (mark.kind === 'path') this.#path(mark);
    else if (mark.kind === 'circle') this.#circle(mark);
    else if (mark.kind === 'text') this.#text(mark);
    else this.#group(mark);
  }

  #path(mark: Extract<Mark, { kind: 'path' }>): void {
    if (mark.fill) {
      this.#trace(mark.runs, mark.closed);
      this.#pdf.fillColor(mark.fill).fill('even-odd');
    }
    if (mark.hatch) {
      const lines = hatchLines(mark.runs, mark.hatch);
      if (lines.length > 0) {
        for (const [x1, y1, x2, y2] of lines) this.#pdf.moveTo(x1, y1).lineTo(x2, y2);
        this.#line(mark.hatch.stroke);
      }
    }
    if (mark.stroke) {
      this.#trace(mark.runs, mark.closed);
      this.#line(mark.stroke);
    }
  }

  #trace(runs: Extract<Mark, { kind: 'path' }>['runs'], closed: boolean): void {
    for (const run of runs) {
      run.forEach(([x, y], i) => {
        if (i === 0) this.#pdf.moveTo(x, y);
        else this.#pdf.lineTo(x, y);
      });
      if (closed && run.length > 0) this.#pdf.closePath();
    }
  }

  /** Strokes the path that was just traced. */
  #line(stroke: Stroke): void {
    this.#pdf.strokeColor(stroke.colour).lineWidth(stroke.width);
    if (stroke.dash) this.#pdf.dash(stroke.dash);
    this.#pdf.stroke();
    if (stroke.dash) this.#pdf.undash();
  }

  #circle(mark: Extract<Mark, { kind: 'circle' }>): void {
    const [x, y] = mark.at;
    if (mark.fill) this.#pdf.circle(x, y, mark.radius).fillColor(mark.fill).fill();
    if (mark.stroke) {
      this.#pdf.circle(x, y, mark.radius);
      this.#line(mark.stroke);
    }
  }

  #group(mark: Extract<Mark, { kind: 'group' }>): void {
    if (!mark.clip) {
      for (const inner of mark.marks) this.#mark(inner);
      return;
    }
    const [x, y, width, height] = mark.clip;
    this.#pdf.save().rect(x, y, width, height).clip();
    for (const inner of mark.marks) this.#mark(inner);
    this.#pdf.restore();
  }

  #text(mark: Extract<Mark, { kind: 'text' }>): void {
    if (mark.text === '') return;
    const pdf = this.#pdf;
    const pieces = visualRuns(mark.text, mark.rtl === true).map((run) => this.#piece(run, mark));
    const whole = mark.anchor === 'start' ? 0 : pieces.reduce((sum, p) => sum + this.#width(p, mark.size), 0);
    const [x, y] = mark.at;
    let pen = mark.anchor === 'middle' ? x - whole / 2 : x - whole;
    if (mark.turn_deg) pdf.save().rotate(-mark.turn_deg, { origin: [x, y] });
    pdf.fillColor(mark.colour);
    pieces.forEach((piece, i) => {
      this.#font(piece.font, mark.size);
      if (piece.says !== null) pdf.markContent('Span', { actual: piece.says });
      pdf.text(piece.text, pen, y, { lineBreak: false, baseline: 'alphabetic', ...piece.features });
      if (piece.says !== null) pdf.endMarkedContent();
      if (i < pieces.length - 1) pen += this.#width(piece, mark.size);
    });
    if (mark.turn_deg) pdf.restore();
  }

  #piece(run: TextRun, mark: Extract<Mark, { kind: 'text' }>): TextPiece {
    const missing = run.script === 'missing';
    return {
      font: run.script === 'house' || missing ? mark.face : run.script,
      text: missing ? REPLACEMENT.repeat([...run.text].length) : run.text,
      // Shaped right-to-left text stands glyph by glyph, and a missing letter as a stand-in: what they say goes beside them.
      says: run.rtl || missing ? run.text : null,
      // Naming features keeps the writer from laying words out one by one, which would put right-to-left words in the wrong order.
      // The house face needs none: its figures are tabular as they are.
      features: run.rtl ? { features: {} } : {},
    };
  }

  #width(piece: TextPiece, size: number): number {
    this.#font(piece.font, size);
    return this.#pdf.widthOfString(piece.text, piece.features);
  }

  #font(name: FontName, size: number): void {
    if (!this.#known.has(name)) {
      this.#pdf.registerFont(name, fontBytes(name));
      this.#known.add(name);
    }
    this.#pdf.font(name).fontSize(size);
  }
}
