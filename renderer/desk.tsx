import { signal } from '@preact/signals';
import { useLayoutEffect } from 'preact/hooks';
import { Clock } from './moment/clock.tsx';
import { Cautions } from './ui/cautions.tsx';
import { Drawer, showWeather } from './drawer.tsx';
import { Findings } from './findings/findings.tsx';
import { Massing } from './massing/massing.tsx';
import { PlaceDialog } from './place/place-dialog.tsx';
import { isSheetsShown } from './sheets/sheet-state.ts';
import { PrintRoot, SheetsView } from './sheets/sheets-view.tsx';
import { AboutButton, AboutDialog } from './start/about-dialog.tsx';
import { FactsDialog } from './start/facts-dialog.tsx';
import { FaultsDialog } from './start/faults-dialog.tsx';
import { Start } from './start/start.tsx';
import { TopBar } from './start/top-bar.tsx';
import { UnsavedDialog } from './start/unsaved-dialog.tsx';
import { scheme } from './state/document.ts';
import { openDropped } from './state/files.ts';
import { dismissMessage, message } from './state/messages.ts';
import { MessageLine } from './ui/message-line.tsx';
import { takeWeather } from './weather/weather-state.ts';
import { words } from './words/words.ts';
import './ui/fonts.css';
import './ui/tokens.css';
import './ui/base.css';
import './desk.css';

const isOver = signal(false);

/** A table of hours is the open scheme's weather; anything else is taken for a scheme. */
async function takeDropped(file: File): Promise<void> {
  if (scheme.peek() === null || !/\.(csv|tsv|txt)$/i.test(file.name)) return openDropped(file);
  isSheetsShown.value = false;
  showWeather();
  await takeWeather({ name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) });
}

/** A file may be dropped anywhere on the window. */
function useDrop(): void {
  useLayoutEffect(() => {
    const hasFiles = (event: DragEvent): boolean => event.dataTransfer?.types.includes('Files') ?? false;
    const over = (event: DragEvent): void => {
      if (!hasFiles(event)) return;
      event.preventDefault();
      isOver.value = true;
    };
    const leave = (event: DragEvent): void => {
      if (event.relatedTarget === null) isOver.value = false;
    };
    const drop = (event: DragEvent): void => {
      if (!hasFiles(event)) return;
      event.preventDefault();
      isOver.value = false;
      const file = event.dataTransfer?.files[0];
      if (file !== undefined) void takeDropped(file);
    };
    document.addEventListener('dragover', over);
    document.addEventListener('dragleave', leave);
    document.addEventListener('drop', drop);
    return () => {
      document.removeEventListener('dragover', over);
      document.removeEventListener('dragleave', leave);
      document.removeEventListener('drop', drop);
    };
  }, []);
}

/** The whole window. */
export function Desk() {
  useDrop();
  return (
    <>
      <div class="desk">
        <TopBar />
        {scheme.value === null ? <Start /> : isSheetsShown.value ? <SheetsView /> : <OpenDesk />}
        <Cautions>
          <AboutButton />
        </Cautions>
      </div>
      <MessageLine shown={message.value} onDismiss={dismissMessage} />
      <FaultsDialog />
      <UnsavedDialog />
      <PlaceDialog />
      <FactsDialog />
      <AboutDialog />
      <PrintRoot />
      {isOver.value ? <div class="drop-cover">{words.drop}</div> : null}
    </>
  );
}

const OpenDesk = () => (
  <main class="open-desk">
    <Drawer />
    <div class="picture">
      <Massing />
      <Clock />
    </div>
    <Findings />
  </main>
);
