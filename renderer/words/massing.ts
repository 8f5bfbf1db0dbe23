/** Words of the massing view. */
export const massingWords = {
  massing: {
    label: 'Massing',
    canvas:
      'Massing of the scheme. Arrow keys turn it, with shift they move it, plus and minus zoom, F shows all of it, P turns to the plan and back. Brackets step from one thing to the next, Enter goes into the faces of a block, Escape back out. R reads a sun map cell by cell.',
    view: 'View',
    axonometric: 'Massing',
    plan: 'Plan',
    stage: 'Stage',
    after: 'After',
    before: 'Before',
    fit: 'Show all',
    zoomIn: 'Nearer',
    zoomOut: 'Farther',
    trueNorth: 'true north',
    key: {
      shadow: 'shadow on the ground',
      added: 'added by the proposal',
      gained: 'given back to the sun',
      proposed: 'proposed',
      removed: 'removed',
      glass: 'glass in sun, in shade',
    },
    sunDown: 'The sun is down at this moment: no shadows.',
    noGraphics: 'This machine gives the window no 3D drawing, so the massing is shown as a plan.',
    lostToPlan: 'The 3D drawing was lost, so the massing is shown as a plan. Opening the window anew brings it back.',
    inSun: (share: string) => `${share} in direct sun`,
    block: (standing: string, height: string) => `${standing}, top ${height}`,
    standing: {
      existing: 'existing',
      proposed: 'proposed',
      removed: 'removed',
      context: 'context',
    },
    working: 'Working out the shadows…',
  },
} as const;
