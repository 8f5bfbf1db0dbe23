import type { Sweep, SweepPoint } from '../../core/sizing/sweep.ts';
import { axisTop } from '../findings/room-curve.ts';
import { fixed } from '../ui/format.ts';
import { useSize } from '../ui/use-size.ts';
import { words } from '../words/words.ts';

const LEFT = 40;
const RIGHT = 14;
const TOP = 22;
const FOOT = 34;

type Props = {
  readonly sweep: Sweep;
  readonly target_kWh: number | null;
  readonly shown: SweepPoint;
  readonly onPick: (amount: number) => void;
};

const text = words.sizing;

/** Summer and winter gain over the settings, told apart by their strokes and named where they run. */
export function SizingChart({ sweep, target_kWh, shown, onPick }: Props) {
  const { ref, width, height } = useSize<HTMLDivElement>();
  const amounts = sweep.points.map((p) => p.amount);
  const [from, to] = [amounts[0] ?? 0, amounts.at(-1) ?? 1];
  const most = Math.max(...sweep.points.map((p) => Math.max(p.summer_Wh, p.winter_Wh)), 1) / 1000;
  const { top, step } = axisTop(Math.max(most, target_kWh ?? 0) * 1.06);
  const x = (amount: number): number => LEFT + ((amount - from) / (to - from || 1)) * (width - LEFT - RIGHT);
  const y = (kWh: number): number => height - FOOT - (kWh / top) * (height - FOOT - TOP);
  const line = (of: (p: SweepPoint) => number): string =>
    `M${sweep.points.map((p) => `${x(p.amount).toFixed(1)} ${y(of(p) / 1000).toFixed(1)}`).join('L')}`;
  const marks = Array.from({ length: Math.round(top / step) + 1 }, (_, i) => i * step);
  const pick = (event: PointerEvent & { readonly currentTarget: SVGSVGElement }): void => {
    if (event.type === 'pointermove' && event.buttons === 0) return;
    const at = event.clientX - event.currentTarget.getBoundingClientRect().left;
    onPick(from + ((at - LEFT) / (width - LEFT - RIGHT)) * (to - from));
  };
  const named = sweep.points.at(-1) ?? shown;
  const nameAt = (of_Wh: number, first_Wh: number): number => y((of_Wh + (first_Wh - of_Wh) * 0.35) / 1000) - 10;
  const first = sweep.points[0] ?? shown;
  return (
    <div class="sizing-chart" ref={ref}>
      <svg
        width={width}
        height={height}
        role="img"
        aria-label={text.chart(sweep.windows.join(', '), text.kinds[sweep.swept])}
        onPointerDown={pick}
        onPointerMove={pick}
      >
        {marks.map((v) => (
          <g key={v}>
            <path class="rule" d={`M${LEFT} ${Math.round(y(v)) + 0.5}H${width - RIGHT}`} />
            <text class="axis" x={LEFT - 6} y={y(v) + 4.5} text-anchor="end">
              {fixed(v, step < 1 ? 1 : 0)}
            </text>
          </g>
        ))}
        <text class="axis" x={0} y={11}>
          {text.yAxis}
        </text>
        {amounts
          .filter((_, i) => i % (sweep.unit === '' ? 2 : 5) === 0)
          .map((a) => (
            <text key={a} class="axis" x={x(a)} y={height - FOOT + 17} text-anchor="middle">
              {fixed(a, sweep.unit === '' ? 2 : 1)}
            </text>
          ))}
        <text class="axis" x={width - RIGHT} y={height - 2} text-anchor="end">
          {sweep.unit === '' ? text.axis.g : text.axis.depth}
        </text>
        {target_kWh === null ? null : (
          <g class="target">
            <path d={`M${LEFT} ${y(target_kWh)}H${width - RIGHT}`} />
            <text x={width - RIGHT} y={y(target_kWh) - 5} text-anchor="end">
              {text.targetMark}
            </text>
          </g>
        )}
        {sweep.now === null ? null : (
          <g class="now">
            <path d={`M${x(sweep.now)} ${TOP}V${height - FOOT}`} />
            <text x={x(sweep.now) + 4} y={TOP - 4}>
              {text.now}
            </text>
          </g>
        )}
        <path class="summer" d={line((p) => p.summer_Wh)} />
        <path class="winter" d={line((p) => p.winter_Wh)} />
        <text class="name" x={width - RIGHT} y={nameAt(named.summer_Wh, first.summer_Wh)} text-anchor="end">
          {text.summer}
        </text>
        <text class="name" x={width - RIGHT} y={nameAt(named.winter_Wh, first.winter_Wh)} text-anchor="end">
          {text.winter}
        </text>
        <path class="picked" d={`M${x(shown.amount)} ${TOP}V${height - FOOT}`} />
        <circle class="picked" cx={x(shown.amount)} cy={y(shown.summer_Wh / 1000)} r="4" />
        <circle class="picked" cx={x(shown.amount)} cy={y(shown.winter_Wh / 1000)} r="4" />
      </svg>
    </div>
  );
}
