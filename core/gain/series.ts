/** The parts of the sun's heat that come in through a window, kept apart all the way to the report [W]. */
export type Part = 'beam' | 'circumsolar' | 'sky' | 'horizon' | 'ground';
export const PARTS: readonly Part[] = ['beam', 'circumsolar', 'sky', 'horizon', 'ground'];

/** What one window takes in on one day: watts through the opening at each step, part by part, and what led there. */
export type WindowDay = {
  readonly window: string;
  readonly day: string;
  readonly sunlit: Float64Array;
  readonly cosIncidence: Float64Array;
  readonly parts: { readonly [P in Part]: Float64Array };
  readonly total_W: Float64Array;
};

/** What one room takes in on one day. */
export type RoomDay = {
  readonly room: string;
  readonly day: string;
  readonly total_W: Float64Array;
  readonly windows: readonly WindowDay[];
};
