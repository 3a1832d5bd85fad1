/**
 * THE TABLE of what is refused or warned about (methods 3.9): one id, one action, one sentence with its number and
 * where the number comes from. Cells and comparisons decide whether a caution applies; the words stand here.
 */

import { ASSOCIATION_CAUTIONS } from './cautions-association.ts';
import { EXCLUSION_CAUTIONS } from './cautions-exclusion.ts';

export interface CautionEntry {
  readonly action: 'refuse' | 'withhold' | 'warn' | 'say';
  /** The sentence, with what the case at hand fills in. */
  sentence(facts: CautionFacts): string;
  /** Source of the rule and its number. */
  readonly source: string;
}

/** What a sentence may mention; each entry uses what it needs. */
export interface CautionFacts {
  readonly [name: string]: string | number;
}

const text = (facts: CautionFacts, name: string): string => String(facts[name] ?? '');

export const CAUTIONS = {
  R2: {
    action: 'withhold',
    sentence: (f) =>
      `The rule looks at each ${text(f, 'condition')} separately and so at the very difference under test; a textbook p and interval made after it are wrong, and are withheld. ${text(f, 'simulated')}State the rule over all scores, or within each participant.`,
    source: 'Andre 2022; levels simulated with 20,000 experiments each, methods 5.4',
  },
  R2T: {
    action: 'warn',
    sentence: (f) =>
      `The rule looks at each participant under each ${text(f, 'condition')} separately. With equal counts of trials the level stays near its nominal value; with 20 trials against 8 and a cutoff of 2.5 SD it was .20 instead of .05 (simulated). Here they hold ${text(f, 'counts')}.`,
    source: 'methods 3.9, R2; Miller 1991',
  },
  R3: {
    action: 'warn',
    sentence: (f) =>
      `Trimming ${text(f, 'trim')} % at each end is more than 25 %: the test may not hold its level. A median method suits better.`,
    source: 'Wilcox 2012, 4.3 and 5.3',
  },
  R4: {
    action: 'refuse',
    sentence: (f) =>
      `${text(f, 'where')}more than half of the scores are identical, so the ${text(f, 'measure')} is zero and no limit can be set from it. Use a fixed limit, or a rank method.`,
    source: 'methods 3.9, R4',
  },
  R5: {
    action: 'refuse',
    sentence: (f) =>
      `${text(f, 'n')} of the scores are zero or negative, and those have no logarithm: a ratio is not offered.`,
    source: 'methods 3.9, R5',
  },
  R11: {
    action: 'warn',
    sentence: (f) =>
      `With ${text(f, 'n')} scores no score can lie further than ${text(f, 'largest')} SD from their mean, so a cutoff of ${text(f, 'cutoff')} SD can never set anything aside${text(f, 'where')}.`,
    source: 'largest |z| = (n - 1) / sqrt(n): Shiffler 1988; methods 0.7',
  },
  R12: {
    action: 'warn',
    sentence: (f) =>
      `A MAD from fewer than 10 scores${text(f, 'where')} is unsteady: with 10 clean normal scores 3 MAD sets 2.8 % of them aside instead of .27 % (simulated).`,
    source: 'methods 3.9, R12, and 5.5',
  },
  R15: {
    action: 'say',
    sentence: () =>
      'The rank tests ask whether scores under one condition tend to be larger, not whether means or medians differ; they speak of a shift only where both distributions have one shape.',
    source: 'Fay & Proschan 2010; methods 3.9, R15',
  },
  R16: {
    action: 'warn',
    sentence: (f) =>
      `${text(f, 'share')} of the scores ${text(f, 'what')}: more than 5 % (common practice) deserves a reason in the report.`,
    source: 'common practice; methods 3.9, R16',
  },
  R16C: {
    action: 'warn',
    sentence: (f) =>
      `The rule takes more from one condition than from another: ${text(f, 'counts')}. A difference of more than 5 points (common practice) can favour a condition.`,
    source: 'common practice; methods 3.9, R16',
  },
  R17: {
    action: 'warn',
    sentence: (f) =>
      `A bootstrap only knows the scores it draws from: with fewer than 10 its intervals are unsteady, and BCa is given from 20 under each condition on. Here: ${text(f, 'counts')}.`,
    source: 'methods 3.2 and 3.9, R17; Efron 1987',
  },
  R18: {
    action: 'warn',
    sentence: (f) =>
      `The groups differ in size and in spread (SD ${text(f, 'ratio')} to 1, the larger in the ${text(f, 'where')} ${text(f, 'groups')}): ${text(f, 'test')} would be ${text(f, 'bias')}. Read ${text(f, 'beside')} beside it.`,
    source: 'Scheffe 1959, 10.4; exact levels in methods 5.1',
  },
  R19: {
    action: 'say',
    sentence: (f) =>
      `Whether differences are the same in every group depends on the scale: equal differences in ${text(f, 'unit')} are unequal proportions. An interaction of this kind can vanish, or appear, under a transformation.`,
    source: 'Loftus 1978; methods 3.9, R19',
  },
  R20: {
    action: 'say',
    sentence: (f) => `${text(f, 'rows')} answer another question than a difference in ${text(f, 'unit')}.`,
    source: 'methods 3.9, R20',
  },
  R22: {
    action: 'withhold',
    sentence: (f) =>
      `Fewer than ${text(f, 'least')} scores are left ${text(f, 'where')}: the row describes, and gives no p.`,
    source: 'methods 3.1 and 3.9, R22',
  },
  R24: {
    action: 'warn',
    sentence: (f) =>
      `The more variable group has ${text(f, 'n')} scores only; below 6 Welch's test can exceed its level (5 against 15 with SD 2 to 1: .056, exact).`,
    source: 'methods 3.9, R24, and 5.1',
  },
  R25: {
    action: 'warn',
    sentence: (f) =>
      `With ${text(f, 'n')} the smallest p a rank or sign test can reach is ${text(f, 'smallest')}, above alpha ${text(f, 'alpha')}: it cannot come out significant, whatever the scores.`,
    source: 'methods 3.9, R25',
  },
  EPS: {
    action: 'warn',
    sentence: (f) =>
      `The differences between conditions do not all vary alike (\u03b5 = ${text(f, 'epsilon')}; 1 would be sphericity): with uncorrected df the test can exceed its level (.09 instead of .05 at \u03b5 = .50 with 20 participants, simulated). Read the rows with corrected df.`,
    source: 'Box 1954; simulated levels in methods 5.7',
  },
  WJN: {
    action: 'warn',
    sentence: (f) =>
      `The smallest group keeps ${text(f, 'n')} scores for the covariances of ${text(f, 'columns')} conditions: below three for each comparison within participants (common practice) the Welch\u2013James row can exceed its level.`,
    source: 'Keselman, Algina, Lix, Wilcox & Deering 2008, from memory; methods 3.3',
  },
  R2P: {
    action: 'say',
    sentence: (f) =>
      `The rule sees the condition. The planned row's p re-applies the rules in each of ${text(f, 'resamples')} relabellings, and its interval in each of ${text(f, 'resamples')} resamples of participants${text(f, 'lost')}. Relabelling takes scores to be interchangeable if nothing is going on.`,
    source:
      'methods 0.3 and 5.4: level .043 to .060 (relabelling) and .031 to .056 (resampling) where the textbook gave up to .20, simulated',
  },
  R8B: {
    action: 'say',
    sentence: (f) =>
      `Where bootstrap is named, ${text(f, 'resamples')} resamples were drawn with seed ${text(f, 'seed')}.`,
    source: 'Efron & Tibshirani 1993',
  },
  R6: {
    action: 'refuse',
    sentence: (f) =>
      `With two levels (${text(f, 'levels')}) there is one difference only, and nothing for its spread to be compared with: Mauchly\u2019s test and \u03b5 are not defined. Look at the differences themselves.`,
    source: 'Huynh & Feldt 1970; methods 3.9, R6',
  },
  R7: {
    action: 'refuse',
    sentence: () =>
      'Its tables are for a curve that was fixed beforehand; with mean and SD taken from the same scores it finds next to nothing (at a nominal .05 it rejected no normal sample of 10 to 50 scores, simulated). Lilliefors is the same distance with the tables that fit.',
    source: 'Lilliefors 1967; levels simulated, methods 3.9, R7',
  },
  R8: {
    action: 'refuse',
    sentence: (f) =>
      `Raw scores are never pooled over ${text(f, 'what')}: two groups four SDs apart, each from a normal population, look far from normal together in 77 % of studies, their residuals in 5 % (simulated). What is drawn here is ${text(f, 'drawn')}.`,
    source: 'simulated, methods 3.9, R8',
  },
  BLINDCUT: {
    action: 'say',
    sentence: (f) =>
      `The rule does not use the ${text(f, 'condition')}. If one ${text(f, 'condition')} is slower it can still lose more trials.`,
    source: 'Karch 2023; methods 0.2',
  },
  ...ASSOCIATION_CAUTIONS,
  ...EXCLUSION_CAUTIONS,
} as const satisfies Readonly<Record<string, CautionEntry>>;

export type CautionId = keyof typeof CAUTIONS;

/** The sentence of a caution, filled. */
export function cautionText(id: CautionId, facts: CautionFacts): string {
  return CAUTIONS[id].sentence(facts);
}

/** Level of Welch's test at nominal .05 after an exclusion within each group, by simulation (methods 5.4). */
const SIMULATED: Readonly<Record<string, readonly [normal: string, lognormal: string]>> = {
  '20 SD 2': ['.102', '.098'],
  '20 SD 2.5': ['.065', '.090'],
  '20 SD 3': ['.053', '.084'],
  '20 MAD 2': ['.149', '.237'],
  '20 MAD 2.5': ['.097', '.223'],
  '20 MAD 3': ['.075', '.204'],
  '20 fences 1.5': ['.086', '.175'],
  '20 fences 3': ['.053', '.124'],
  '50 SD 2': ['.104', '.122'],
  '50 SD 3': ['.055', '.093'],
  '50 MAD 3': ['.062', '.225'],
  '50 fences 1.5': ['.073', '.204'],
  '100 SD 2': ['.107', '.139'],
  '100 SD 3': ['.055', '.106'],
  '100 MAD 3': ['.061', '.235'],
  '100 fences 1.5': ['.070', '.217'],
};

/**
 * The simulated level of Welch's test after a rule applied within each of two groups, where the case at hand is one
 * that was simulated: one score per participant, both groups of 20, 50 or 100, the rule's measure and cutoff in the table.
 *
 * @param facts group sizes before the rule, measure and cutoff
 * @returns the sentence with its numbers, or an empty string where the case was not simulated
 * @source methods 5.4: 20,000 experiments each, standard error .0015
 */
export function simulatedLevel(facts: { sizes: readonly number[]; measure: string; cutoff: number }): string {
  const [a, b] = facts.sizes;
  if (facts.sizes.length !== 2 || a !== b) return '';
  const level = SIMULATED[`${a} ${facts.measure} ${facts.cutoff}`];
  if (!level) return '';
  return `With two groups of ${a} and no difference between them, such a rule made Welch's test significant in ${level[0]} of normal and ${level[1]} of lognormal experiments instead of .05 (simulated). `;
}
