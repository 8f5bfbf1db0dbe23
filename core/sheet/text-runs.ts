import { hasGlyph } from './measure.ts';

/** Which font a stretch of text is set in: the house face, or the one that is called in for a script it lacks. */
export type Script = 'house' | 'cjk' | 'arabic' | 'hebrew' | 'missing';
/** A stretch of text in one script, in reading order. */
export type TextRun = { readonly text: string; readonly script: Script; readonly rtl: boolean };

const inRange = (p: number, ranges: readonly (readonly [number, number])[]): boolean =>
  ranges.some(([a, b]) => p >= a && p <= b);
const HEBREW = [
  [0x0590, 0x05ff],
  [0xfb1d, 0xfb4f],
] as const;
const ARABIC = [
  [0x0600, 0x06ff],
  [0x0750, 0x077f],
  [0x08a0, 0x08ff],
  [0xfb50, 0xfdff],
  [0xfe70, 0xfeff],
] as const;
const CJK = [
  [0x2e80, 0x303f],
  [0x3040, 0x30ff],
  [0x3100, 0x312f],
  [0x31f0, 0x31ff],
  [0x3400, 0x4dbf],
  [0x4e00, 0x9fff],
  [0xf900, 0xfaff],
  [0xff00, 0xffef],
] as const;

/** Whether a code point belongs to a script that is read from right to left. */
export const isRtl = (point: number): boolean => inRange(point, HEBREW) || inRange(point, ARABIC);

/** Whether the first letter with a direction is read from right to left (rule P2 of Unicode Standard Annex 9). */
export function startsRtl(text: string): boolean {
  for (const letter of text) {
    if (isRtl(letter.codePointAt(0) ?? 0)) return true;
    if (/\p{L}/u.test(letter)) return false;
  }
  return false;
}

function scriptOf(point: number): Script {
  if (inRange(point, HEBREW)) return 'hebrew';
  if (inRange(point, ARABIC)) return 'arabic';
  if (hasGlyph(point)) return 'house';
  return inRange(point, CJK) ? 'cjk' : 'missing';
}

/** Spaces and points, which go with what stands round them. */
const isNeutral = (letter: string): boolean => /^[\s\p{P}\p{S}]$/u.test(letter);
const isFigure = (letter: string): boolean => /^\p{Nd}$/u.test(letter);

/**
 * Text cut into stretches of one script each, in reading order. Spaces and points between two stretches of one right-to-left
 * script stay inside it; otherwise they go with the house face.
 */
export function scriptRuns(text: string): readonly TextRun[] {
  const letters = [...text];
  const scripts = letters.map((l) => scriptOf(l.codePointAt(0) ?? 0));
  const soft = letters.map((l, i) => scripts[i] === 'house' && isNeutral(l));
  for (let i = 0; i < letters.length; i++) {
    if (!soft[i]) continue;
    let end = i;
    while (end < letters.length && soft[end]) end++;
    const before = i > 0 ? scripts[i - 1] : undefined;
    const after = end < letters.length ? scripts[end] : undefined;
    const joins = before === after && (before === 'arabic' || before === 'hebrew') ? before : 'house';
    for (let k = i; k < end; k++) scripts[k] = joins === 'house' || letters[k] === ' ' ? joins : 'house';
    i = end - 1;
  }
  const runs: { text: string; script: Script; rtl: boolean }[] = [];
  letters.forEach((letter, i) => {
    const script = scripts[i] as Script;
    const last = runs.at(-1);
    if (last && last.script === script) last.text += letter;
    else runs.push({ text: letter, script, rtl: script === 'arabic' || script === 'hebrew' });
  });
  return runs;
}

/**
 * The stretches in the order in which they stand on the line from left to right: a short form of Unicode Standard Annex 9 for
 * single lines without embedded controls. In a right-to-left line the order of stretches is reversed, while figures
 * and left-to-right words keep theirs.
 */
export function visualRuns(text: string, rtl: boolean): readonly TextRun[] {
  const runs = scriptRuns(text);
  if (!rtl && !runs.some((r) => r.rtl)) return runs;
  const pieces = runs.flatMap((run) => (run.rtl ? [run] : splitEdges(run)));
  const forward = (r: TextRun): boolean => !r.rtl && (/\p{L}|\p{Nd}/u.test(r.text) || r.script === 'cjk');
  // Neutral pieces between two left-to-right pieces belong to them; elsewhere they take the direction of the line.
  const levels = pieces.map((p, i) => {
    if (p.rtl) return 1;
    if (forward(p)) return rtl ? 2 : 0;
    const around = [pieces[i - 1], pieces[i + 1]];
    if (around.every((a) => a !== undefined && forward(a))) return rtl ? 2 : 0;
    if (!rtl && around.every((a) => a?.rtl)) return 1;
    return rtl ? 1 : 0;
  });
  const order = pieces.map((p, i) => ({
    p: levels[i] === 1 && !p.rtl ? { ...p, text: mirrored(p.text) } : p,
    level: levels[i] as number,
  }));
  for (let level = 2; level >= 1; level--) {
    for (let i = 0; i < order.length; i++) {
      if ((order[i] as { level: number }).level < level) continue;
      let end = i;
      while (end < order.length && (order[end] as { level: number }).level >= level) end++;
      order.splice(i, end - i, ...order.slice(i, end).reverse());
      i = end - 1;
    }
  }
  return order.map((o) => o.p);
}

/** A house stretch with the spaces and points at its edges as pieces of their own. */
function splitEdges(run: TextRun): readonly TextRun[] {
  const letters = [...run.text];
  const hard = (l: string): boolean => !isNeutral(l) || isFigure(l);
  const first = letters.findIndex(hard);
  if (first < 0) return [run];
  let last = letters.length - 1;
  while (!hard(letters[last] as string)) last--;
  const part = (a: number, b: number): readonly TextRun[] =>
    b > a ? [{ ...run, text: letters.slice(a, b).join('') }] : [];
  return [...part(0, first), ...part(first, last + 1), ...part(last + 1, letters.length)];
}

const MIRROR: { readonly [letter: string]: string } = {
  '(': ')',
  ')': '(',
  '[': ']',
  ']': '[',
  '«': '»',
  '»': '«',
  '<': '>',
  '>': '<',
};

/** Points set from right to left: reversed, brackets turned round. */
const mirrored = (text: string): string =>
  [...text]
    .reverse()
    .map((l) => MIRROR[l] ?? l)
    .join('');
