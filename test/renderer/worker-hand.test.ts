import { describe, expect, it, vi } from 'vitest';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { FromWorker, ToWorker } from '../../core/study/job.ts';
import type { Work } from '../../renderer/jobs/tasks.ts';
import { WorkerHand, type WorkerLike } from '../../renderer/jobs/worker-hand.ts';

/** A worker that does what the test tells it to. */
class HandWorker implements WorkerLike {
  readonly heard: ToWorker<Work>[] = [];
  isEnded = false;
  onmessage: WorkerLike['onmessage'] = null;
  onerror: WorkerLike['onerror'] = null;
  onmessageerror: WorkerLike['onmessageerror'] = null;
  postMessage(message: unknown): void {
    this.heard.push(message as ToWorker<Work>);
  }
  terminate(): void {
    this.isEnded = true;
  }
  say(message: FromWorker<unknown>): void {
    this.onmessage?.({ data: message } as MessageEvent);
  }
  die(message: string): void {
    this.onerror?.({ message } as ErrorEvent);
  }
  get runs(): readonly Extract<ToWorker<Work>, { kind: 'run' }>[] {
    return this.heard.filter((m) => m.kind === 'run');
  }
}

function handWith(): { hand: WorkerHand; workers: HandWorker[]; last: () => HandWorker } {
  const workers: HandWorker[] = [];
  const hand = new WorkerHand(() => {
    const worker = new HandWorker();
    workers.push(worker);
    return worker;
  });
  return { hand, workers, last: () => workers.at(-1) as HandWorker };
}

const read = (hand: WorkerHand, text: string) => hand.run('read', { text });
const scheme = (title: string): Scheme => ({ title }) as Scheme;

describe('a hand and its worker', () => {
  it('starts the worker with the first job and gives back its result', async () => {
    const { hand, workers, last } = handWith();
    expect(workers).toHaveLength(0);
    const outcome = read(hand, 'a');
    last().say({ kind: 'done', job: last().runs[0]?.job ?? -1, result: 'answer' });
    expect(await outcome).toEqual({ kind: 'done', result: 'answer', superseded: false });
  });

  it('keeps one job in flight: a newer one cancels it and waits for its answer', async () => {
    const { hand, last } = handWith();
    const first = read(hand, 'a');
    const second = read(hand, 'b');
    expect(last().runs).toHaveLength(1);
    expect(last().heard.at(-1)).toEqual({ kind: 'cancel', job: 1 });
    last().say({ kind: 'done', job: 1, result: null });
    expect(await first).toEqual({ kind: 'stopped' });
    expect(last().runs.map((m) => m.job)).toEqual([1, 2]);
    last().say({ kind: 'done', job: 2, result: 'b' });
    expect(await second).toMatchObject({ kind: 'done', result: 'b' });
  });

  it('keeps only the newest of those that wait', async () => {
    const { hand, last } = handWith();
    const first = read(hand, 'a');
    const second = read(hand, 'b');
    const third = read(hand, 'c');
    expect(await second).toEqual({ kind: 'stopped' });
    last().say({ kind: 'done', job: 1, result: 'late' });
    expect(await first).toEqual({ kind: 'done', result: 'late', superseded: true });
    expect(last().runs.map((m) => m.job)).toEqual([1, 3]);
    last().say({ kind: 'done', job: 3, result: 'c' });
    expect(await third).toMatchObject({ kind: 'done', result: 'c' });
  });

  it('drops what an old job still says', async () => {
    const { hand, last } = handWith();
    const progress = vi.fn();
    const outcome = hand.run('read', { text: 'a' }, null, progress);
    last().say({ kind: 'progress', job: 99, done: 1, total: 2 });
    last().say({ kind: 'done', job: 99, result: 'old' });
    last().say({ kind: 'progress', job: 1, done: 1, total: 2 });
    last().say({ kind: 'done', job: 1, result: 'new' });
    expect(await outcome).toMatchObject({ result: 'new' });
    expect(progress.mock.calls).toEqual([[1, 2]]);
  });

  it('sends a scheme once and then only its revision', async () => {
    const { hand, last } = handWith();
    const one = scheme('one');
    const ask = { instant_ms: 0, date: '2025-06-21', wantModel: false };
    void hand.run('moment', ask, one);
    last().say({ kind: 'done', job: 1, result: {} });
    void hand.run('moment', ask, one);
    last().say({ kind: 'done', job: 2, result: {} });
    void hand.run('moment', ask, scheme('two'));
    expect(last().runs.map((m) => m.input.scheme?.title ?? null)).toEqual(['one', null, 'two']);
    expect(last().runs.map((m) => m.input.revision)).toEqual([1, 1, 2]);
  });

  it('says that a worker died, and sends the scheme again to the next one', async () => {
    const { hand, workers, last } = handWith();
    const one = scheme('one');
    const ask = { notes: [], weather: null };
    const outcome = hand.run('check', ask, one);
    last().die('out of memory');
    expect(await outcome).toEqual({ kind: 'failed', message: 'out of memory' });
    expect(last().isEnded).toBe(true);
    void hand.run('check', ask, one);
    expect(workers).toHaveLength(2);
    expect(last().runs[0]?.input.scheme).toBe(one);
  });

  it('reports what the worker could not do', async () => {
    const { hand, last } = handWith();
    const outcome = read(hand, 'a');
    last().say({ kind: 'failed', job: 1, code: 'internal', message: 'no such window' });
    expect(await outcome).toEqual({ kind: 'failed', message: 'no such window' });
  });

  it('ends a worker that does not answer a cancel, and goes on with the next job', async () => {
    vi.useFakeTimers();
    const { hand, workers, last } = handWith();
    const first = read(hand, 'a');
    const second = read(hand, 'b');
    await vi.advanceTimersByTimeAsync(6000);
    expect(await first).toEqual({ kind: 'stopped' });
    expect(workers[0]?.isEnded).toBe(true);
    last().say({ kind: 'done', job: 2, result: 'b' });
    expect(await second).toMatchObject({ result: 'b' });
    vi.useRealTimers();
  });

  it('fails, and does not throw, when no worker can be made', async () => {
    const hand = new WorkerHand(() => {
      throw new Error('blocked');
    });
    expect(await read(hand, 'a')).toEqual({ kind: 'failed', message: 'blocked' });
  });
});
