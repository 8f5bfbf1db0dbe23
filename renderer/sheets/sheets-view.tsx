import { useState } from 'preact/hooks';
import type { Scheme, SheetSet } from '../../core/scheme/schema.ts';
import { committed } from '../state/document.ts';
import { Button } from '../ui/button.tsx';
import { Choice } from '../ui/choice.tsx';
import { DrawingView } from '../ui/drawing-view.tsx';
import { Menu } from '../ui/menu.tsx';
import { Progress } from '../ui/progress.tsx';
import { words } from '../words/words.ts';
import { printing, printPages } from './print-pages.ts';
import { curesOf } from './sheet-cure.ts';
import { SheetPages, type Zoom } from './sheet-pages.tsx';
import { SheetSettings } from './sheet-settings.tsx';
import {
  change,
  draft,
  drawDraft,
  drawn,
  faults,
  isChanged,
  isFresh,
  isSheetsShown,
  job,
  keepDraft,
  keptSet,
  removeSet,
  setName,
  sets,
  stopDrawing,
} from './sheet-state.ts';
import { writeAll, writePage, writePdf, writeShadows } from './write-sheets.ts';
import './sheets.css';

const text = words.sheets;

/** The sheets with the window to themselves: what is drawn at the left, the pages as they will lie on paper at the right. */
export function SheetsView() {
  const scheme = committed.value;
  const [zoom, setZoom] = useState<Zoom>('fit');
  const [inView, setInView] = useState(0);
  if (scheme === null) return null;
  const now = drawn.value;
  return (
    <main class="sheets-view" aria-label={text.label}>
      <aside class="sheets-side" aria-label={text.settings}>
        <Button
          onPress={() => {
            isSheetsShown.value = false;
          }}
        >
          {text.back}
        </Button>
        <Sets />
        <SheetSettings scheme={scheme} />
        <KeepButtons />
      </aside>
      <div class="sheets-paper">
        <Tools zoom={zoom} onZoom={setZoom} inView={inView} />
        <State scheme={scheme} />
        {now === null ? null : (
          <div class={isFresh.value ? 'sheets-scroller' : 'sheets-scroller stale'}>
            <SheetPages document={now.document} zoom={zoom} onInView={setInView} />
          </div>
        )}
      </div>
    </main>
  );
}

/** The sets that the scheme keeps. */
function Sets() {
  const all = sets.value;
  return (
    <section class="sheet-sets">
      <h2>{text.sets}</h2>
      {all.length === 0 ? <p class="soft">{text.noSets}</p> : null}
      <ul>
        {all.map((set) => (
          <SetRow key={set.id} set={set} />
        ))}
      </ul>
      {all.length > 0 ? <Button onPress={() => void writeAll()}>{text.all}</Button> : null}
    </section>
  );
}

function SetRow({ set }: { set: SheetSet }) {
  const name = setName(set);
  return (
    <li>
      <button
        type="button"
        class="set-name"
        aria-pressed={draft.value.id === set.id}
        onClick={() => {
          draft.value = set;
        }}
      >
        {name}
      </button>
      <button type="button" class="link" aria-label={text.removeLabel(name)} onClick={() => removeSet(set)}>
        {text.remove}
      </button>
    </li>
  );
}

function KeepButtons() {
  const kept = keptSet.value;
  return (
    <div class="keep-buttons">
      {kept === null ? (
        <Button onPress={() => keepDraft(true)}>{text.keep}</Button>
      ) : (
        <>
          <Button off={!isChanged.value} onPress={() => keepDraft(false)}>
            {text.keepChanges}
          </Button>
          <Button onPress={() => keepDraft(true)}>{text.asNew}</Button>
        </>
      )}
    </div>
  );
}

type ToolsProps = { readonly zoom: Zoom; readonly onZoom: (zoom: Zoom) => void; readonly inView: number };

function Tools({ zoom, onZoom, inView }: ToolsProps) {
  const now = drawn.value;
  const off = now === null || !isFresh.value;
  const isStudy = now?.set.kind === 'shadow-study';
  const pages = now?.document.pages ?? [];
  return (
    <div class="sheets-tools">
      <Choice<Zoom>
        label={text.zoom}
        value={zoom}
        options={[
          { value: 'fit', text: text.fit },
          { value: 'actual', text: text.actual },
        ]}
        onChoose={onZoom}
      />
      <span class="soft pages-line" aria-live="polite">
        {now === null ? '' : `${text.pages(pages.length)} · ${pages[inView]?.title ?? ''}`}
      </span>
      <Menu
        text={text.save}
        off={off}
        items={[
          { text: text.pdf, onPress: () => void writePdf() },
          { text: text.svg, onPress: () => void writePage(inView, 'svg') },
          { text: text.png, onPress: () => void writePage(inView, 'png') },
          ...(isStudy
            ? [
                { text: text.geojson, onPress: () => void writeShadows('geojson') },
                { text: text.csv, onPress: () => void writeShadows('csv') },
              ]
            : []),
        ]}
      />
      <Button tone="primary" off={off} tip={text.printTip} onPress={() => void printPages(pages)}>
        {text.print}
      </Button>
    </div>
  );
}

/** What is being drawn, or why nothing can be, with what cures it. */
function State({ scheme }: { scheme: Scheme }) {
  const now = job.value;
  if (now.kind === 'working')
    return <Progress text={text.working} done={now.done} total={now.total} onStop={stopDrawing} />;
  if (now.kind === 'failed' || now.kind === 'stopped')
    return (
      <div class="notice" role="alert">
        <p>{now.kind === 'failed' ? now.message : text.stopped}</p>
        <Button onPress={() => void drawDraft()}>{text.again}</Button>
      </div>
    );
  if (faults.value.length === 0) return null;
  const cures = faults.value.flatMap((fault) => curesOf(fault, draft.value, scheme));
  return (
    <div class="notice" role="alert">
      <strong>{text.cannot}</strong>
      {faults.value.map((fault) => (
        <p key={fault.message}>
          {fault.message}; {fault.cure}.
        </p>
      ))}
      <div class="cures">
        {cures.map((cure) => (
          <Button key={cure.text} onPress={() => change(cure.change)}>
            {cure.text}
          </Button>
        ))}
      </div>
    </div>
  );
}

/** The pages for the printer, at true size; nothing of it is on the screen. */
export function PrintRoot() {
  const pages = printing.value;
  if (pages.length === 0) return null;
  return (
    <div class="print-root" aria-hidden="true">
      {pages.map((page, i) => (
        <div key={`${i} ${page.title}`} class="print-page">
          <DrawingView page={page} label={page.title} millimetres />
        </div>
      ))}
    </div>
  );
}
