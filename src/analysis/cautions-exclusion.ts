import type { CautionEntry, CautionFacts } from './cautions.ts';

const text = (facts: CautionFacts, name: string): string => String(facts[name] ?? '');

/** Entries of the table of cautions that belong to exclusion rules beyond one pass of SD, MAD or fences. */
export const EXCLUSION_CAUTIONS = {
  R13: {
    action: 'warn',
    sentence: (f) =>
      `A rule that is repeated until nobody more is beyond it judges by a spread that it has made smaller itself: here ${text(f, 'first')} in the first pass, ${text(f, 'total')} in ${text(f, 'passes')} passes. Within each of two groups of 50, 2 SD repeated made Welch's test significant in 21 % of normal and 44 % of lognormal experiments without a difference (simulated).`,
    source: 'methods 3.9, R13; Andre 2022',
  },
  R21: {
    action: 'warn',
    sentence: () =>
      'Mean and SD are moved by the very scores they judge: several odd scores can hide one another (masking), and one can make ordinary ones look odd (swamping). Repeating the rule does not cure that; a MAD is moved far less.',
    source: 'Barnett & Lewis 1994, Outliers in Statistical Data; methods 3.9, R21',
  },
  MOVING: {
    action: 'say',
    sentence: (f) =>
      `The criterion moves with the number of scores (here ${text(f, 'counts')}), so that cells with few trials lose about the same share as cells with many; a fixed 2.5 SD sets nothing aside among 8 scores or fewer.`,
    source: 'Van Selst & Jolicoeur 1994; Miller 1991; methods 1.6',
  },
  MCDN: {
    action: 'warn',
    sentence: (f) =>
      `${text(f, 'n')} and ${text(f, 'columns')} columns are few for chi-square limits on MCD distances: of 20 clean normal participants they set about 6 % aside with two columns and 10 % with three, where 2.5 % is meant (simulated).`,
    source:
      'Hardin & Rocke 2005, J. Comput. Graph. Stat. 14, 928-946; 80 to 150 samples of 20, standard error about 1 point',
  },
  TOGETHER: {
    action: 'refuse',
    sentence: (f) => `Nobody is set aside: ${text(f, 'reason')}. Choose other columns, or a rule on one of them.`,
    source: 'Rousseeuw & Van Driessen 1999; methods 3.9, R4',
  },
  ADJUSTED: {
    action: 'say',
    sentence: (f) =>
      `The fences reach further on the side of the longer tail, by the medcouple of the scores. From few scores (here ${text(f, 'counts')}) the medcouple is unsteady, and so are they.`,
    source: 'Hubert & Vandervieren 2008, section 3',
  },
} as const satisfies Readonly<Record<string, CautionEntry>>;
