import { fixed } from './format.ts';

type Props = {
  readonly top: number;
  readonly step: number;
  /** Ends of the rules on the screen [px]. */
  readonly left: number;
  readonly right: number;
  readonly y: (value: number) => number;
  readonly unit: string;
};

/** The level rules of a chart with their values, from 0 up to the top, and the unit above them. */
export function ValueRules({ top, step, left, right, y, unit }: Props) {
  const values = Array.from({ length: Math.round(top / step) + 1 }, (_, i) => i * step);
  return (
    <>
      {values.map((v) => (
        <g key={v}>
          <path class="rule" d={`M${left} ${Math.round(y(v)) + 0.5}H${right}`} />
          <text class="axis" x={left - 6} y={y(v) + 4.5} text-anchor="end">
            {fixed(v, step < 1 ? 1 : 0)}
          </text>
        </g>
      ))}
      <text class="axis" x={0} y={11}>
        {unit}
      </text>
    </>
  );
}
