/** The parts of the sun's heat that come in through a window, kept apart all the way to the report [W]. */
export type Part = 'beam' | 'circumsolar' | 'sky' | 'horizon' | 'ground';
/** Every part, in the order of reports. */
export const PARTS: readonly Part[] = ['beam', 'circumsolar', 'sky', 'horizon', 'ground'];

/** Shares of dome and ground light that reach the glass (cosine-weighted, open vertical glass 0.5) and the visible share of the horizon. */
export type WindowSeen = { readonly sky: number; readonly horizon: number; readonly ground: number };

/** What one window takes in on one day: watts through the opening at each step, part by part, and what led there. */
export type WindowDay = {
  readonly window: string;
  readonly day: string;
  readonly sunlit: Float64Array;
  readonly cosIncidence: Float64Array;
  /** What the window sees in the day's month: crowns of trees let through more in one than in another. */
  readonly seen: WindowSeen;
  /** What the closed blinds leave of the glass's gain at each step, 1 where they are open. */
  readonly blind: Float64Array;
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
