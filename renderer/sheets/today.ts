/** Today on the reader's calendar, YYYY-MM-DD: the date of the drawing. */
export const today = (): string => {
  const now = new Date();
  return new Date(now.getTime() - now.getTimezoneOffset() * 60_000).toISOString().slice(0, 10);
};
