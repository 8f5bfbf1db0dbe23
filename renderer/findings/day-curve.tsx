import { fixed } from '../ui/format.ts';
import { useSize } from '../ui/use-size.ts';
import { ValueRules } from '../ui/value-rules.tsx';
import { words } from '../words/words.ts';
import { axisTop, type RoomCurve } from './room-curve.ts';

const HEIGHT = 168;
const LEFT = 34;
const RIGHT = 8;
const TOP = 20;
const FOOT = 22;

type Props = {
  readonly curve: RoomCurve;
  readonly label: string;
  /** In the unit of the curve; drawn over the clock hours that it holds for. */
  readonly limit: { readonly value: number; readonly from_min: number; readonly to_min: number } | null;
  /** Clock minutes of the moment the finding names. */
  readonly at_min: number | null;
};

/** What comes into a room through a day: direct sun over sky over ground, with the limit as a dashed line named where it runs. */
export function DayCurve({ curve, label, limit, at_min }: Props) {
  const { ref, width } = useSize<HTMLDivElement>();
  const from = Math.max(0, Math.floor(curve.from_min / 60) * 60);
  const to = Math.min(1440, Math.ceil(curve.to_min / 60) * 60);
  const { top, step } = axisTop(Math.max(curve.most, limit?.value ?? 0, 1) * 1.04);
  const x = (min: number): number => LEFT + ((min - from) / (to - from)) * (width - LEFT - RIGHT);
  const y = (value: number): number => HEIGHT - FOOT - (value / top) * (HEIGHT - FOOT - TOP);
  const hours: number[] = [];
  const hourStep = to - from > 600 ? 180 : 120;
  for (let h = Math.ceil(from / hourStep) * hourStep; h <= to; h += hourStep) hours.push(h);
  return (
    <div ref={ref} class="day-curve">
      <svg width={width} height={HEIGHT} role="img" aria-label={label}>
        <ValueRules top={top} step={step} left={LEFT} right={width - RIGHT} y={y} unit="W/m²" />
        {width > 0 ? <Areas curve={curve} x={x} y={y} /> : null}
        {hours.map((h) => (
          <text key={h} class="axis" x={x(h)} y={HEIGHT - 5} text-anchor="middle">
            {h / 60}:00
          </text>
        ))}
        {limit === null ? null : (
          <g class="limit-line">
            <path d={`M${x(Math.max(from, limit.from_min))} ${y(limit.value)}H${x(Math.min(to, limit.to_min))}`} />
            <text x={x(Math.max(from, limit.from_min)) + 4} y={y(limit.value) - 5}>
              {words.findings.limitLine(fixed(limit.value, 0))}
            </text>
          </g>
        )}
        {at_min === null ? null : <path class="at" d={`M${x(at_min)} ${TOP - 4}V${HEIGHT - FOOT}`} />}
      </svg>
      <ul class="curve-key">
        {(['beam', 'sky', 'ground'] as const).map((part) => (
          <li key={part}>
            <span class={`swatch ${part}`} aria-hidden="true" />
            {words.findings.parts[part]}
          </li>
        ))}
      </ul>
    </div>
  );
}

type AreasProps = {
  readonly curve: RoomCurve;
  readonly x: (min: number) => number;
  readonly y: (value: number) => number;
};

/** The three stacked areas; where the clock goes back the column stays in the order of time. */
function Areas({ curve, x, y }: AreasProps) {
  const { clock_min, ground, sky, beam, from_min, to_min } = curve;
  const shown = [...clock_min.keys()].filter((i) => clock_min[i]! >= from_min && clock_min[i]! <= to_min);
  const low = shown.map(() => 0);
  const mid = shown.map((i) => ground[i]!);
  const high = shown.map((i) => ground[i]! + sky[i]!);
  const all = shown.map((i) => ground[i]! + sky[i]! + beam[i]!);
  const line = (values: readonly number[], reverse: boolean): string => {
    const points = shown.map((i, k) => `${x(clock_min[i]!).toFixed(1)} ${y(values[k] as number).toFixed(1)}`);
    return (reverse ? points.reverse() : points).join('L');
  };
  const band = (under: readonly number[], over: readonly number[]): string =>
    `M${line(over, false)}L${line(under, true)}Z`;
  if (shown.length === 0) return null;
  return (
    <>
      <path class="area ground" d={band(low, mid)} />
      <path class="area sky" d={band(mid, high)} />
      <path class="area beam" d={band(high, all)} />
      <path class="outline" d={`M${line(all, false)}`} />
    </>
  );
}
