/** Every length below which two places count as one, in metres and named by purpose. No other file states its own. */

/** Corners nearer than this are the same corner. */
export const SAME_POINT_m = 1e-6;
/** A solid that rises less than this in front of a plane does not stand in front of it (walls that touch, coincident faces). */
export const IN_FRONT_m = 1e-4;
/** The grid on which polygon unions are computed (clipper works in whole numbers): a tenth of a millimetre. */
export const UNION_GRID_m = 1e-4;
/** How far a window may reach past its wall, or a room past its block, before it is called a fault (drawing round-off). */
export const DRAWN_m = 1e-3;
/** Areas below this are slivers of rounding and are dropped. */
export const SLIVER_m2 = 1e-6;
