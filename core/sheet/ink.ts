import type { Hatch, Stroke } from './drawing.ts';

/** Colours and line weights of everything on paper: ink on white, one accent, and nothing that needs colour to be read. */
export const INK = '#22262b';
export const SOFT = '#5d636b';
export const WHITE = '#ffffff';
export const HAIR = '#ddd6c8';
export const WASH = '#f3efe5';
export const ACCENT = '#1b5e6b';
export const OVER = '#a8321a';
export const CLOSE = '#8a5a00';
export const WITHIN = '#2d6a4a';

/** Ground that is in shadow before and after. */
export const SHADOW = '#9aa4ac';
/** Ground that the proposal puts into shadow: paler than what was there, so that its hatch stays legible in black and white. */
export const ADDED = '#c9cdd0';
export const ADDED_HATCH: Hatch = { angle_deg: 45, spacing: 1.1, stroke: { colour: OVER, width: 0.25 } };
/** Ground that comes into sun because something is taken down. */
export const GAINED_HATCH: Hatch = { angle_deg: 135, spacing: 2.2, stroke: { colour: SOFT, width: 0.13 } };

export const CONTEXT_FILL = '#f1ecdf';
export const EXISTING_FILL = '#e3dccb';
export const PROPOSED_FILL = '#cfe1e3';
/** Beam, sky and ground of the curves of a day. */
export const BEAM = '#d8a23c';
export const SKY = '#b6c4cd';
export const GROUND = '#d5cdbb';

export const FINE: Stroke = { colour: INK, width: 0.18 };
export const THIN: Stroke = { colour: INK, width: 0.13 };
export const RULE: Stroke = { colour: HAIR, width: 0.18 };
export const FRAME: Stroke = { colour: SOFT, width: 0.13 };
export const EXISTING_LINE: Stroke = { colour: INK, width: 0.35 };
export const PROPOSED_LINE: Stroke = { colour: ACCENT, width: 0.5 };
export const REMOVED_LINE: Stroke = { colour: INK, width: 0.25, dash: [1.6, 1] };
export const BOUNDARY_LINE: Stroke = { colour: INK, width: 0.35, dash: [5, 1.2, 0.6, 1.2] };
export const AREA_LINE: Stroke = { colour: ACCENT, width: 0.25, dash: [0.5, 0.9] };
export const TREE_LINE: Stroke = { colour: SOFT, width: 0.18, dash: [0.8, 0.6] };
export const GAINED_LINE: Stroke = { colour: SOFT, width: 0.18, dash: [1, 0.7] };
export const ADDED_LINE: Stroke = { colour: OVER, width: 0.18 };
