import { useCallback, useState } from 'preact/hooks';
import { MapKey } from '../maps/map-key.tsx';
import { MapButton, MapPanel } from '../maps/map-panel.tsx';
import type { Side } from '../maps/map-picture.ts';
import { isChangeWanted, isMapOn, side } from '../maps/map-state.ts';
import { stage } from '../state/stage.ts';
import { moment, momentJob } from '../state/studies.ts';
import { Button } from '../ui/button.tsx';
import { Choice } from '../ui/choice.tsx';
import { AllIcon, MinusIcon, PlusIcon } from '../ui/icons.tsx';
import { words } from '../words/words.ts';
import { Caption } from './caption.tsx';
import { CellMark, CellReader } from './cell-mark.tsx';
import { zoomBy } from './gestures.ts';
import { Key, NorthPoint, ScaleBar, SelectionOutline, SelectionTag } from './instruments.tsx';
import { laidMap } from './laid-map.ts';
import { MassingCanvas } from './massing-canvas.tsx';
import { PlanDrawing } from './plan-drawing.tsx';
import { ReceptorMarks } from './receptor-marks.tsx';
import { isPlan, lookAs, showAll } from './view-state.ts';
import './massing.css';
import '../maps/maps.css';

/** The scheme as a drawing: massing or plan, with the shadows of the moment. */
export function Massing() {
  const [graphics, setGraphics] = useState<'here' | 'none' | 'lost'>('here');
  const onUnavailable = useCallback((isLost: boolean) => setGraphics(isLost ? 'lost' : 'none'), []);
  const has3d = graphics === 'here';
  return (
    <section class="massing" aria-label={words.massing.label}>
      {has3d ? <MassingCanvas onUnavailable={onUnavailable} /> : <PlanDrawing />}
      <div class="massing-tools">
        {has3d ? <ViewChoice /> : null}
        <StageChoice />
        {has3d ? <MapButton /> : null}
        {has3d ? (
          <div class="group">
            <Button icon onPress={() => zoomBy(-1)} label={words.massing.zoomOut}>
              <MinusIcon />
            </Button>
            <Button icon onPress={() => zoomBy(1)} label={words.massing.zoomIn}>
              <PlusIcon />
            </Button>
            <Button icon onPress={showAll} label={words.massing.fit}>
              <AllIcon />
            </Button>
          </div>
        ) : null}
      </div>
      {has3d ? <MapPanel /> : null}
      {has3d && isMapOn.value ? <MapKey /> : <Key />}
      {has3d ? (
        <>
          <SelectionOutline />
          <ReceptorMarks />
          <SelectionTag />
          <CellMark />
          <CellReader />
        </>
      ) : null}
      <div class="massing-foot">
        {has3d ? <ScaleBar /> : null}
        <div class="captions">
          <MassingNote graphics={graphics} />
          <Caption />
        </div>
        {has3d ? <NorthPoint /> : null}
      </div>
    </section>
  );
}

function ViewChoice() {
  return (
    <Choice
      label={words.massing.view}
      value={isPlan.value ? 'plan' : 'massing'}
      options={[
        { value: 'massing', text: words.massing.axonometric },
        { value: 'plan', text: words.massing.plan },
      ]}
      onChoose={lookAs}
    />
  );
}

/** What stands in the drawing; of a map also what the proposal changes. */
function StageChoice() {
  const change = { value: 'change', text: words.maps.change } as const;
  return (
    <Choice<Side>
      label={words.massing.stage}
      value={isMapOn.value ? side.value : stage.value}
      options={[
        { value: 'before', text: words.massing.before },
        { value: 'after', text: words.massing.after },
        ...(isMapOn.value ? [change] : []),
      ]}
      onChoose={(value) => {
        isChangeWanted.value = value === 'change';
        stage.value = value === 'change' ? 'after' : value;
      }}
    />
  );
}

function MassingNote({ graphics }: { graphics: 'here' | 'none' | 'lost' }) {
  const job = momentJob.value;
  const isDown = !isMapOn.value && moment.value !== null && moment.value.value.shadows === null;
  const text =
    job.kind === 'failed'
      ? words.status.workerFailed(words.massing.label, job.message)
      : graphics === 'none'
        ? words.massing.noGraphics
        : graphics === 'lost'
          ? words.massing.lostToPlan
          : laidMap.value?.atlas === null
            ? words.maps.tooWide
            : isDown
              ? words.massing.sunDown
              : '';
  return (
    <p class="massing-note" role="status">
      {text}
    </p>
  );
}
