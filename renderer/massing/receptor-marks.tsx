import { isSelected } from '../state/selection.ts';
import { model } from '../state/studies.ts';
import { project } from './camera.ts';
import { camera, size } from './view-state.ts';

/** Receptor points: a ring where each stands, on a dotted line down to the ground. They show through what hides them. */
export function ReceptorMarks() {
  const points = model.value?.value.receptors.filter((r) => r.kind === 'point') ?? [];
  if (points.length === 0) return null;
  return (
    <svg class="receptor-marks" aria-hidden="true">
      {points.map(({ id, at }) => {
        const [x, y] = project(camera.value, size.value, at);
        const [gx, gy] = project(camera.value, size.value, [at[0], at[1], 0]);
        return (
          <g key={id} class={isSelected('receptor', id) ? 'chosen' : ''}>
            <path class="stem" d={`M${gx} ${gy}L${x} ${y}`} />
            <circle cx={x} cy={y} r="5" />
            <circle class="core" cx={x} cy={y} r="1.8" />
          </g>
        );
      })}
    </svg>
  );
}
