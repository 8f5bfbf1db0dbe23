import { isUnsaved, redoEdit, redoName, scheme, undoEdit, undoName } from '../state/document.ts';
import { beginScheme, leaveScheme, openByDialog, save, saveAs } from '../state/files.ts';
import { checkJob, runCheck } from '../state/studies.ts';
import { switchTheme, theme } from '../state/theme.ts';
import { openPlace } from '../place/place-dialog.tsx';
import { Exports } from '../sheets/exports.tsx';
import { Button } from '../ui/button.tsx';
import { Menu } from '../ui/menu.tsx';
import { openFacts } from './facts-dialog.tsx';
import { degrees, placeOnEarth } from '../ui/format.ts';
import { DayIcon, MoonIcon, RedoIcon, UndoIcon } from '../ui/icons.tsx';
import { words } from '../words/words.ts';

/** Whose scheme this is and where, and what can be done with the whole of it. */
export function TopBar() {
  const isOpen = scheme.value !== null;
  return (
    <header class="top-bar">
      <Titles />
      <SchemeMenu />
      {isOpen ? <OpenActions /> : null}
      <ThemeSwitch />
    </header>
  );
}

function Titles() {
  const open = scheme.value;
  if (open === null) {
    return (
      <div class="titles">
        <h1>{words.app}</h1>
      </div>
    );
  }
  const { site, title, revision } = open;
  const facts = [
    revision === '' ? '' : words.bar.revision(revision),
    placeOnEarth(site.latitude, site.longitude),
    site.zone,
    words.bar.north(degrees(site.north)),
  ].filter((text) => text !== '');
  return (
    <div class="titles">
      <h1 title={title}>{title || words.bar.untitled}</h1>
      {isUnsaved.value ? <span class="unsaved">{words.bar.unsaved}</span> : null}
      <button type="button" class="facts-button" title={words.place.title} onClick={openPlace}>
        <span class="facts">{facts.join(' · ')}</span>
      </button>
    </div>
  );
}

/** What can be done with schemes as a whole. */
function SchemeMenu() {
  const isOpen = scheme.value !== null;
  return (
    <Menu
      text={words.bar.menu}
      items={[
        { text: words.bar.begin, onPress: () => beginScheme(openPlace) },
        { text: words.bar.open, onPress: () => void openByDialog() },
        ...(isOpen
          ? [
              { text: words.bar.saveAs, onPress: () => void saveAs() },
              { text: words.facts.open, onPress: openFacts },
              { text: words.bar.leave, onPress: leaveScheme },
            ]
          : []),
      ]}
    />
  );
}

function OpenActions() {
  const isChecking = checkJob.value.kind === 'working';
  return (
    <>
      <Button onPress={() => void save()}>{words.bar.save}</Button>
      <UndoButtons />
      <Exports />
      <Button tone="primary" off={isChecking} onPress={() => void runCheck()}>
        {isChecking ? words.bar.checking : words.bar.check}
      </Button>
    </>
  );
}

function UndoButtons() {
  const [undo, redo] = [undoName.value, redoName.value];
  return (
    <div class="group">
      <Button
        icon
        off={undo === null}
        label={undo === null ? words.bar.nothingToUndo : words.bar.undo(undo)}
        onPress={undoEdit}
      >
        <UndoIcon />
      </Button>
      <Button
        icon
        off={redo === null}
        label={redo === null ? words.bar.nothingToRedo : words.bar.redo(redo)}
        onPress={redoEdit}
      >
        <RedoIcon />
      </Button>
    </div>
  );
}

function ThemeSwitch() {
  const isDark = theme.value === 'dark';
  const to = isDark ? words.bar.toLight : words.bar.toDark;
  return (
    <Button icon tone="plain" label={words.bar.theme(to)} onPress={switchTheme}>
      {isDark ? <DayIcon /> : <MoonIcon />}
    </Button>
  );
}

/** Shortcuts of the whole window. @returns whether the key was one */
export function pressShortcut(event: KeyboardEvent): boolean {
  if (!(event.ctrlKey || event.metaKey) || event.altKey) return false;
  const key = event.key.toLowerCase();
  if (key === 'o') void openByDialog();
  else if (key === 's') void (event.shiftKey ? saveAs() : save());
  else if (key === 'z' && event.shiftKey) redoEdit();
  else if (key === 'z') undoEdit();
  else if (key === 'y') redoEdit();
  else return false;
  return true;
}
