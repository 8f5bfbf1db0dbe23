import { signal } from '@preact/signals';
import { useLayoutEffect } from 'preact/hooks';
import { LightPanel } from './light/light-panel.tsx';
import { countOf, KINDS, ScheduleOf } from './schedule/schedules.tsx';
import { SunPathPanel } from './sun-path/sun-path-panel.tsx';
import { type Kind, selection } from './state/selection.ts';
import { type Tab, Tabs } from './ui/tabs.tsx';
import { words } from './words/words.ts';
import { WeatherPanel } from './weather/weather-panel.tsx';
import { YearStrip } from './year-strip/year-strip.tsx';

type Page = Kind | 'year' | 'light' | 'sun-path' | 'weather';

const page = signal<Page>('year');

/** Panels that a selection does not turn away from. */
const isAside = (shown: Page): boolean => shown === 'light' || shown === 'sun-path' || shown === 'weather';

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
    if (picked === undefined || isAside(page.value)) return;
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
  const light: Tab<Page> = { value: 'light', text: words.light.tab };
  const sunPath: Tab<Page> = { value: 'sun-path', text: words.sunPath.tab };
  const weather: Tab<Page> = { value: 'weather', text: words.weather.tab };
  const tabs: Tab<Page>[] = wide
    ? [...schedules, light, sunPath, weather]
    : [{ value: 'year', text: words.year.tab }, light, sunPath, ...schedules, weather];
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

const labelOf = (shown: Page): string => {
  if (shown === 'year') return words.year.label;
  if (shown === 'light') return words.light.label;
  if (shown === 'sun-path') return words.sunPath.label;
  return shown === 'weather' ? words.weather.label : words.schedule.tabs[shown];
};

function Shown({ page: shown }: { page: Page }) {
  if (shown === 'year') return <YearStrip />;
  if (shown === 'light') return <LightPanel />;
  if (shown === 'sun-path') return <SunPathPanel />;
  return shown === 'weather' ? <WeatherPanel /> : <ScheduleOf kind={shown} />;
}
