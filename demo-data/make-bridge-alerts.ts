import { type Rng, rng } from '../src/numerics/rng.ts';
import { between, csvText, exponential, nearlyNormal } from './draw.ts';

/**
 * Invented: 36 officers on a ship's bridge simulator acknowledge 20 alerts of each of three kinds. The seed was picked
 * among many so that the mean and the trimmed mean of the differences part ways, as the demo is there to show.
 */
const SEED = 1499;

const OFFICERS = 36;
const TRIALS = 20;
const orders = [
  ['tone', 'voice', 'seat pulse'],
  ['voice', 'seat pulse', 'tone'],
  ['seat pulse', 'tone', 'voice'],
];

/** Acknowledged at the end of each message: misread the task. */
const MISREAD = 23;

/** Officers whose recording of one block was lost. */
const lostBlocks = new Map([
  [14, 'tone'],
  [31, 'seat pulse'],
]);

/** Officers with an effect of one alert far from the others', ms. */
const unusual = new Map<number, { readonly alert: string; readonly ms: number }>([
  [7, { alert: 'tone', ms: 980 }],
  [19, { alert: 'tone', ms: 620 }],
  [30, { alert: 'voice', ms: 540 }],
]);

/** Officer -> presses before the alert could have been taken in. */
const anticipations = new Map([
  [4, 3],
  [11, 2],
  [16, 1],
  [21, 1],
  [28, 1],
  [33, 1],
]);

interface Officer {
  readonly number: number;
  readonly training: string;
  readonly base: number;
  /** Mean of the slow tail, ms. */
  readonly tail: number;
  readonly effects: ReadonlyMap<string, number>;
}

function drawOfficer(number: number, source: Rng): Officer {
  const refreshed = number % 2 === 0;
  const effects = new Map([
    ['tone', 0],
    ['voice', -85 + 75 * nearlyNormal(source)],
    ['seat pulse', -45 + 60 * nearlyNormal(source)],
  ]);
  const odd = unusual.get(number);
  if (odd !== undefined) effects.set(odd.alert, (effects.get(odd.alert) ?? 0) + odd.ms);
  return {
    number,
    training: refreshed ? 'refresher' : 'standard',
    base: 590 - (refreshed ? 25 : 0) + 85 * nearlyNormal(source),
    tail: between(source, 80, 170),
    effects,
  };
}

function acknowledged(officer: Officer, alert: string, source: Rng): number {
  const usual = officer.base + (officer.effects.get(alert) ?? 0);
  const drawn = usual + 70 * nearlyNormal(source) + officer.tail * (exponential(source) - 1);
  const lapse = source.uniform() < 0.008 ? between(source, 2000, 5000) : 0;
  if (officer.number === MISREAD) return between(source, 3100, 4400);
  if (lapse > 0) return lapse;
  return drawn < 230 ? between(source, 190, 270) : drawn;
}

/** One officer's rows: alert, trial, milliseconds. */
function officerRows(officer: Officer, source: Rng): [string, number, number][] {
  const order = orders[(officer.number - 1) % orders.length] as string[];
  const rows = order.flatMap((alert) =>
    Array.from({ length: TRIALS }, (_, trial): [string, number, number] => [
      alert,
      trial + 1,
      Math.round(acknowledged(officer, alert, source)),
    ]),
  );
  const kept = rows.filter(([alert]) => alert !== lostBlocks.get(officer.number));
  for (let early = anticipations.get(officer.number) ?? 0; early > 0; ) {
    const row = kept[source.below(kept.length)] as [string, number, number];
    if (row[2] < 150) continue;
    row[2] = Math.round(between(source, 40, 140));
    early--;
  }
  return kept;
}

/** The text of bridge-alerts.csv: one row per trial. */
export function makeBridgeAlerts(seed = SEED): string {
  const rows: (string | number)[][] = [];
  for (let number = 1; number <= OFFICERS; number++) {
    const source = rng(seed).fork(number);
    const officer = drawOfficer(number, source);
    for (const row of officerRows(officer, source)) rows.push([number, officer.training, ...row]);
  }
  return csvText(['officer', 'training', 'alert', 'trial', 'ack_ms'], rows);
}
