/** The little of fontkit that tests read fonts with. */
declare module 'fontkit' {
  export type Glyph = { readonly advanceWidth: number; readonly id: number };
  export type Font = {
    readonly unitsPerEm: number;
    readonly capHeight: number;
    readonly characterSet: readonly number[];
    hasGlyphForCodePoint(point: number): boolean;
    glyphForCodePoint(point: number): Glyph;
    layout(text: string): { readonly advanceWidth: number };
  };
  export function create(bytes: Uint8Array): Font;
}
