import type { Face, Mark, Mm, Page, Stroke } from './drawing.ts';
import { hatchLines } from './hatch.ts';

/** What the house face is called in a stylesheet, and what stands in where it is not installed. */
const FAMILY = "'IBM Plex Sans','Noto Sans JP','Noto Sans Arabic','Noto Sans Hebrew',sans-serif";
const FACE: { readonly [F in Face]: string } = {
  regular: '',
  semibold: ' font-weight="600"',
  italic: ' font-style="italic"',
};

/** A length to a thousandth of a millimetre, without trailing noughts and without −0. */
const mm = (v: Mm): string => {
  const r = Math.round(v * 1000) / 1000;
  return String(r === 0 ? 0 : r);
};

/** Whether XML 1.0 allows a code point (its production 2, `Char`). */
const inXml = (point: number): boolean =>
  point === 0x9 ||
  point === 0xa ||
  point === 0xd ||
  (point >= 0x20 && point <= 0xd7ff) ||
  (point >= 0xe000 && point <= 0xfffd) ||
  point >= 0x10000;

const ENTITY: { readonly [letter: string]: string } = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

/** Text for an XML file: what XML forbids is dropped, what has a meaning in it is written as an entity. */
export const xmlText = (text: string): string =>
  [...text]
    .filter((letter) => inXml(letter.codePointAt(0) ?? 0))
    .map((letter) => ENTITY[letter] ?? letter)
    .join('');

const lineStyle = (s: Stroke | undefined): string =>
  s === undefined
    ? ''
    : ` stroke="${s.colour}" stroke-width="${mm(s.width)}"${s.dash ? ` stroke-dasharray="${s.dash.map(mm).join(' ')}"` : ''}`;

const pathData = (runs: readonly (readonly (readonly [Mm, Mm])[])[], closed: boolean): string =>
  runs
    .map((run) => run.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${mm(x)} ${mm(y)}`).join('') + (closed ? 'Z' : ''))
    .join('');

function markSvg(mark: Mark, clips: string[]): string {
  switch (mark.kind) {
    case 'path': {
      const out: string[] = [];
      const d = pathData(mark.runs, mark.closed);
      const hatched = mark.hatch ? hatchLines(mark.runs, mark.hatch) : [];
      if (mark.fill) out.push(`<path d="${d}" fill="${mark.fill}" fill-rule="evenodd"/>`);
      if (mark.hatch && hatched.length > 0) {
        const lines = pathData(
          hatched.map(
            ([x1, y1, x2, y2]) =>
              [
                [x1, y1],
                [x2, y2],
              ] as const,
          ),
          false,
        );
        out.push(`<path d="${lines}" fill="none"${lineStyle(mark.hatch.stroke)}/>`);
      }
      if (mark.stroke) out.push(`<path d="${d}" fill="none"${lineStyle(mark.stroke)}/>`);
      return out.join('');
    }
    case 'circle':
      return `<circle cx="${mm(mark.at[0])}" cy="${mm(mark.at[1])}" r="${mm(mark.radius)}" fill="${mark.fill ?? 'none'}"${lineStyle(mark.stroke)}/>`;
    case 'text': {
      const [x, y] = mark.at;
      const turn = mark.turn_deg ? ` transform="rotate(${mm(-mark.turn_deg)} ${mm(x)} ${mm(y)})"` : '';
      const figures = mark.tabular ? ' font-feature-settings="&quot;tnum&quot;"' : '';
      // An isolate and not `direction`: with it, renderers disagree on which end an anchor is. Anchors here are left and right.
      const text = mark.rtl ? `\u2067${mark.text}\u2069` : mark.text;
      return `<text x="${mm(x)}" y="${mm(y)}" font-size="${mm(mark.size)}"${FACE[mark.face]} fill="${mark.colour}" text-anchor="${mark.anchor}"${figures}${turn}>${xmlText(text)}</text>`;
    }
    case 'group': {
      const inner = mark.marks.map((m) => markSvg(m, clips)).join('\n');
      const label = mark.label ? ` aria-label="${xmlText(mark.label)}"` : '';
      if (!mark.clip) return `<g${label}>\n${inner}\n</g>`;
      const [x, y, width, height] = mark.clip;
      const id = `clip${clips.length + 1}`;
      clips.push(
        `<clipPath id="${id}"><rect x="${mm(x)}" y="${mm(y)}" width="${mm(width)}" height="${mm(height)}"/></clipPath>`,
      );
      return `<g${label} clip-path="url(#${id})">\n${inner}\n</g>`;
    }
  }
}

/**
 * One page as an SVG drawing that is true to scale: its width and height are stated in millimetres and one unit is one
 * millimetre.
 * @param fontFaceCss  `@font-face` rules to carry the house face inside the file, where it must look alike on any machine
 */
export function pageToSvg(page: Page, fontFaceCss?: string): string {
  const clips: string[] = [];
  const body = page.marks.map((m) => markSvg(m, clips)).join('\n');
  const size = `width="${mm(page.width)}mm" height="${mm(page.height)}mm" viewBox="0 0 ${mm(page.width)} ${mm(page.height)}"`;
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<svg xmlns="http://www.w3.org/2000/svg" ${size} font-family="${FAMILY}" xml:space="preserve" role="img">`,
    `<title>${xmlText(page.title)}</title>`,
    ...(fontFaceCss ? [`<style>${xmlText(fontFaceCss).replace(/&quot;/gu, '"')}</style>`] : []),
    ...(clips.length > 0 ? [`<defs>${clips.join('')}</defs>`] : []),
    `<rect width="${mm(page.width)}" height="${mm(page.height)}" fill="#ffffff"/>`,
    body,
    '</svg>',
    '',
  ].join('\n');
}
