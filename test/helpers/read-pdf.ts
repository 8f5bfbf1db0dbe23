import { getDocument, OPS } from 'pdfjs-dist/legacy/build/pdf.mjs';

export type ReadPath = {
  /** Runs of corners in millimetres from the page's top left, y down; curves give their end points. */
  readonly runs: readonly (readonly (readonly [number, number])[])[];
  readonly painted: 'fill' | 'stroke' | 'other';
  readonly fill: string;
  readonly stroke: string;
};
export type ReadText = { readonly text: string; readonly x: number; readonly y: number; readonly size: number };
export type ReadPage = {
  readonly width: number;
  readonly height: number;
  readonly texts: readonly ReadText[];
  readonly paths: readonly ReadPath[];
};
export type ReadPdf = {
  readonly title: string;
  readonly language: string | null;
  readonly bookmarks: readonly string[];
  readonly pages: readonly ReadPage[];
};

const MM = 25.4 / 72;
type Matrix = readonly [number, number, number, number, number, number];
const times = (m: Matrix, n: Matrix): Matrix => [
  m[0] * n[0] + m[2] * n[1],
  m[1] * n[0] + m[3] * n[1],
  m[0] * n[2] + m[2] * n[3],
  m[1] * n[2] + m[3] * n[3],
  m[0] * n[4] + m[2] * n[5] + m[4],
  m[1] * n[4] + m[3] * n[5] + m[5],
];

/** Opens a PDF with a reader that knows nothing of how it was written. */
export async function readPdf(bytes: Uint8Array): Promise<ReadPdf> {
  const pdf = await getDocument({ data: bytes.slice(), useSystemFonts: false, verbosity: 0 }).promise;
  const meta = await pdf.getMetadata();
  const info = meta.info as { readonly Title?: string; readonly Language?: string };
  const outline = (await pdf.getOutline()) ?? [];
  const pages: ReadPage[] = [];
  for (let n = 1; n <= pdf.numPages; n++) pages.push(await readPage(await pdf.getPage(n)));
  await pdf.loadingTask.destroy();
  return { title: info.Title ?? '', language: info.Language ?? null, bookmarks: outline.map((o) => o.title), pages };
}

type PdfPage = Awaited<ReturnType<Awaited<ReturnType<typeof getDocument>['promise']>['getPage']>>;

async function readPage(page: PdfPage): Promise<ReadPage> {
  const [x0 = 0, y0 = 0, x1 = 0, y1 = 0] = page.view;
  const height = (y1 - y0) * MM;
  const onPage = (x: number, y: number): readonly [number, number] => [(x - x0) * MM, height - (y - y0) * MM];
  const content = await page.getTextContent();
  const texts = content.items.flatMap((item) => {
    if (!('str' in item) || item.str === '') return [];
    const t = item.transform as unknown as Matrix;
    const [x, y] = onPage(t[4], t[5]);
    return [{ text: item.str, x, y, size: Math.hypot(t[2], t[3]) * MM }];
  });
  const list = await page.getOperatorList();
  const paths: ReadPath[] = [];
  let now: { m: Matrix; fill: string; stroke: string } = { m: [1, 0, 0, 1, 0, 0], fill: '#000000', stroke: '#000000' };
  const stack: (typeof now)[] = [];
  list.fnArray.forEach((op, i) => {
    const args = list.argsArray[i];
    if (op === OPS.save) stack.push(now);
    else if (op === OPS.restore) now = stack.pop() ?? now;
    else if (op === OPS.transform) now = { ...now, m: times(now.m, args as unknown as Matrix) };
    else if (op === OPS.setFillRGBColor) now = { ...now, fill: colour(args) };
    else if (op === OPS.setStrokeRGBColor) now = { ...now, stroke: colour(args) };
    else if (op === OPS.constructPath) {
      const paint = args[0] as number;
      const runs = corners(args[1][0] as Float32Array | null).map((run) =>
        run.map(([x, y]) => onPage(now.m[0] * x + now.m[2] * y + now.m[4], now.m[1] * x + now.m[3] * y + now.m[5])),
      );
      const painted = paint === OPS.fill || paint === OPS.eoFill ? 'fill' : paint === OPS.stroke ? 'stroke' : 'other';
      paths.push({ runs, painted, fill: now.fill, stroke: now.stroke });
    }
  });
  return { width: (x1 - x0) * MM, height, texts, paths };
}

const colour = (args: unknown): string =>
  typeof (args as unknown[])[0] === 'string'
    ? ((args as string[])[0] as string)
    : `#${(args as number[]).map((v) => Math.round(v).toString(16).padStart(2, '0')).join('')}`;

/** The corners of a path as the reader holds it: 0 move x y, 1 line x y, 2 curve of three points, 3 curve of two, 4 close. */
function corners(data: Float32Array | null): [number, number][][] {
  const runs: [number, number][][] = [];
  let i = 0;
  const at = (k: number): number => data?.[k] as number;
  while (data && i < data.length) {
    const op = at(i++);
    if (op === 0) runs.push([[at(i), at(i + 1)]]);
    const size = op === 0 || op === 1 ? 2 : op === 2 ? 6 : op === 3 ? 4 : 0;
    if (op !== 0 && op !== 4) runs.at(-1)?.push([at(i + size - 2), at(i + size - 1)]);
    i += size;
  }
  return runs;
}
