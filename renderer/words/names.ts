/** How things of a scheme are called where they stand alone. */
export const namesWords = {
  names: {
    allWindows: 'All windows',
    window: (id: string) => `Window ${id}`,
    room: (id: string) => `Room ${id}`,
    wall: (block: string, bearing: string) => `${block}, wall facing ${bearing}`,
    wallNumber: (block: string, wall: number) => `${block}, wall ${wall}`,
    roof: (block: string) => `${block}, roof`,
    ground: 'Ground',
  },
} as const;
