import type { Cell, DataBlock, JsonObject, Worksheet } from '../../src/worksheet/format.ts';
import { cell, worksheet } from './worksheets.ts';

const FINGERPRINT = { bytes: '0'.repeat(64), table: '1'.repeat(64) };

/** Ten wearers, two gloves, three trials of each: few enough to be computed in a few milliseconds. */
function trials(): DataBlock {
  const rows = Array.from({ length: 60 }, (_, i) => ({ who: Math.floor(i / 6), glove: i % 2, trial: i % 6 }));
  return {
    id: 'd1',
    name: 'trials.csv',
    rows: rows.length,
    columns: [
      {
        name: 'who',
        type: 'text',
        levels: Array.from({ length: 10 }, (_, i) => `w${i + 1}`),
        codes: rows.map(({ who }) => who),
      },
      { name: 'shift', type: 'text', levels: ['early', 'late'], codes: rows.map(({ who }) => who % 2) },
      { name: 'glove', type: 'text', levels: ['thin', 'thick'], codes: rows.map(({ glove }) => glove) },
      {
        name: 'seconds',
        type: 'number',
        values: rows.map(
          ({ who, glove, trial }) =>
            30 + who + 4 * glove + ((who * 37 + trial * 11) % 23) / 7 + (glove * ((who * who * 13) % 31)) / 9,
        ),
      },
      {
        name: 'age',
        type: 'number',
        values: rows.map(({ who }) => (who === 3 ? null : 20 + ((who * 5) % 17))),
      },
    ],
    fingerprint: FINGERPRINT,
    warnings: [],
  };
}

/** Nine persons with one score of each of three alerts, one row each. */
function wide(): DataBlock {
  const score = (shift: number) => Array.from({ length: 9 }, (_, i) => 40 + shift + ((i * 5 + shift) % 9));
  return {
    id: 'd2',
    name: 'wide.csv',
    rows: 9,
    columns: [
      { name: 'person', type: 'number', values: Array.from({ length: 9 }, (_, i) => i + 1) },
      { name: 'load_tone', type: 'number', values: score(0) },
      { name: 'load_voice', type: 'number', values: score(3) },
      { name: 'load_light', type: 'number', values: score(5) },
    ],
    fingerprint: FINGERPRINT,
    warnings: [],
  };
}

const trim: JsonObject = { shared: 'trim' };
const test = { alternative: 'two-sided', alpha: 0.05, resamples: 99 };

/** A chain from trials to a claim, and a note. */
const ofTrials: readonly Cell[] = [
  cell('n1', 'note', { text: 'Gloves, **two** kinds.' }),
  cell('c1', 'data', { data: 'd1', participant: 'who', row: 'trial' }),
  cell(
    'c2',
    'derive',
    {
      make: 'formula',
      name: 'slow',
      fn: 'natural log',
      of: 'seconds',
      formula: 'seconds / 2',
      map: '',
      op: 'is at least',
      value: '',
    },
    { table: 'c1' },
  ),
  cell(
    'c3',
    'design',
    {
      participant: 'who',
      within: ['glove'],
      between: [],
      outcome: 'slow',
      unit: 's',
      direction: 'lower',
      rows: 'several trials',
    },
    { table: 'c2' },
  ),
  cell(
    'c4',
    'exclusion',
    {
      what: 'trial',
      how: 'beyond',
      participants: [],
      reason: '',
      column: '',
      limit: null,
      measure: 'MAD',
      cutoff: { shared: 'cutoff' },
      sides: 'both',
      scope: 'participant',
      least: 70,
    },
    { design: 'c3' },
  ),
  cell('c5', 'score', { statistic: 'mean', trim: 0 }, { design: 'c4' }),
  cell(
    'c6',
    'comparison',
    { factor: 'glove', first: 'thin', second: 'thick', estimator: 'trimmed-differences', trim, ...test },
    { scores: 'c5' },
  ),
  cell(
    'c7',
    'claim',
    { first: 'thin', relation: 'lower', second: 'thick', margin: 0, title: 'Thin is faster.' },
    { result: 'c6' },
  ),
];

/** A chain from a wide table to its checks and a comparison of all conditions, and an association. */
const ofWide: readonly Cell[] = [
  cell('e1', 'data', { data: 'd2', participant: 'person', row: 'participant' }),
  cell(
    'e2',
    'reshape',
    { to: 'long', columns: ['load_tone', 'load_voice', 'load_light'], value: 'load', by: 'alert', id: [] },
    { table: 'e1' },
  ),
  cell(
    'e3',
    'design',
    {
      participant: 'person',
      within: ['alert'],
      between: [],
      outcome: 'load',
      unit: 'points',
      direction: 'lower',
      rows: 'one score',
    },
    { table: 'e2' },
  ),
  cell('e4', 'score', { statistic: 'median', trim: 0 }, { design: 'e3' }),
  cell(
    'e5',
    'assumptions',
    { factor: 'alert', first: 'tone', second: 'voice', by: '', test: 'shapiro-wilk', departures: ['t3'], alpha: 0.05 },
    { scores: 'e4' },
  ),
  cell(
    'e6',
    'comparison',
    { factor: 'alert', first: 'tone', second: 'voice', estimator: 'paired-t', trim: 20, ...test },
    { scores: 'e4' },
  ),
  cell(
    'e7',
    'association',
    { x: 'load_tone', y: 'load_voice', participant: 'person', estimator: 'percentage-bend', trim, ...test },
    { table: 'e1' },
  ),
];

/** What looks at a whole chain again and again. */
const heavy: readonly Cell[] = [
  cell('h1', 'standing', {}, { claim: 'c7' }),
  cell('h2', 'joint', { statistic: 'average Z', relabellings: 99 }, { claim: 'c7', sweep: 'h1' }),
  cell('h3', 'influence', { target: 'loses support', smallest: null }, { claim: 'c7' }),
  cell(
    'h4',
    'error-rates',
    {
      mode: 'relabel',
      runs: 200,
      measure: 'MAD',
      cutoff: 2.5,
      shape: 'normal',
      first: 20,
      second: 20,
      ratio: 1,
      own: 50,
      difference: 0,
      equal: 'means',
      resamples: 199,
    },
    { result: 'c6' },
  ),
];

/** Small worksheets that together have cells of every kind; `whole` has those that take long too. */
export function fuzzBase(part: 'trials' | 'wide' | 'whole'): Worksheet {
  const cells = { trials: ofTrials, wide: ofWide, whole: [...ofTrials, ...ofWide, ...heavy] }[part];
  return worksheet(cells, {
    shared: [
      { id: 'trim', name: 'Trim', value: 20, unit: '%', min: 0, max: 25, step: 1, none: false },
      { id: 'cutoff', name: 'Cutoff', value: 2.5, unit: '', min: 1.5, max: 5, step: 0.1, none: true },
    ],
    data: { trials: [trials()], wide: [wide()], whole: [trials(), wide()] }[part],
  });
}
