/** Milliseconds a job may compute before it lets messages through: a frame holds two. */
const SLICE = 8;

/**
 * Lets the messages of a thread through while a job computes, so that it can be stopped: `await pauses.pause()` gives
 * way only when the last time is more than 8 ms ago, and throws the reason when the signal is aborted.
 */
export class Pauses {
  #last = performance.now();
  readonly #signal: AbortSignal | undefined;

  constructor(signal?: AbortSignal) {
    this.#signal = signal;
  }

  async pause(): Promise<void> {
    if (performance.now() - this.#last >= SLICE) {
      await nextTurn();
      this.#last = performance.now();
    }
    this.#signal?.throwIfAborted();
  }
}

/** Resolves after the messages that have arrived were taken. */
export function nextTurn(): Promise<void> {
  // In Node a message channel can starve the other ports; in a page timers are clamped to 4 ms and more.
  if (typeof setImmediate === 'function') return new Promise((resolve) => setImmediate(resolve));
  return new Promise((resolve) => {
    const { port1, port2 } = new MessageChannel();
    port1.onmessage = () => {
      port1.close();
      resolve();
    };
    port2.postMessage(null);
  });
}
