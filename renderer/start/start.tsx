import { signal } from '@preact/signals';
import { useEffect } from 'preact/hooks';
import type { Answer } from '../../app/contract/host.ts';
import { host } from '../bridge/host.ts';
import { openPlace } from '../place/place-dialog.tsx';
import {
  beginScheme,
  isReading,
  openByDialog,
  openDemo,
  openRecent,
  openRecovered,
  takeOpened,
} from '../state/files.ts';
import { tell } from '../state/messages.ts';
import { version } from '../state/program.ts';
import { Button } from '../ui/button.tsx';
import { words } from '../words/words.ts';

const demos = signal<Answer<'host:hello'>['demos']>([]);
const recent = signal<Answer<'scheme:recent'>>([]);
const kept = signal<Answer<'scheme:recover'>>([]);

/** Greets the host once: what it was started with is opened, what it offers is listed. */
export async function greetHost(): Promise<void> {
  const [hello, lately, unsaved] = await Promise.all([
    host['host:hello'](null),
    host['scheme:recent'](null),
    host['scheme:recover'](null),
  ]);
  if (lately.ok) recent.value = lately.value;
  if (unsaved.ok) kept.value = unsaved.value;
  if (!hello.ok) return tell('failure', hello.message);
  demos.value = hello.value.demos;
  version.value = hello.value.version;
  const { opened, example } = hello.value;
  if (opened !== null) takeOpened(opened);
  // Work that waits to be brought back goes before an example, which can be had at any time.
  else if (example !== null && kept.value.length === 0) await openDemo(example);
}

/** Nothing is open yet: the ways to begin. */
export function Start() {
  useEffect(() => {
    document.title = words.app;
  }, []);
  return (
    <main class="start">
      <section>
        <h2>{words.start.title}</h2>
        <p class="soft">{isReading.value ? words.start.reading : words.start.line}</p>
        <div class="actions">
          <Button tone="primary" onPress={() => beginScheme(openPlace)}>
            {words.bar.begin}
          </Button>
          <Button onPress={() => void openByDialog()}>{words.bar.open}</Button>
        </div>
      </section>
      <Recovered />
      <Recent />
      <Demos />
    </main>
  );
}

function Recovered() {
  if (kept.value.length === 0) return null;
  return (
    <section>
      <h3>{words.start.recovered}</h3>
      <ul>
        {kept.value.map((slot) => (
          <li key={slot.key}>
            <span class="name">{slot.name}</span>
            <span class="soft">{words.start.recoveredAt(new Date(slot.saved).toLocaleString())}</span>
            <Button onPress={() => openRecovered(slot)}>{words.start.recover}</Button>
            <Button
              tone="plain"
              onPress={() => {
                void host['scheme:discard']({ key: slot.key });
                kept.value = kept.value.filter((other) => other.key !== slot.key);
              }}
            >
              {words.start.discard}
            </Button>
          </li>
        ))}
      </ul>
    </section>
  );
}

function Recent() {
  if (recent.value.length === 0) return null;
  return (
    <section>
      <h3>{words.start.recent}</h3>
      <ul>
        {recent.value.map((entry) => (
          <li key={entry.id}>
            <button type="button" class="link" onClick={() => void openRecent(entry.id)}>
              {entry.name}
            </button>
            <span class="soft">{new Date(entry.opened).toLocaleDateString()}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}

function Demos() {
  if (demos.value.length === 0) return null;
  return (
    <section>
      <h3>{words.start.examples}</h3>
      <ul>
        {demos.value.map((demo) => (
          <li key={demo.key}>
            <button type="button" class="link" onClick={() => void openDemo(demo.key)}>
              {demo.name}
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}
