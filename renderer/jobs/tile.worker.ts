import { tiler, type ToTiler } from '../../core/study/tile-pool.ts';

/** What a worker of the pool runs: tiles of maps, until it is ended. */
const hear = tiler((message) => self.postMessage(message));
self.onmessage = (event: MessageEvent<ToTiler>) => hear(event.data);
