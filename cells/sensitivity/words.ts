import type { Result } from '../../src/analysis/compare.ts';
import type { Grid, GridSpecification } from '../../src/analysis/grid.ts';
import type { AxisName } from '../../src/analysis/grid-options.ts';
import type { Joint } from '../../src/analysis/joint.ts';
import type { Sweep } from '../../src/analysis/sweep.ts';
import type { Note } from '../kind.ts';
import { count, counted, decimalsFor, fixed, limits, percent, pValue } from '../numbers.ts';
import type { JointSweep, SensitivityDetail } from './kind.ts';

/** Places after which the numbers of an analysis are written. */
export function decimalsOf({ finding }: GridSpecification): number {
  if (!finding.sameUnit) return 2;
  const [low, high] = finding.interval ?? [null, null];
  if (low !== null && high !== null) return decimalsFor(high - low);
  return finding.estimate === null ? 0 : decimalsFor(Math.abs(finding.estimate) / 10);
}

/** "supported in 71 of 84 analyses, undecided in 13, contradicted in 0". */
export function sayCounts({ specifications, supported, undecided, contradicted, refused }: Sweep): string {
  const without = refused > 0 ? `; ${count(refused)} without an interval` : '';
  return `supported in ${count(supported)} of ${count(specifications.length)} analyses, undecided in ${count(undecided)}, contradicted in ${count(contradicted)}${without}`;
}

/** "estimates from -96 to -41 ms, median -80"; empty where there is none in the unit. */
export function saySpread({ spread }: Pick<Grid, 'spread'>, unit: string): string {
  if (spread === null) return '';
  const decimals = decimalsFor(Math.max(spread.most - spread.least, Math.abs(spread.median) / 50));
  const write = (value: number) => fixed(value, decimals);
  return `estimates from ${write(spread.least)} to ${write(spread.most)}${unit === '' ? '' : ` ${unit}`}, median ${write(spread.median)}`;
}

/** What one analysis did and found, in one sentence. */
export function sayAnalysis(
  specification: GridSpecification,
  { comparison, scores }: Pick<Result, 'comparison' | 'scores'>,
): string {
  const { finding, verdict, ruleLabel, everyoneIn, planned } = specification;
  const decimals = decimalsOf(specification);
  const write = (value: number) => fixed(value, decimals);
  const rule = everyoneIn ? 'With nobody set aside for being extreme' : `With scores set aside ${ruleLabel}`;
  const own =
    specification.score.statistic === scores.score.statistic && specification.score.trim === scores.score.trim;
  const scored = own ? '' : ` and trials scored by the ${specification.score.statistic}`;
  const order = finding.sameUnit
    ? `${comparison.first} minus ${comparison.second}`
    : `${comparison.first} against ${comparison.second}`;
  const estimate =
    finding.estimate === null
      ? `no estimate (${finding.reason ?? 'not given'})`
      : `${write(finding.estimate)}${finding.sameUnit && finding.unit !== '' ? ` ${finding.unit}` : ''}`;
  const interval = finding.interval === null ? '' : ` ${limits(finding.interval, write)}`;
  const p = finding.p === null ? '' : `, ${pValue(finding.p)}`;
  const says = verdict === null ? '' : `: ${VERDICTS[verdict]}`;
  const marks = planned ? ' These are the worksheet\u2019s own settings.' : '';
  const also =
    specification.also.length === 0
      ? ''
      : ` ${counted(specification.also.length, 'other combination')} came to the same scores.`;
  return `${rule}${scored}, ${finding.label}: ${order} is ${estimate}${interval}${p}${says}.${marks}${also}`;
}

const VERDICTS = {
  supported: 'it supports the claim',
  undecided: 'it leaves the claim undecided',
  contradicted: 'it contradicts the claim',
} as const;

export const AXIS_WORDS: Readonly<Record<AxisName, string>> = {
  cutoff: 'cutoff',
  measure: 'distance',
  scope: 'scope',
  trim: 'trim',
  row: 'row',
  score: 'score',
};

/** What the margin says beside the grid. */
export function sensitivityNotes(value: JointSweep, detail: SensitivityDetail): Note[] {
  const { declared, refused, exploratory, keptSets, spread, shares } = detail;
  const left = refused.reduce((sum, each) => sum + each.count, 0);
  const distinct = value.specifications.length + exploratory.length;
  const notes: Note[] = [
    {
      type: 'note',
      text: `${counted(declared, 'combination')} asked for, ${count(left)} left out, ${count(distinct)} different analyses (those that keep the same scores and trim the same number are one), on ${counted(keptSets, 'set')} of kept scores.`,
    },
  ];
  for (const { why, count: n } of refused)
    notes.push({ type: 'note', lead: 'Left out.', text: `${counted(n, 'combination')}: ${why}` });
  if (exploratory.length > 0)
    notes.push({
      type: 'note',
      lead: 'Apart.',
      text: `${count(exploratory.length)} ${exploratory.length === 1 ? 'analysis' : 'analyses'} may answer another question; they are in the table, not in the counts, the picture or the joint p.`,
    });
  const [first] = shares;
  if (first !== undefined && first.share !== null)
    notes.push({
      type: 'note',
      text: `The ${AXIS_WORDS[first.axis]} goes with ${percent(first.share)} of the spread of the estimates, more than any other choice.`,
    });
  if (spread?.reverses === true)
    notes.push({
      type: 'caution',
      text: `The estimate changes its sign between ${spread.endsAre === 'range' ? 'the least and the most of these analyses' : 'the first and the ninety-ninth hundredth of these analyses'}: which way the difference goes depends on the choices.`,
    });
  notes.push(...jointNotes(value.joint, detail.reason));
  return notes;
}

function jointNotes(joint: Joint | null, reason: string | null): Note[] {
  if (joint === null) return [{ type: 'note', lead: 'No joint p.', text: reason ?? 'It was not worked out.' }];
  const how =
    joint.scope === 'within'
      ? 'the conditions change places within participants, whole blocks of trials at a time'
      : 'participants are dealt out to the groups anew';
  return [
    {
      type: 'note',
      text: `Joint p: how often data relabelled as the design assigned them (${how}), every rule and row run again, lie as far out. It assumes that scores are interchangeable if nothing is going on, and says that some analysis differs from that, not which. p allowing for the whole grid stands with each analysis in the table.`,
    },
    {
      type: 'note',
      text: 'Analyses share their data: they are not votes, and their p values are not to be multiplied or counted as evidence one by one.',
    },
  ];
}
