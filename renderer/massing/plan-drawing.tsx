import { stands } from '../../core/form/stands.ts';
import type { Region } from '../../core/plane/region.ts';
import type { Ring } from '../../core/plane/vec.ts';
import { receptorName } from '../state/names.ts';
import { isSelected, type Picked, select } from '../state/selection.ts';
import { stage } from '../state/stage.ts';
import { model, moment } from '../state/studies.ts';
import { words } from '../words/words.ts';

const ROOM_m = 4;

const pathOf = (ring: Ring): string => `M${ring.map(([x, y]) => `${x.toFixed(3)} ${(-y).toFixed(3)}`).join('L')}Z`;
const regionsPath = (regions: readonly Region[]): string =>
  regions.map((r) => [r.outer, ...r.holes].map(pathOf).join('')).join('');

/** The plan without the graphics card: the same polygons as an ordinary vector drawing. */
export function PlanDrawing() {
  const shapes = model.value?.value;
  if (shapes === undefined) return <div class="massing-canvas" />;
  const [minX, minY, maxX, maxY] = shapes.extent;
  const view = `${minX - ROOM_m} ${-maxY - ROOM_m} ${maxX - minX + 2 * ROOM_m} ${maxY - minY + 2 * ROOM_m}`;
  const change = moment.value?.value.shadows ?? null;
  const isAfter = stage.value === 'after';
  return (
    <svg class="massing-canvas plan-drawing" viewBox={view} aria-label={words.massing.plan}>
      <defs>
        <pattern id="added-hatch" width="1" height="1" patternUnits="userSpaceOnUse" patternTransform="rotate(-45)">
          <path class="hatch-line" d="M0 0.5H1" />
        </pattern>
      </defs>
      {shapes.boundary === null ? null : <path class="plot" d={pathOf(shapes.boundary)} />}
      {change === null ? null : (
        <>
          <path class="shadow" d={regionsPath(change[stage.value].regions)} />
          {isAfter ? <path class="added" d={regionsPath(change.added.regions)} /> : null}
          {isAfter ? <path class="added-lines" d={regionsPath(change.added.regions)} fill="url(#added-hatch)" /> : null}
        </>
      )}
      {shapes.receptors.map((r) =>
        r.kind === 'area' ? (
          <Thing key={r.id} kind="receptor" id={r.id} d={pathOf(r.outline)} name={receptorName(r)} look="area" />
        ) : null,
      )}
      {shapes.solids.map((solid) => (
        <Thing
          key={solid.id}
          kind="block"
          id={solid.id}
          d={pathOf(solid.outline)}
          name={`${solid.name || solid.id}, ${words.massing.standing[solid.standing]}`}
          look={`block ${solid.standing} ${stands(solid.standing, stage.value) ? '' : 'gone'}`}
        />
      ))}
      {shapes.receptors.map((r) =>
        r.kind === 'point' ? (
          <Thing key={r.id} kind="receptor" id={r.id} d={ringPath(r.at)} name={receptorName(r)} look="point" />
        ) : null,
      )}
    </svg>
  );
}

const POINT_m = 0.7;

/** A small ring round a point. */
const ringPath = ([x, y]: readonly [number, number, number]): string =>
  `M${x - POINT_m} ${-y}a${POINT_m} ${POINT_m} 0 1 0 ${2 * POINT_m} 0a${POINT_m} ${POINT_m} 0 1 0 ${-2 * POINT_m} 0Z`;

type ThingProps = {
  readonly kind: Picked;
  readonly id: string;
  readonly d: string;
  readonly name: string;
  readonly look: string;
};

/** Something of the plan that can be picked. */
function Thing({ kind, id, d, name, look }: ThingProps) {
  const pick = (): void => select(kind, id);
  return (
    // biome-ignore lint/a11y/useSemanticElements: a button cannot stand inside a drawing
    <path
      class={`${look} ${isSelected(kind, id) ? 'chosen' : ''}`}
      d={d}
      role="button"
      tabIndex={0}
      aria-label={name}
      onClick={pick}
      onKeyDown={(event) => {
        if (event.key === 'Enter' || event.key === ' ') pick();
      }}
    />
  );
}
