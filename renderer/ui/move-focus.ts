const STEPS: { readonly [key: string]: number } = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 };

/** Arrow keys, Home and End between the items of a group; the item that is reached is pressed. */
export function moveFocus(event: KeyboardEvent & { currentTarget: HTMLElement }, items: string): void {
  const all = [...event.currentTarget.querySelectorAll<HTMLElement>(items)];
  const at = all.indexOf(document.activeElement as HTMLElement);
  const step = STEPS[event.key];
  const to =
    step !== undefined
      ? (at + step + all.length) % all.length
      : event.key === 'Home'
        ? 0
        : event.key === 'End'
          ? all.length - 1
          : -1;
  const target = all[to];
  if (at < 0 || target === undefined) return;
  event.preventDefault();
  target.focus();
  target.click();
}
