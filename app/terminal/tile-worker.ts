import { parentPort } from 'node:worker_threads';
import { tiler, type ToTiler } from '../../core/study/tile-pool.ts';

/** What a worker thread of the command runs: tiles of maps, until it is ended. */
const port = parentPort;
if (port === null) throw new Error('tile-worker is started by the command, not by hand');
const hear = tiler((message) => port.postMessage(message));
port.on('message', (message: ToTiler) => hear(message));
