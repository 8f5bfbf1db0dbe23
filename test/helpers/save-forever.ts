import { saveAtomic } from '../../app/files/save-atomic.ts';

/** Saves a file again and again, each time one letter 400 000 times, until it is killed: the other half of a test of saving. */
const path = process.argv[2] ?? '';
for (let i = 0; ; i++) await saveAtomic(path, String.fromCharCode(97 + (i % 26)).repeat(400_000));
