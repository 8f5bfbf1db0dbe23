import { useCallback, useState } from 'preact/hooks';
import type { Stage } from '../../core/form/model.ts';
import { moment, momentJob } from '../state/studies.ts';
import { Button } from '../ui/button.tsx';
import { Choice } from '../ui/choice.tsx';
import { AllIcon, MinusIcon, PlusIcon } from '../ui/icons.tsx';
import { words } from '../words/words.ts';
import { Caption } from './caption.tsx';
import { zoomBy } from './gestures.ts';
import { Key, NorthPoint, ScaleBar, SelectionOutline, SelectionTag } from './instruments.tsx';
import { MassingCanvas } from './massing-canvas.tsx';
import { PlanDrawing } from './plan-drawing.tsx';
import { isPlan, lookAs, showAll, stage } from './view-state.ts';
import './massing.css';

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
      <Key />
      {has3d ? (
        <>
          <SelectionOutline />
          <SelectionTag />
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

function StageChoice() {
  return (
    <Choice<Stage>
      label={words.massing.stage}
      value={stage.value}
      options={[
        { value: 'before', text: words.massing.before },
        { value: 'after', text: words.massing.after },
      ]}
      onChoose={(value) => {
        stage.value = value;
      }}
    />
  );
}

function MassingNote({ graphics }: { graphics: 'here' | 'none' | 'lost' }) {
  const job = momentJob.value;
  const isDown = moment.value !== null && moment.value.value.shadows === null;
  const text =
    job.kind === 'failed'
      ? words.status.workerFailed(words.massing.label, job.message)
      : graphics === 'none'
        ? words.massing.noGraphics
        : graphics === 'lost'
          ? words.massing.lostToPlan
          : isDown
            ? words.massing.sunDown
            : '';
  return (
    <p class="massing-note" role="status">
      {text}
    </p>
  );
}
