import type { Sweep, SweepPoint } from '../../core/sizing/sweep.ts';
import { axisTop } from '../findings/room-curve.ts';
import { fixed } from '../ui/format.ts';
import { useSize } from '../ui/use-size.ts';
import { ValueRules } from '../ui/value-rules.tsx';
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

/** Where amounts and gains lie on the screen [px]. */
type Scale = {
  readonly width: number;
  readonly foot: number;
  readonly x: (amount: number) => number;
  readonly y: (kWh: number) => number;
};

const text = words.sizing;

/** Summer and winter gain over the settings, told apart by their strokes and named where they run. */
export function SizingChart({ sweep, target_kWh, shown, onPick }: Props) {
  const { ref, width, height } = useSize<HTMLDivElement>();
  const amounts = sweep.points.map((p) => p.amount);
  const [from, to] = [amounts[0] ?? 0, amounts.at(-1) ?? 1];
  const most = Math.max(...sweep.points.map((p) => Math.max(p.summer_Wh, p.winter_Wh)), 1) / 1000;
  const { top, step } = axisTop(Math.max(most, target_kWh ?? 0) * 1.06);
  const scale: Scale = {
    width,
    foot: height - FOOT,
    x: (amount) => LEFT + ((amount - from) / (to - from || 1)) * (width - LEFT - RIGHT),
    y: (kWh) => height - FOOT - (kWh / top) * (height - FOOT - TOP),
  };
  const pick = (event: PointerEvent & { readonly currentTarget: SVGSVGElement }): void => {
    if (event.type === 'pointermove' && event.buttons === 0) return;
    const at = event.clientX - event.currentTarget.getBoundingClientRect().left;
    onPick(from + ((at - LEFT) / (width - LEFT - RIGHT)) * (to - from));
  };
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
        <ValueRules top={top} step={step} left={LEFT} right={width - RIGHT} y={scale.y} unit={text.yAxis} />
        <Amounts sweep={sweep} scale={scale} height={height} />
        <Marks sweep={sweep} scale={scale} target_kWh={target_kWh} />
        <Curves sweep={sweep} scale={scale} />
        <path class="picked" d={`M${scale.x(shown.amount)} ${TOP}V${scale.foot}`} />
        {[shown.summer_Wh, shown.winter_Wh].map((wh, i) => (
          <circle key={i} class="picked" cx={scale.x(shown.amount)} cy={scale.y(wh / 1000)} r="4" />
        ))}
      </svg>
    </div>
  );
}

function Amounts({ sweep, scale, height }: { sweep: Sweep; scale: Scale; height: number }) {
  const isGlass = sweep.unit === '';
  const shown = sweep.points.filter((_, i) => i % (isGlass ? 2 : 5) === 0);
  return (
    <>
      {shown.map(({ amount }) => (
        <text key={amount} class="axis" x={scale.x(amount)} y={scale.foot + 17} text-anchor="middle">
          {fixed(amount, isGlass ? 2 : 1)}
        </text>
      ))}
      <text class="axis" x={scale.width - RIGHT} y={height - 2} text-anchor="end">
        {isGlass ? text.axis.g : text.axis.depth}
      </text>
    </>
  );
}

/** What the windows have now, and the gain to come down to. */
function Marks({ sweep, scale, target_kWh }: { sweep: Sweep; scale: Scale; target_kWh: number | null }) {
  const { x, y, width, foot } = scale;
  return (
    <>
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
          <path d={`M${x(sweep.now)} ${TOP}V${foot}`} />
          <text x={x(sweep.now) + 4} y={TOP - 4}>
            {text.now}
          </text>
        </g>
      )}
    </>
  );
}

/** Both curves, each named near its end. */
function Curves({ sweep, scale }: { sweep: Sweep; scale: Scale }) {
  const { points } = sweep;
  const curve = (name: 'summer' | 'winter', of: (p: SweepPoint) => number) => {
    const line = points.map((p) => `${scale.x(p.amount).toFixed(1)} ${scale.y(of(p) / 1000).toFixed(1)}`).join('L');
    const [first, last] = [points[0], points.at(-1)];
    if (first === undefined || last === undefined) return null;
    const at = scale.y((of(last) + (of(first) - of(last)) * 0.35) / 1000) - 10;
    return (
      <g key={name}>
        <path class={name} d={`M${line}`} />
        <text class="name" x={scale.width - RIGHT} y={at} text-anchor="end">
          {text[name]}
        </text>
      </g>
    );
  };
  return (
    <>
      {curve('summer', (p) => p.summer_Wh)}
      {curve('winter', (p) => p.winter_Wh)}
    </>
  );
}
