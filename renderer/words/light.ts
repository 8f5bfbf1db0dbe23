/** Words of the panel of light figures. */
export const lightWords = {
  light: {
    tab: 'Light',
    label: 'Light and sun kept',
    list: 'Receptors',
    none: 'The scheme asks after no points, areas or windows of neighbours, and no window is selected.',
    working: 'Working out the light…',
    kinds: { point: 'point', area: 'area', window: 'neighbour’s window' },
    figure: 'figure',
    before: 'before',
    after: 'after',
    kept: 'kept',
    skyView: 'sky view factor',
    vertical: 'vertical sky component',
    component: 'sky component',
    annual: 'probable sunlight hours, year',
    winter: 'probable sunlight hours, winter half',
    sunOn: (date: string) => `direct sun on ${date}`,
    share: (hours: string, date: string) => `share with ${hours} h of sun on ${date}`,
    hours: (h: string) => `${h} h`,
    level: {
      none: 'below the levels of EN 17037',
      minimum: 'EN 17037 level minimum',
      medium: 'EN 17037 level medium',
      high: 'EN 17037 level high',
    },
    pane: 'At the middle of the pane, its reveal left out.',
    point: 'At the point, on its own plane.',
    how: (open: string) =>
      `Blocks and fixed devices hide the sky. Probable hours are shares of the ${open} h that an open place has, every hour of sun above the horizon counted alike.`,
    area: (spacing: string) => `Ground under buildings left out; read every ${spacing} m.`,
    trees: 'Trees in these figures',
    withoutTrees: 'Trees left out',
    withTrees: 'Trees counted',
    treesAre: {
      none: 'The scheme has no trees.',
      'left-out':
        'Trees are left out, before and after: they drop their leaves and can be cut (common practice, no source).',
      counted:
        'Trees are counted, before and after: crowns let through what each month says, and of sky light the mean of the year.',
    },
  },
} as const;
