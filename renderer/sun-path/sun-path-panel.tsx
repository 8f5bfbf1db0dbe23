import { useLayoutEffect, useState } from 'preact/hooks';
import type { SunPathProjection } from '../../core/sheet/sun-path-view.ts';
import { leadOf } from '../state/selection.ts';
import { Button } from '../ui/button.tsx';
import { Choice } from '../ui/choice.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { Menu } from '../ui/menu.tsx';
import { words } from '../words/words.ts';
import { drawingOf } from './drawing-input.ts';
import { savePdf, saveSvg } from './save-drawing.ts';
import { SunPathDrawing } from './sun-path-drawing.tsx';
import { isMaskWanted, projection, showSunPath, sunPathFailure } from './sun-path-state.ts';
import './sun-path.css';

/** The sun's paths over the scheme's place. */
export function SunPathPanel() {
  const [isLarge, setLarge] = useState(false);
  useLayoutEffect(showSunPath, []);
  return (
    <div class="sun-path">
      <Tools>
        <Button onPress={() => setLarge(true)}>{words.sunPath.larger}</Button>
      </Tools>
      <SunPathDrawing />
      {isLarge ? <LargeSunPath onClose={() => setLarge(false)} /> : null}
    </div>
  );
}

/** The same drawing with the whole window to itself. */
function LargeSunPath({ onClose }: { readonly onClose: () => void }) {
  return (
    <div class="sun-path-large">
      <Dialog
        title={words.sunPath.label}
        onClose={onClose}
        actions={<Button onPress={onClose}>{words.sunPath.close}</Button>}
      >
        <div class="sun-path large">
          <Tools />
          <SunPathDrawing />
        </div>
      </Dialog>
    </div>
  );
}

function Tools({ children }: { readonly children?: preact.ComponentChildren }) {
  return (
    <div class="sun-path-tools">
      <Choice<SunPathProjection>
        label={words.sunPath.projection}
        value={projection.value}
        options={[
          { value: 'stereographic', text: words.sunPath.stereographic },
          { value: 'altitude-azimuth', text: words.sunPath.altitudeAzimuth },
        ]}
        onChoose={(value) => {
          projection.value = value;
        }}
      />
      <MaskChoice />
      <div class="sun-path-actions">
        {children}
        <Menu
          text={words.sunPath.save}
          off={drawingOf.value === null}
          items={[
            { text: words.sunPath.svg, onPress: () => void saveSvg() },
            { text: words.sunPath.pdf, onPress: () => void savePdf() },
          ]}
        />
      </div>
      <Failure />
    </div>
  );
}

/** Whether what hides the sky from the selected window is drawn. */
function MaskChoice() {
  const window = leadOf('window') ?? leadOf('receptor');
  if (window === null) return <p class="soft">{words.sunPath.maskNone}</p>;
  return (
    <label class="check">
      <input
        type="checkbox"
        checked={isMaskWanted.value}
        onChange={(event) => {
          isMaskWanted.value = event.currentTarget.checked;
        }}
      />
      {words.sunPath.mask(window)}
    </label>
  );
}

function Failure() {
  const why = sunPathFailure.value;
  if (why !== null)
    return (
      <p class="notice" role="alert">
        {words.status.workerFailed(words.sunPath.label, why)}
      </p>
    );
  return (
    <p class="soft" role="status">
      {drawingOf.value === null ? words.sunPath.working : ''}
    </p>
  );
}
