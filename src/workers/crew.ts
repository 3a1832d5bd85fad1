import type { JobTable, RunnerOf } from './job-table.ts';
import { errorOf, type FromWorker, type ToWorker } from './messages.ts';
import type { JobEnv } from './runner.ts';

/** A worker of either kind, as the crew uses it. */
export interface CrewWorker {
  post(message: ToWorker): void;
  /** Called once: `take` gets every message, `broken` is told when the worker has failed or ended by itself. */
  listen(take: (message: FromWorker) => void, broken: (why: string) => void): void;
  /** Ends it at once, whatever it is doing. */
  end(): void;
}

/** Milliseconds a worker has to obey a cancel before it is ended. */
export const PATIENCE = 300;

interface Task {
  readonly id: number;
  readonly name: string;
  readonly args: unknown;
  readonly env: JobEnv;
  readonly resolve: (result: unknown) => void;
  readonly reject: (reason: unknown) => void;
  /** How often a worker broke while it ran. */
  broke: number;
}

interface Place {
  worker: CrewWorker | null;
  task: Task | null;
  timer: ReturnType<typeof setTimeout> | null;
}

/**
 * Shares jobs out among workers: each takes the next job when it is free. A cancelled job is asked to stop, and its
 * worker ended when it does not; a worker that breaks is replaced and its job run again, once.
 */
class Crew {
  readonly #places: readonly Place[];
  readonly #create: () => CrewWorker;
  /** The tasks that go with a signal and have not settled. */
  readonly #watched = new WeakMap<AbortSignal, Set<Task>>();
  #queue: Task[] = [];
  #next = 1;
  #closed = false;

  constructor(create: () => CrewWorker, size: number) {
    this.#create = create;
    this.#places = Array.from({ length: size }, () => ({ worker: null, task: null, timer: null }));
  }

  run(name: string, args: unknown, env: JobEnv): Promise<unknown> {
    return new Promise((resolve, reject) => {
      if (this.#closed) throw new Error('the runner is closed');
      env.signal.throwIfAborted();
      const task: Task = { id: this.#next++, name, args, env, resolve, reject, broke: 0 };
      this.#watch(task);
      this.#queue.push(task);
      this.#share();
    });
  }

  close(): void {
    this.#closed = true;
    const left = [...this.#queue, ...this.#places.flatMap(({ task }) => (task === null ? [] : [task]))];
    this.#queue = [];
    for (const place of this.#places) this.#end(place);
    for (const task of left) this.#settle(task, () => task.reject(new Error('the runner is closed')));
  }

  /** A computation cut into many shards has one signal, so each signal gets one listener. */
  #watch(task: Task): void {
    const { signal } = task.env;
    const known = this.#watched.get(signal);
    if (known !== undefined) {
      known.add(task);
      return;
    }
    const tasks = new Set([task]);
    this.#watched.set(signal, tasks);
    signal.addEventListener('abort', () => {
      this.#watched.delete(signal);
      for (const each of tasks) this.#cancel(each);
    });
  }

  #share(): void {
    for (const place of this.#places) {
      while (place.task === null) {
        const task = this.#queue.shift();
        if (task === undefined) return;
        this.#give(place, task);
      }
    }
  }

  #give(place: Place, task: Task): void {
    try {
      place.worker ??= this.#hire(place);
      place.worker.post({ type: 'run', id: task.id, name: task.name, args: task.args });
      place.task = task;
    } catch (error) {
      // No worker can be had, or the arguments cannot be sent: that is this job's failure, and the next one's turn.
      this.#settle(task, () => task.reject(error));
    }
  }

  #hire(place: Place): CrewWorker {
    const worker = this.#create();
    worker.listen(
      (message) => {
        if (place.worker === worker) this.#take(place, message);
      },
      (why) => {
        if (place.worker === worker) this.#broken(place, why);
      },
    );
    return worker;
  }

  #take(place: Place, message: FromWorker): void {
    const { task } = place;
    if (task === null || task.id !== message.id) return;
    if (message.type === 'progress') {
      if (!task.env.signal.aborted) task.env.progress(message.share);
      return;
    }
    this.#free(place);
    // A cancelled task has been rejected already; settling it again changes nothing.
    this.#settle(task, () => {
      if (message.type === 'done') task.resolve(message.result);
      else if (message.type === 'failed') task.reject(errorOf(message.failure));
      else task.reject(task.env.signal.reason);
    });
    this.#share();
  }

  #broken(place: Place, why: string): void {
    const { task } = place;
    this.#end(place);
    if (task !== null && !task.env.signal.aborted) {
      task.broke++;
      if (task.broke < 2) this.#queue.unshift(task);
      else this.#settle(task, () => task.reject(new Error(`the computation broke off twice (${why})`)));
    }
    this.#share();
  }

  #cancel(task: Task): void {
    task.reject(task.env.signal.reason);
    this.#queue = this.#queue.filter((each) => each !== task);
    const place = this.#places.find((each) => each.task === task);
    if (place === undefined) return;
    place.worker?.post({ type: 'cancel', id: task.id });
    place.timer = setTimeout(() => {
      this.#end(place);
      this.#share();
    }, PATIENCE);
  }

  #settle(task: Task, settle: () => void): void {
    this.#watched.get(task.env.signal)?.delete(task);
    settle();
  }

  #free(place: Place): void {
    if (place.timer !== null) clearTimeout(place.timer);
    place.timer = null;
    place.task = null;
  }

  #end(place: Place): void {
    this.#free(place);
    const { worker } = place;
    place.worker = null;
    worker?.end();
  }
}

/**
 * A runner of the jobs the workers know.
 *
 * @param create makes a worker; called when there is a job for it, and again when one had to be ended
 * @param size how many workers at most, 1 or more
 */
export function crewOf<T extends JobTable>(create: () => CrewWorker, size: number): RunnerOf<T> {
  if (!Number.isInteger(size) || size < 1)
    throw new RangeError(`*size* must be a whole number of 1 or more; got ${size}`);
  const crew = new Crew(create, size);
  return {
    run: (name, args, env) => crew.run(name, args, env) as never,
    close: () => crew.close(),
  };
}
