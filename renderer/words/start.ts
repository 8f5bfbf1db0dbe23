/** Words of opening and leaving a scheme. */
export const startWords = {
  start: {
    title: 'Nothing is open',
    line: 'Begin a scheme, open one, drop a scheme file anywhere on this window, or begin with an example.',
    examples: 'Examples',
    recent: 'Opened lately',
    recovered: 'Work that was not saved',
    recoveredAt: (when: string) => `kept ${when}`,
    recover: 'Bring back',
    discard: 'Let go',
    reading: 'Reading…',
  },
  faults: {
    title: (name: string) => `${name} cannot be opened`,
    line: (count: number) =>
      `${count === 1 ? 'One thing is' : `${count} things are`} wrong in this file. Nothing was loaded and the file was not changed.`,
    kept: (title: string) => `“${title}” stays open as it was.`,
    place: 'place',
    message: 'what is wrong',
    cure: 'what puts it right',
    whole: 'the whole file',
    copy: 'Copy as text',
    copied: 'Copied',
    close: 'Close',
  },
  unsaved: {
    title: (name: string) => `“${name}” has changes that are not saved`,
    line: 'Opening another scheme closes this one.',
    save: 'Save first',
    discard: 'Discard the changes',
    cancel: 'Stay here',
  },
} as const;
