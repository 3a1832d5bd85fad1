import { rng } from '../src/numerics/rng.ts';
import { csvText, exponential, nearlyNormal } from './draw.ts';

/** Invented: two separate groups place 25 pegs with one of two protective gloves on; seconds until the last peg. */
const SEED = 12;

const groups = [
  { glove: 'thin', wearers: 14, usual: 41, spread: 3.2, tail: 1.5 },
  { glove: 'insulated', wearers: 18, usual: 47, spread: 6, tail: 5 },
];

/** The wearer of an insulated glove who dropped the box of pegs halfway. */
const DROPPED = { wearer: 27, seconds: 138.6 };

/** The text of glove-peg-test.csv: one row per wearer. */
export function makeGlovePegTest(seed = SEED): string {
  const rows: (string | number)[][] = [];
  let wearer = 0;
  for (const { glove, wearers, usual, spread, tail } of groups) {
    for (let i = 0; i < wearers; i++) {
      wearer++;
      const source = rng(seed).fork(wearer);
      const seconds = usual + spread * nearlyNormal(source) + tail * (exponential(source) - 1);
      rows.push([wearer, glove, (wearer === DROPPED.wearer ? DROPPED.seconds : seconds).toFixed(1)]);
    }
  }
  return csvText(['wearer', 'glove', 'seconds'], rows);
}
