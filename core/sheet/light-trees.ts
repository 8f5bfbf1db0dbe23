/** Whether crowns of trees are in the figures of neighbours' light: counted, left out, or there are none. */
export type TreesInLight = 'none' | 'left-out' | 'counted';

/**
 * The same in a few words, to stand beside figures.
 * @returns '' where the scheme has no trees
 */
export const treesBrief = (trees: TreesInLight): string =>
  trees === 'none' ? '' : trees === 'counted' ? 'Trees are counted.' : 'Trees are left out.';

/** The same in a sentence, with why. That guidance leaves trees out is common practice, no source. */
export const treesSentence = (trees: TreesInLight): string => SENTENCES[trees];

const SENTENCES: { readonly [T in TreesInLight]: string } = {
  none: 'The scheme has no trees.',
  'left-out':
    'Trees are left out, before and after: they drop their leaves and can be cut (common practice, no source).',
  counted:
    'Trees are counted, before and after: crowns let through what each month says, and of sky light the mean of the year.',
};
