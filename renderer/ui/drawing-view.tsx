import { useId, useMemo } from 'preact/hooks';
import type { Face, Mark, Mm, Page, Stroke } from '../../core/sheet/drawing.ts';
import { hatchLines } from '../../core/sheet/hatch.ts';
import './drawing-view.css';

type Point = readonly [Mm, Mm];
/** What a colour of the drawing is on this screen. Paper stays paper: the sheets are shown as they are printed. */
export type Paint = (colour: string) => string;

const asPrinted: Paint = (colour) => colour;

type Props = {
  readonly page: Page;
  /** What a screen reader says of it. */
  readonly label: string;
  readonly paint?: Paint;
  /** Width on the screen [px]; absent: as wide as there is room. */
  readonly width?: number;
  /** At true size instead: for the printer. */
  readonly millimetres?: boolean;
};

/** One page of the drawing description as live elements, so that it needs no style of its own and its text is text. */
export function DrawingView({ page, label, paint = asPrinted, width, millimetres = false }: Props) {
  const { width: wide, height: high, marks } = page;
  const onScreen = width === undefined ? {} : { width, height: (width * high) / wide };
  const size = millimetres ? { width: `${wide}mm`, height: `${high}mm` } : onScreen;
  const drawn = useMemo(() => <Marks marks={marks} paint={paint} />, [marks, paint]);
  return (
    <svg class="drawing" viewBox={`0 0 ${wide} ${high}`} role="img" aria-label={label} {...size}>
      {drawn}
    </svg>
  );
}

/** Marks as elements, for a drawing that is put together from several lists. */
export function Marks({ marks, paint }: { readonly marks: readonly Mark[]; readonly paint: Paint }) {
  return (
    <>
      {marks.map((mark, i) => (
        // Marks have no names; a drawing is made anew as a whole.
        <MarkView key={i} mark={mark} paint={paint} />
      ))}
    </>
  );
}

function MarkView({ mark, paint }: { readonly mark: Mark; readonly paint: Paint }) {
  switch (mark.kind) {
    case 'path':
      return <PathView mark={mark} paint={paint} />;
    case 'circle':
      return (
        <circle
          cx={mark.at[0]}
          cy={mark.at[1]}
          r={mark.radius}
          fill={mark.fill === undefined ? 'none' : paint(mark.fill)}
          {...lineStyle(mark.stroke, paint)}
        />
      );
    case 'text':
      return <TextView mark={mark} paint={paint} />;
    case 'group':
      return <GroupView mark={mark} paint={paint} />;
  }
}

const lineStyle = (stroke: Stroke | undefined, paint: Paint): Record<string, string | number> =>
  stroke === undefined
    ? {}
    : {
        stroke: paint(stroke.colour),
        'stroke-width': stroke.width,
        ...(stroke.dash === undefined ? {} : { 'stroke-dasharray': stroke.dash.join(' ') }),
      };

const number = (v: Mm): string => String(Math.round(v * 1000) / 1000);

const pathData = (runs: readonly (readonly Point[])[], closed: boolean): string =>
  runs
    .map(
      (run) => run.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${number(x)} ${number(y)}`).join('') + (closed ? 'Z' : ''),
    )
    .join('');

function PathView({ mark, paint }: { readonly mark: Mark & { kind: 'path' }; readonly paint: Paint }) {
  const d = pathData(mark.runs, mark.closed);
  const hatch = mark.hatch;
  const lines = hatch === undefined ? [] : hatchLines(mark.runs, hatch);
  return (
    <>
      {mark.fill === undefined ? null : <path d={d} fill={paint(mark.fill)} fill-rule="evenodd" />}
      {hatch === undefined || lines.length === 0 ? null : (
        <path
          d={lines
            .map(([x1, y1, x2, y2]) =>
              pathData(
                [
                  [
                    [x1, y1],
                    [x2, y2],
                  ],
                ],
                false,
              ),
            )
            .join('')}
          fill="none"
          {...lineStyle(hatch.stroke, paint)}
        />
      )}
      {mark.stroke === undefined ? null : <path d={d} fill="none" {...lineStyle(mark.stroke, paint)} />}
    </>
  );
}

const FACE: { readonly [F in Face]: Record<string, string> } = {
  regular: {},
  semibold: { 'font-weight': '600' },
  italic: { 'font-style': 'italic' },
};

function TextView({ mark, paint }: { readonly mark: Mark & { kind: 'text' }; readonly paint: Paint }) {
  const [x, y] = mark.at;
  // In a right-to-left line `start` is its right edge; the anchors of the drawing are left and right on the page.
  const anchor = mark.rtl && mark.anchor !== 'middle' ? (mark.anchor === 'start' ? 'end' : 'start') : mark.anchor;
  return (
    <text
      x={x}
      y={y}
      font-size={mark.size}
      fill={paint(mark.colour)}
      text-anchor={anchor}
      {...FACE[mark.face]}
      {...(mark.rtl ? { direction: 'rtl' } : {})}
      {...(mark.turn_deg ? { transform: `rotate(${number(-mark.turn_deg)} ${number(x)} ${number(y)})` } : {})}
    >
      {mark.text}
    </text>
  );
}

function GroupView({ mark, paint }: { readonly mark: Mark & { kind: 'group' }; readonly paint: Paint }) {
  const id = useId();
  const inner = <Marks marks={mark.marks} paint={paint} />;
  if (mark.clip === undefined) return <g>{inner}</g>;
  const [x, y, width, height] = mark.clip;
  return (
    <>
      <clipPath id={id}>
        <rect x={x} y={y} width={width} height={height} />
      </clipPath>
      <g clip-path={`url(#${id})`}>{inner}</g>
    </>
  );
}
