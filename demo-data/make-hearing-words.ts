import { rng } from '../src/numerics/rng.ts';
import { between, csvText, nearlyNormal } from './draw.ts';

/** Invented: 25 listeners of a hearing clinic, their mean hearing level and the words they repeat correctly. */
const SEED = 5;

const LISTENERS = 25;

/** Hears least by far, yet repeats most words: was tested with the implant switched on. */
const IMPLANT = { listener: 18, aid: 'yes', level: 96.3, words: 84 };

/** The text of hearing-words.csv: one row per listener. */
export function makeHearingWords(seed = SEED): string {
  const rows: (string | number)[][] = [];
  for (let listener = 1; listener <= LISTENERS; listener++) {
    const source = rng(seed).fork(listener);
    const level = between(source, 12, 62);
    const aid = level + 10 * nearlyNormal(source) > 40 ? 'yes' : 'no';
    const words = 101 - 0.62 * level + 7 * nearlyNormal(source);
    const row = [listener, aid, level.toFixed(1), Math.min(100, Math.max(0, 2 * Math.round(words / 2)))];
    rows.push(listener === IMPLANT.listener ? [listener, IMPLANT.aid, IMPLANT.level.toFixed(1), IMPLANT.words] : row);
  }
  return csvText(['listener', 'hearing_aid', 'hearing_level_db', 'words_percent'], rows);
}
