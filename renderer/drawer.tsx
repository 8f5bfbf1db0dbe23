import { signal } from '@preact/signals';
import { useLayoutEffect } from 'preact/hooks';
import { ComparePanel } from './compare/compare-panel.tsx';
import { LightPanel } from './light/light-panel.tsx';
import { LimitsPanel } from './limits/limits-panel.tsx';
import { countOf, KINDS, ScheduleOf } from './schedule/schedules.tsx';
import { SunPathPanel } from './sun-path/sun-path-panel.tsx';
import { SizingPanel } from './sizing/sizing-panel.tsx';
import { type Kind, selection } from './state/selection.ts';
import { type Tab, Tabs } from './ui/tabs.tsx';
import { words } from './words/words.ts';
import { WeatherPanel } from './weather/weather-panel.tsx';
import { YearStrip } from './year-strip/year-strip.tsx';

/** Panels beside the schedules, which a selection does not turn away from, in the order of their tabs. */
const ASIDES = [
  { page: 'light', tab: words.light.tab, label: words.light.label, Panel: LightPanel },
  { page: 'sizing', tab: words.sizing.tab, label: words.sizing.label, Panel: SizingPanel },
  { page: 'compare', tab: words.compare.tab, label: words.compare.label, Panel: ComparePanel },
  { page: 'limits', tab: words.limits.tab, label: words.limits.label, Panel: LimitsPanel },
  { page: 'sun-path', tab: words.sunPath.tab, label: words.sunPath.label, Panel: SunPathPanel },
  { page: 'weather', tab: words.weather.tab, label: words.weather.label, Panel: WeatherPanel },
] as const;

type Page = Kind | 'year' | (typeof ASIDES)[number]['page'];

const page = signal<Page>('year');

/** Turns the drawer to the weather, as when a file of it was dropped on the window. */
export const showWeather = (): void => {
  page.value = 'weather';
};

const asideOf = (shown: Page) => ASIDES.find((aside) => aside.page === shown);

/** From this width on, the schedules and the year strip have each a place of their own. */
const WIDE = window.matchMedia('(min-width: 1680px)');
const isWide = signal(WIDE.matches);
WIDE.addEventListener('change', () => {
  isWide.value = WIDE.matches;
});

/** Year strip and schedules: one behind the other in a small window, side by side in a wide one. */
export function Drawer() {
  // On a wide window a schedule is always there; picking something in the massing turns to its schedule.
  const picked = selection.value?.kind;
  useLayoutEffect(() => {
    if (picked === undefined || asideOf(page.value) !== undefined) return;
    // Receptors and faces have no schedule: their year is what there is to see, and beside it the light of receptors.
    if (picked === 'receptor') page.value = isWide.value ? 'light' : 'year';
    else if (picked === 'face') page.value = isWide.value ? page.value : 'year';
    else if (isWide.value || page.value !== 'year') page.value = picked;
  }, [picked]);
  const wide = isWide.value;
  const shown: Page = wide && page.value === 'year' ? 'window' : page.value;
  const schedules = KINDS.map(
    (kind): Tab<Page> => ({ value: kind, text: words.schedule.tabs[kind], count: countOf(kind) }),
  );
  const asides = ASIDES.map((aside): Tab<Page> => ({ value: aside.page, text: aside.tab }));
  const tabs: Tab<Page>[] = wide
    ? [...schedules, ...asides]
    : [{ value: 'year', text: words.year.tab }, ...asides, ...schedules];
  return (
    <>
      <section class="schedules" aria-label={words.schedule.label}>
        <div class="schedules-head">
          <Tabs
            label={words.schedule.label}
            tabs={tabs}
            value={shown}
            panelId="schedule-panel"
            onChoose={(value) => {
              page.value = value;
            }}
          />
        </div>
        <div id="schedule-panel" class="schedule-panel" role="tabpanel" aria-label={labelOf(shown)}>
          <Shown page={shown} />
        </div>
      </section>
      {wide ? (
        <section class="year-place" aria-label={words.year.label}>
          <YearStrip />
        </section>
      ) : null}
    </>
  );
}

function labelOf(shown: Page): string {
  if (shown === 'year') return words.year.label;
  return asideOf(shown)?.label ?? words.schedule.tabs[shown as Kind];
}

function Shown({ page: shown }: { page: Page }) {
  if (shown === 'year') return <YearStrip />;
  const Panel = asideOf(shown)?.Panel;
  return Panel === undefined ? <ScheduleOf kind={shown as Kind} /> : <Panel />;
}
