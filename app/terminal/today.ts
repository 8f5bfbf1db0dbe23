/** Today's date on this machine's clock, YYYY-MM-DD: what a sheet is dated with. Core never reads a clock. */
export function today(): string {
  const now = new Date();
  const two = (n: number) => String(n).padStart(2, '0');
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}
