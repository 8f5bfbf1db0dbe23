/** The cautions that go with every result, on screen, in the command's output and on paper. Wording is ours; keep it whole. */
export const CAUTIONS: readonly string[] = [
  'These results are estimates for design and for preparing a submission. They do not show compliance by themselves: local building code, planning policy and a licensed professional decide.',
  'Overheating can harm people, above all the old, the ill and the very young. A room that is within a limit may still overheat.',
  'Devices that overhang or project are loads on a structure and need an engineer.',
  'Looking at the sun injures the eye: check a site by its shadows, never by looking at the sun.',
];

/** One line for places without room for all of them. */
export const SHORT_CAUTION = 'Estimates for design. Local building code and a licensed professional decide.';
