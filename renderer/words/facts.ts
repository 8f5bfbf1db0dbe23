/** Words of what the title blocks say of a scheme. */
export const factsWords = {
  facts: {
    open: 'Title, address and author',
    title: 'What the title blocks say',
    fields: {
      title: 'Title',
      address: 'Address',
      author: 'Author',
      revision: 'Revision',
      year: 'Year of the design days',
    },
    badYear: 'A year from 1900 to 2100, or nothing',
    edit: 'title block',
    apply: 'Set',
    cancel: 'Cancel',
  },
} as const;
