/** A wall or the roof of a block. */
export type Face =
  | { readonly kind: 'wall'; readonly block: string; readonly wall: number }
  | { readonly kind: 'roof'; readonly block: string };

/** The id by which a face is selected: its block's, with the number of its wall or `roof`. */
export const faceId = (face: Face): string => `${face.block}/${face.kind === 'roof' ? 'roof' : face.wall}`;

/** The face of an id. Ids of blocks may hold anything; what follows the last slash is ours. */
export function faceOf(id: string): Face {
  const at = id.lastIndexOf('/');
  const block = id.slice(0, at);
  const last = id.slice(at + 1);
  return last === 'roof' ? { kind: 'roof', block } : { kind: 'wall', block, wall: Number(last) };
}
