import { Refusal } from '../data/refusal.ts';

export type ToWorker =
  | { readonly type: 'run'; readonly id: number; readonly name: string; readonly args: unknown }
  | { readonly type: 'cancel'; readonly id: number };

export type FromWorker =
  | { readonly type: 'done'; readonly id: number; readonly result: unknown }
  | { readonly type: 'failed'; readonly id: number; readonly failure: Failure }
  | { readonly type: 'cancelled'; readonly id: number }
  | { readonly type: 'progress'; readonly id: number; readonly share: number };

/** An error as plain data: classes do not survive the way between threads. */
export interface Failure {
  readonly refusal: boolean;
  readonly name: string;
  readonly message: string;
  readonly stack: string;
}

export function failureOf(error: unknown): Failure {
  const refusal = error instanceof Refusal;
  if (!(error instanceof Error)) return { refusal, name: 'Error', message: String(error), stack: '' };
  return { refusal, name: error.name, message: error.message, stack: error.stack ?? '' };
}

/** A Refusal where it was one, else an Error with the name, message and stack it had in the worker. */
export function errorOf({ refusal, name, message, stack }: Failure): Error {
  if (refusal) return new Refusal(message);
  const error = new Error(message);
  error.name = name;
  if (stack !== '') error.stack = stack;
  return error;
}
