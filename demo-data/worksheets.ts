import type { Registry, Settings } from '../cells/kind.ts';
import { registry } from '../cells/registry.ts';
import { blockFromBytes } from '../src/app/data-block.ts';
import { PROGRAM_VERSION } from '../src/app/program-version.ts';
import { appendEntry } from '../src/worksheet/decision-log.ts';
import { type Cell, FORMAT, FORMAT_VERSION, type SharedNumber, type Worksheet } from '../src/worksheet/format.ts';

/** When the demo worksheets were opened early; a fixed time, so that the files stay the same. */
const WHEN = '2026-03-02T09:00:00.000Z';
const REASON = 'invented demo data';

const trim: SharedNumber = { id: 'trim', name: 'trim', value: 20, unit: '%', min: 0, max: 25, step: 1, none: false };

const cutoff: SharedNumber = {
  id: 'cutoff',
  name: 'cutoff',
  value: null,
  unit: 'MAD',
  min: 1.5,
  max: 4,
  step: 0.1,
  none: true,
};

const fastest: SharedNumber = {
  id: 'fastest',
  name: 'fastest allowed',
  value: 150,
  unit: 'ms',
  min: 50,
  max: 400,
  step: 10,
  none: false,
};

const exclusion = {
  what: 'trial',
  how: 'beyond',
  participants: [],
  reason: '',
  column: '',
  limit: null,
  measure: 'MAD',
  cutoff: null,
  sides: 'both',
  scope: 'participant',
  least: 70,
} satisfies Settings;

const score = { kind: 'score', settings: { statistic: 'mean', trim: 0 } };

function comparisonOf(factor: string, first: string, second: string, estimator: string): Settings {
  return {
    factor,
    first,
    second,
    estimator,
    trim: { shared: 'trim' },
    alternative: 'two-sided',
    alpha: 0.05,
    resamples: 1999,
  };
}

function assumptionsOf(factor: string, first: string, second: string, departures: readonly string[]): Settings {
  return { factor, first, second, by: '', test: 'shapiro-wilk', departures, alpha: 0.05 };
}

interface Plan {
  /** Name of the demo without its ending. */
  readonly name: string;
  readonly title: string;
  readonly file: string;
  readonly seed: number;
  readonly shared: readonly SharedNumber[];
  /** From top to bottom; each reads the one before it. */
  readonly cells: readonly { readonly kind: string; readonly settings: Settings }[];
}

/** Sets aside the officer who misread the task and presses too early; extremity rules are left to the grid. */
const bridgeAlerts: Plan = {
  name: 'bridge-alerts',
  title: 'Bridge alerts: voice against tone',
  file: 'bridge-alerts.csv',
  seed: 1,
  shared: [trim, cutoff, fastest],
  cells: [
    { kind: 'data', settings: { data: 'd1', row: 'trial', participant: null } },
    {
      kind: 'design',
      settings: {
        participant: 'officer',
        within: ['alert'],
        between: ['training'],
        outcome: 'ack_ms',
        unit: 'ms',
        direction: 'lower',
        rows: 'several trials',
      },
    },
    {
      kind: 'exclusion',
      settings: { ...exclusion, what: 'named', participants: ['23'], reason: 'the task was misread' },
    },
    {
      kind: 'exclusion',
      settings: {
        ...exclusion,
        how: 'below',
        limit: { shared: 'fastest' },
        reason: 'nobody takes an alert in sooner: the press was on its way before it',
      },
    },
    { kind: 'exclusion', settings: { ...exclusion, cutoff: { shared: 'cutoff' } } },
    score,
    { kind: 'comparison', settings: comparisonOf('alert', 'voice', 'tone', 'trimmed-differences') },
    {
      kind: 'claim',
      settings: {
        first: 'voice',
        relation: 'lower',
        second: 'tone',
        margin: 0,
        title: 'Voice alerts are acknowledged sooner than tones.',
      },
    },
    // Trims of their own: turning the shared trim recomputes the planned comparison, its claim and the strip.
    {
      kind: 'comparison',
      settings: {
        ...comparisonOf('alert', 'voice', 'tone', 'trimmed-welch-james'),
        trim: 20,
        effect: { type: 'levels', factor: 'alert', pairs: 'holm' },
      },
    },
    {
      kind: 'comparison',
      settings: {
        ...comparisonOf('alert', 'voice', 'tone', 'trimmed-welch-james'),
        trim: 20,
        effect: { type: 'interaction', factors: ['alert', 'training'] },
      },
    },
  ],
};

const bridgeWorkload: Plan = {
  name: 'bridge-workload',
  title: 'Bridge workload: voice against tone',
  file: 'bridge-workload-wide.csv',
  seed: 2,
  shared: [trim],
  cells: [
    { kind: 'data', settings: { data: 'd1', row: 'participant', participant: null } },
    {
      kind: 'reshape',
      settings: {
        to: 'long',
        columns: ['workload_tone', 'workload_voice', 'workload_seat_pulse'],
        value: 'workload',
        by: 'alert',
        id: [],
      },
    },
    {
      kind: 'design',
      settings: {
        participant: 'officer',
        within: ['alert'],
        between: ['training'],
        outcome: 'workload',
        unit: 'points',
        direction: 'lower',
        rows: 'one score',
      },
    },
    score,
    { kind: 'assumptions', settings: assumptionsOf('alert', 'voice', 'tone', ['exponential', 't3', 'contaminated']) },
    { kind: 'comparison', settings: comparisonOf('alert', 'voice', 'tone', 'trimmed-differences') },
    { kind: 'claim', settings: { first: 'voice', relation: 'lower', second: 'tone', margin: 0, title: '' } },
  ],
};

const glovePegTest: Plan = {
  name: 'glove-peg-test',
  title: 'Peg test: insulated against thin gloves',
  file: 'glove-peg-test.csv',
  seed: 3,
  shared: [trim],
  cells: [
    { kind: 'data', settings: { data: 'd1', row: 'participant', participant: null } },
    {
      kind: 'design',
      settings: {
        participant: 'wearer',
        within: [],
        between: ['glove'],
        outcome: 'seconds',
        unit: 's',
        direction: 'lower',
        rows: 'one score',
      },
    },
    score,
    {
      kind: 'assumptions',
      settings: assumptionsOf('glove', 'insulated', 'thin', ['exponential', 't3', 'contaminated', 'spread']),
    },
    { kind: 'comparison', settings: comparisonOf('glove', 'insulated', 'thin', 'yuen-welch') },
    { kind: 'claim', settings: { first: 'insulated', relation: 'higher', second: 'thin', margin: 0, title: '' } },
  ],
};

const HEARING_NOTE = [
  'The clinic asks how words follow the hearing level. Below, listeners with an aid are held against those without one:',
  'nobody was given an aid by chance, so the difference says who wears one, not what it does.',
].join(' ');

const hearingWords: Plan = {
  name: 'hearing-words',
  title: 'Words missed, with and without an aid',
  file: 'hearing-words.csv',
  seed: 4,
  shared: [trim],
  cells: [
    { kind: 'note', settings: { text: HEARING_NOTE } },
    { kind: 'data', settings: { data: 'd1', row: 'participant', participant: null } },
    {
      kind: 'association',
      settings: {
        x: 'hearing_level_db',
        y: 'words_percent',
        participant: 'listener',
        estimator: 'percentage-bend',
        trim: 20,
        alternative: 'two-sided',
        alpha: 0.05,
        resamples: 999,
      },
    },
    {
      kind: 'derive',
      settings: {
        make: 'formula',
        name: 'words_missed',
        fn: 'natural log',
        of: 'words_percent',
        formula: '100 - words_percent',
        map: '',
        op: 'is at least',
        value: '',
      },
    },
    {
      kind: 'design',
      settings: {
        participant: 'listener',
        within: [],
        between: ['hearing_aid'],
        outcome: 'words_missed',
        unit: 'points',
        direction: 'lower',
        rows: 'one score',
      },
    },
    {
      kind: 'exclusion',
      settings: {
        ...exclusion,
        what: 'named',
        participants: ['18'],
        reason: 'the words were tested with the implant switched on, the level without it',
      },
    },
    score,
    { kind: 'comparison', settings: comparisonOf('hearing_aid', 'yes', 'no', 'yuen-welch') },
    {
      kind: 'claim',
      settings: {
        first: 'yes',
        relation: 'higher',
        second: 'no',
        margin: 0,
        title: 'Listeners with an aid miss more words than those without.',
      },
    },
  ],
};

export const plans: readonly Plan[] = [bridgeAlerts, bridgeWorkload, glovePegTest, hearingWords];

/** The cells of a plan: each port reads the nearest cell above that gives what it takes. */
function cellsOf(plan: Plan): Cell[] {
  const hidden = [
    { kind: 'standing', settings: {} },
    { kind: 'joint', settings: { statistic: 'average Z', relabellings: 1999 } },
  ];
  const all = [...plan.cells, ...hidden];
  const kinds: Registry = registry;
  const cells: Cell[] = [];
  for (const [i, { kind: name, settings }] of all.entries()) {
    const kind = kinds[name];
    if (kind === undefined) throw new Error(`there is no kind called ${name}`);
    const from = Object.entries(kind.takes).map(([port, type]) => {
      const above = cells.findLast((cell) => kinds[cell.kind]?.gives === type);
      if (above === undefined) throw new Error(`nothing above ${name} gives a ${type}`);
      return [port, above.id] as const;
    });
    cells.push({ id: `c${i + 1}`, kind: name, version: kind.version, settings, from: Object.fromEntries(from) });
  }
  return cells;
}

/** A demo worksheet as it is before anything is computed. */
export function demoWorksheet(plan: Plan, csv: string): Worksheet {
  return {
    format: FORMAT,
    version: FORMAT_VERSION,
    id: `demo-${plan.name}`,
    title: plan.title,
    shared: plan.shared,
    cells: cellsOf(plan),
    data: [blockFromBytes(new TextEncoder().encode(csv), plan.file, 'd1')],
    opening: { state: 'opened-early', reason: REASON, when: WHEN },
    log: appendEntry([], {
      when: WHEN,
      who: '',
      what: 'conditions opened without a sealed plan',
      opening: 'opened-early',
      reason: REASON,
    }),
    reference: null,
    seed: plan.seed,
    program: { name: 'standfast', version: PROGRAM_VERSION },
    results: {},
  };
}
