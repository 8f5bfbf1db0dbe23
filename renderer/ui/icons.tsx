import type { ComponentChildren } from 'preact';

/** Line icons on a 16 px grid, in the colour of the text; decoration only, so hidden from screen readers. */
function Icon({ children }: { children: ComponentChildren }) {
  return (
    <svg
      class="icon"
      width="16"
      height="16"
      viewBox="0 0 16 16"
      fill="none"
      stroke="currentColor"
      stroke-width="1.4"
      stroke-linecap="round"
      stroke-linejoin="round"
      aria-hidden="true"
    >
      {children}
    </svg>
  );
}

export const UndoIcon = () => (
  <Icon>
    <path d="M3 6.5h6.5a3.5 3.5 0 0 1 0 7H7M3 6.5 6 3.5M3 6.5l3 3" />
  </Icon>
);
export const RedoIcon = () => (
  <Icon>
    <path d="M13 6.5H6.5a3.5 3.5 0 0 0 0 7H9M13 6.5l-3-3M13 6.5l-3 3" />
  </Icon>
);
export const BackIcon = () => (
  <Icon>
    <path d="m10 3.5-4.5 4.5L10 12.5" />
  </Icon>
);
export const ForwardIcon = () => (
  <Icon>
    <path d="m6 3.5 4.5 4.5L6 12.5" />
  </Icon>
);
export const DownIcon = () => (
  <Icon>
    <path d="m4 6.5 4 4 4-4" />
  </Icon>
);
export const CloseIcon = () => (
  <Icon>
    <path d="m4 4 8 8M12 4l-8 8" />
  </Icon>
);
export const PlusIcon = () => (
  <Icon>
    <path d="M8 3.5v9M3.5 8h9" />
  </Icon>
);
export const MinusIcon = () => (
  <Icon>
    <path d="M3.5 8h9" />
  </Icon>
);
export const AllIcon = () => (
  <Icon>
    <path d="M2.5 5.5v-3h3M10.5 2.5h3v3M13.5 10.5v3h-3M5.5 13.5h-3v-3M6 6h4v4H6z" />
  </Icon>
);
export const MoonIcon = () => (
  <Icon>
    <path d="M13 9.5A5.5 5.5 0 0 1 6.5 3 5.5 5.5 0 1 0 13 9.5Z" />
  </Icon>
);
export const DayIcon = () => (
  <Icon>
    <circle cx="8" cy="8" r="2.8" />
    <path d="M8 1.8v1.4M8 12.8v1.4M1.8 8h1.4M12.8 8h1.4M3.6 3.6l1 1M11.4 11.4l1 1M3.6 12.4l1-1M11.4 4.6l1-1" />
  </Icon>
);
