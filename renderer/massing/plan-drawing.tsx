import type { Solid } from '../../core/form/model.ts';
import { stands } from '../../core/form/stands.ts';
import type { Region } from '../../core/plane/region.ts';
import type { Ring } from '../../core/plane/vec.ts';
import { isSelected, select } from '../state/selection.ts';
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
      {shapes.solids.map((solid) => (
        <BlockOutline key={solid.id} solid={solid} />
      ))}
    </svg>
  );
}

function BlockOutline({ solid }: { solid: Solid }) {
  const isStanding = stands(solid.standing, stage.value);
  const classes = ['block', solid.standing, isStanding ? '' : 'gone', isSelected('block', solid.id) ? 'chosen' : ''];
  const pick = (): void => select('block', solid.id);
  return (
    // biome-ignore lint/a11y/useSemanticElements: a button cannot stand inside a drawing
    <path
      class={classes.join(' ')}
      d={pathOf(solid.outline)}
      role="button"
      tabIndex={0}
      aria-label={`${solid.name || solid.id}, ${words.massing.standing[solid.standing]}`}
      onClick={pick}
      onKeyDown={(event) => {
        if (event.key === 'Enter' || event.key === ' ') pick();
      }}
    />
  );
}
