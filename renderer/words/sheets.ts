/** Words of sheets and exports. */
export const sheetsWords = {
  sheets: {
    report: 'Findings report (PDF)',
    findingsCsv: 'Findings table (CSV)',
    findingsJson: 'Findings to recompute (JSON)',
    shadow: 'Shadow sheet (PDF)',
    needsCheck: 'Check the rooms first',
    setting: (what: string) => `Setting ${what}…`,
    written: (name: string) => `Written: ${name}`,
    failed: (what: string, why: string) => `${what} was not written: ${why}`,
  },
} as const;
