import { useLayoutEffect, useRef } from 'preact/hooks';
import { NO_SUCH_TIME, SUN_DOWN, type SunYear } from '../../core/study/sun-year.ts';
import { civilOf } from '../../core/sun/civil.ts';
import { seasons } from '../../core/sun/seasons.ts';
import { scheme } from '../state/document.ts';
import { civil, minutesOf, moveDays, moveMinutes, timeOf } from '../state/moment.ts';
import { subjectName } from '../state/names.ts';
import { isYearShown, model, sunYearResult, yearJob, yearSubject } from '../state/studies.ts';
import { theme } from '../state/theme.ts';
import type { YearSubject } from '../state/year-subject.ts';
import { cividisRgb } from '../../core/sheet/cividis.ts';
import { dayAndMonth, monthNames, percent, signed } from '../ui/format.ts';
import { Progress } from '../ui/progress.tsx';
import { useSize } from '../ui/use-size.ts';
import { words } from '../words/words.ts';
import { placeLabels } from './place-labels.ts';
import { clockMoves, type Greys, shareAt, shownHours, stripPixels } from './strip-image.ts';
import './year-strip.css';

const LEFT = 46;
const RIGHT = 14;
const TOP = 22;
const FOOT = 22;

/** A picture of the whole year of direct sun on what is selected; it is also the clock. */
export function YearStrip() {
  useLayoutEffect(() => {
    isYearShown.value = true;
    return () => {
      isYearShown.value = false;
    };
  }, []);
  const found = sunYearResult.value;
  const job = yearJob.value;
  if (yearSubject.value === null) return <p class="empty-line soft">{words.year.none}</p>;
  return (
    <div class="year">
      <div class="year-head">
        <h3>{found === null ? words.year.label : titleOf(found.subject)}</h3>
        {job.kind === 'working' ? (
          <Progress text={words.year.working} done={job.done} total={job.total} />
        ) : (
          <StripKey />
        )}
      </div>
      {job.kind === 'failed' ? (
        <p class="notice" role="alert">
          {words.status.workerFailed(words.year.label, job.message)}
        </p>
      ) : null}
      {found === null ? <div class="strip" /> : <Strip year={found.value} isStale={found.scheme !== scheme.value} />}
    </div>
  );
}

/** What a share is a share of. */
const SHARE_OF = {
  window: 'glass',
  room: 'glass',
  all: 'glass',
  neighbour: 'glass',
  wall: 'wall',
  roof: 'roof',
  area: 'area',
  point: 'point',
} as const;

function titleOf(subject: YearSubject): string {
  const shapes = model.value?.value;
  const of = words.year.of[SHARE_OF[subject.kind]];
  const text = words.year.title(shapes === undefined ? subject.id : subjectName(shapes, subject), of);
  return subject.stage === 'before' ? `${text}, ${words.year.asItIsNow}` : text;
}

function StripKey() {
  const stops = Array.from({ length: 11 }, (_, i) => `rgb(${cividisRgb(i / 10).join(' ')})`);
  return (
    <div class="strip-key">
      <span class="swatch down" aria-hidden="true" /> {words.year.keyDown}
      <span class="swatch up" aria-hidden="true" /> {words.year.keyUp}
      <span class="scale-number">{words.year.keyNone}</span>
      <span
        class="swatch scale"
        style={{ background: `linear-gradient(to right, ${stops.join(', ')})` }}
        aria-hidden="true"
      />
      {words.year.keyAll}
    </div>
  );
}

const greysOf = (): Greys => {
  const style = getComputedStyle(document.documentElement);
  const read = (name: string): readonly [number, number, number] => {
    const n = Number.parseInt(style.getPropertyValue(name).trim().slice(1), 16);
    return [n >> 16, (n >> 8) & 255, n & 255];
  };
  return { up: read('--up-grey'), down: read('--down-grey') };
};

function Strip({ year, isStale }: { year: SunYear; isStale: boolean }) {
  const { ref, width, height } = useSize<HTMLDivElement>();
  const canvas = useRef<HTMLCanvasElement>(null);
  const { from_min, to_min } = shownHours(year);
  const inner = { width: Math.max(1, width - LEFT - RIGHT), height: Math.max(1, height - TOP - FOOT) };
  const shownTheme = theme.value;
  useLayoutEffect(() => {
    const element = canvas.current as HTMLCanvasElement;
    const image = stripPixels(year, from_min, to_min, greysOf());
    element.width = image.width;
    element.height = image.height;
    element.getContext('2d')?.putImageData(new ImageData(image.data, image.width, image.height), 0, 0);
  }, [year, from_min, to_min, shownTheme]);

  const x = (index: number): number => LEFT + ((index + 0.5) / year.dates.length) * inner.width;
  const y = (min: number): number => TOP + (1 - (min - from_min) / (to_min - from_min)) * inner.height;
  const pointTo = (event: PointerEvent): void => {
    const box = (ref.current as HTMLElement).getBoundingClientRect();
    const across = (event.clientX - box.left - LEFT) / inner.width;
    const up = 1 - (event.clientY - box.top - TOP) / inner.height;
    const index = Math.min(year.dates.length - 1, Math.max(0, Math.floor(across * year.dates.length)));
    const minutes = from_min + Math.min(1, Math.max(0, up)) * (to_min - from_min);
    civil.value = { date: year.dates[index] as string, time: timeOf(Math.round(minutes / 5) * 5) };
  };
  const at = year.dates.indexOf(civil.value.date);
  return (
    <div
      ref={ref}
      class={isStale ? 'strip stale' : 'strip'}
      role="slider"
      tabIndex={0}
      aria-label={words.year.canvas}
      aria-valuemin={0}
      aria-valuemax={year.dates.length - 1}
      aria-valuenow={Math.max(0, at)}
      aria-valuetext={reading(year)}
      onKeyDown={(event) => {
        if (pressKey(event)) event.preventDefault();
      }}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        pointTo(event);
      }}
      onPointerMove={(event) => {
        if (event.buttons === 1) pointTo(event);
      }}
    >
      <canvas
        ref={canvas}
        style={{ left: `${LEFT}px`, top: `${TOP}px`, width: `${inner.width}px`, height: `${inner.height}px` }}
      />
      {width === 0 ? null : (
        <svg width={width} height={height} aria-hidden="true">
          <HourRules from_min={from_min} to_min={to_min} x1={LEFT} x2={LEFT + inner.width} y={y} />
          <MonthTicks year={year} x={x} foot={TOP + inner.height} />
          <YearMarks year={year} x={x} top={TOP} foot={TOP + inner.height} />
          {at < 0 ? null : (
            <Now
              x={x(at)}
              y={y(Math.min(to_min, Math.max(from_min, minutesOf(civil.value.time))))}
              foot={TOP + inner.height}
            />
          )}
        </svg>
      )}
    </div>
  );
}

/** The moment, drawn twice so that it stands out on any colour. */
function Now({ x, y, foot }: { x: number; y: number; foot: number }) {
  return (
    <>
      {['halo', 'now'].map((layer) => (
        <g key={layer} class={layer}>
          <path d={`M${x} ${TOP}V${y - 6}M${x} ${y + 6}V${foot}`} />
          <circle cx={x} cy={y} r="6" />
        </g>
      ))}
    </>
  );
}

/** The moment on the strip, in words. */
function reading(year: SunYear): string {
  const { date, time } = civil.value;
  const share = shareAt(year, date, minutesOf(time));
  const what =
    share === null || share === SUN_DOWN
      ? words.year.down
      : share === NO_SUCH_TIME
        ? words.year.noSuchTime
        : words.year.share(percent(share));
  return words.year.reading(`${dayAndMonth(date)}, ${time}`, what);
}

function pressKey(event: KeyboardEvent): boolean {
  const days = { ArrowLeft: -1, ArrowRight: 1, PageUp: 28, PageDown: -28 }[event.key];
  const minutes = { ArrowUp: 10, ArrowDown: -10 }[event.key];
  if (days !== undefined) moveDays(days);
  else if (minutes !== undefined) moveMinutes(minutes);
  else return false;
  return true;
}

/** Hours nearer than this run into one another [px]. */
const HOUR_APART_px = 25;

/** Between the hours that are named [min]. */
const hourStep = (pixelsAnHour: number): number =>
  60 * ([1, 2, 3, 4, 6].find((h) => h * pixelsAnHour >= HOUR_APART_px) ?? 12);

type RuleProps = { from_min: number; to_min: number; x1: number; x2: number; y: (min: number) => number };

function HourRules({ from_min, to_min, x1, x2, y }: RuleProps) {
  const every = hourStep(Math.abs(y(60) - y(0)));
  const hours: number[] = [];
  for (let h = (Math.floor(from_min / every) + 1) * every; h < to_min; h += every) hours.push(h);
  return (
    <>
      {hours.map((h) => (
        <g key={h}>
          <path class="hour" d={`M${x1} ${Math.round(y(h)) + 0.5}H${x2}`} />
          <text x={x1 - 8} y={y(h) + 4.5} text-anchor="end">
            {h / 60}:00
          </text>
        </g>
      ))}
    </>
  );
}

function MonthTicks({ year, x, foot }: { year: SunYear; x: (index: number) => number; foot: number }) {
  const names = monthNames();
  const starts = year.dates.flatMap((date, i) => (date.endsWith('-01') ? [i] : []));
  return (
    <>
      {starts.map((start, m) => {
        const next = starts[m + 1] ?? year.dates.length;
        return (
          <g key={start}>
            <path class="tick" d={`M${x(start - 0.5)} ${foot}v5`} />
            <text x={x((start + next - 1) / 2)} y={foot + 17} text-anchor="middle">
              {names[m]}
            </text>
          </g>
        );
      })}
    </>
  );
}

/** About how wide a letter of a label is [px]. */
const LETTER_px = 6.8;

/** Solstices, equinoxes and the dates on which the clock is moved. */
function YearMarks({ year, x, top, foot }: { year: SunYear; x: (index: number) => number; top: number; foot: number }) {
  const s = seasons(year.year);
  const indexOf = (ms: number): number => year.dates.indexOf(civilOf(ms, year.zone).date);
  const moves = clockMoves(year).map(({ index, by_min }) => {
    const text = words.year.clocks(`${signed(by_min / 60, by_min % 60 === 0 ? 0 : 1)} h`);
    return { at: x(index - 0.5), text, isMove: true };
  });
  const season = (ms: number, text: string) => ({ at: x(indexOf(ms)), text, isMove: false });
  const marks = [
    season(s.marchEquinox_ms, words.year.equinox),
    season(s.juneSolstice_ms, words.year.solstice),
    season(s.septemberEquinox_ms, words.year.equinox),
    season(s.decemberSolstice_ms, words.year.solstice),
    ...moves,
  ].sort((a, b) => a.at - b.at);
  const anchors = placeLabels(
    marks.map(({ at, text }) => ({ at, width: text.length * LETTER_px })),
    0,
    x(year.dates.length) + 8,
  );
  return (
    <>
      {marks.map(({ at, text, isMove }, i) => {
        const anchor = anchors[i] ?? null;
        return (
          <g key={`${at}${text}`} class={isMove ? 'mark clock-move' : 'mark'}>
            <path d={`M${at} ${top - 4}V${foot}`} />
            {anchor === null ? (
              <title>{text}</title>
            ) : (
              <text x={at + (anchor === 'end' ? 2 : anchor === 'start' ? -2 : 0)} y={top - 7} text-anchor={anchor}>
                {text}
              </text>
            )}
          </g>
        );
      })}
    </>
  );
}
