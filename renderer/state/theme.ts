import { computed, effect, signal } from '@preact/signals';

export type Theme = 'light' | 'dark';
const KEY = 'shadewright-theme';

const system = window.matchMedia('(prefers-color-scheme: dark)');
const systemIsDark = signal(system.matches);
system.addEventListener('change', () => {
  systemIsDark.value = system.matches;
});

const stored = localStorage.getItem(KEY);
const chosen = signal<Theme | null>(stored === 'light' || stored === 'dark' ? stored : null);

/** What the screens show: the hand switch, or what the system asks for. */
export const theme = computed<Theme>(() => chosen.value ?? (systemIsDark.value ? 'dark' : 'light'));

export function switchTheme(): void {
  const next = theme.value === 'dark' ? 'light' : 'dark';
  chosen.value = next;
  localStorage.setItem(KEY, next);
}

effect(() => {
  document.documentElement.dataset['theme'] = theme.value;
});
