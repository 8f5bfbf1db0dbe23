/** The kinds of sheet that a scheme's sheet sets may name, as their `kind` in the file. */
export const SHEET_KINDS = [
  'shadow-study',
  'sun-path',
  'facades',
  'exposure-plan',
  'section',
  'light',
  'findings',
] as const;
export type SheetKind = (typeof SHEET_KINDS)[number];

/** Whether a sheet set's `kind` is one that this version draws. */
export const isSheetKind = (kind: string): kind is SheetKind => (SHEET_KINDS as readonly string[]).includes(kind);

/** Whether a kind cannot be drawn without a window. A sun path takes one where it is given, for its shading mask. */
export const needsWindow = (kind: SheetKind): boolean => kind === 'section';
