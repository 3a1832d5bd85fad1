/** Quiet time after which figures out of sight are drawn. */
const LATER_MS = 150;

/**
 * Draws what is in or near the window at once, and the rest once a hand has come to rest: a change of a number draws the
 * figures the reader looks at first.
 */
export class WhenSeen {
  #seen = true;
  #waiting = 0;
  readonly #draw: () => void;
  readonly #observer: IntersectionObserver;

  constructor(draw: () => void) {
    this.#draw = draw;
    this.#observer = new IntersectionObserver(
      (entries) => {
        this.#seen = entries.at(-1)?.isIntersecting ?? true;
        if (this.#seen && this.#waiting !== 0) this.#now();
      },
      { rootMargin: '120px' },
    );
  }

  watch(element: Element): void {
    this.#observer.observe(element);
    window.addEventListener('beforeprint', this.#print);
  }

  stop(): void {
    this.#observer.disconnect();
    window.removeEventListener('beforeprint', this.#print);
    this.#forget();
  }

  /** Asks for a drawing: now, or soon where it is out of sight. */
  ask(): void {
    this.#forget();
    if (this.#seen) this.#draw();
    else this.#waiting = window.setTimeout(() => this.#now(), LATER_MS);
  }

  #print = (): void => {
    if (this.#waiting !== 0) this.#now();
  };

  #now(): void {
    this.#forget();
    this.#draw();
  }

  #forget(): void {
    window.clearTimeout(this.#waiting);
    this.#waiting = 0;
  }
}
