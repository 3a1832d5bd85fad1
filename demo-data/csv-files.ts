import { makeBridgeAlerts } from './make-bridge-alerts.ts';
import { makeBridgeWorkload } from './make-bridge-workload.ts';
import { makeGlovePegTest } from './make-glove-peg-test.ts';
import { makeHearingWords } from './make-hearing-words.ts';

/** Every demo data file: its name and what makes its text. */
export const csvFiles: readonly { readonly name: string; make(): string }[] = [
  { name: 'bridge-alerts.csv', make: () => makeBridgeAlerts() },
  { name: 'bridge-workload-wide.csv', make: () => makeBridgeWorkload() },
  { name: 'glove-peg-test.csv', make: () => makeGlovePegTest() },
  { name: 'hearing-words.csv', make: () => makeHearingWords() },
];
