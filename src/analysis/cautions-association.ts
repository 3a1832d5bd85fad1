import type { CautionEntry, CautionFacts } from './cautions.ts';

const text = (facts: CautionFacts, name: string): string => String(facts[name] ?? '');

/** Entries of the table of cautions that belong to associations (methods 3.5). */
export const ASSOCIATION_CAUTIONS = {
  LEVER: {
    action: 'warn',
    sentence: (f) =>
      `${text(f, 'who')} far out on ${text(f, 'x')} (leverage ${text(f, 'hat')}, limit 2(k + 1)/n = ${text(f, 'limit')}, common practice). Such a point can carry the least-squares line, and the Huber and bisquare lines with it: they weigh residuals, and a point that carries the line has a small one. Among 47 stars four giants made the Huber slope \u2212.43 where Theil\u2013Sen gave 1.73. Read Theil\u2013Sen and repeated medians beside them.`,
    source: 'Rousseeuw & Leroy 1987, 3.1 and star cluster data; methods 3.5',
  },
  COOK: {
    action: 'warn',
    sentence: (f) =>
      `${text(f, 'who')} a Cook's distance beyond the median of F(2, n \u2212 2), ${text(f, 'limit')} (common practice): without ${text(f, 'them')} the least-squares line is another one.`,
    source: 'Cook & Weisberg 1982; common practice',
  },
  FEWPAIRS: {
    action: 'warn',
    sentence: (f) =>
      `With ${text(f, 'n')} participants a correlation says little: an r of ${text(f, 'r')} would still have a 95 % interval that holds 0, and bootstrap intervals of fewer than 10 pairs are unsteady.`,
    source: 'methods 3.9, R17; critical r from t with n - 2 df',
  },
  NOP: {
    action: 'withhold',
    sentence: (f) =>
      `Fewer than ${text(f, 'least')} participants have both scores: the rows describe, and give no p and no interval.`,
    source: 'methods 3.9, R22',
  },
  SKIP: {
    action: 'say',
    sentence: (f) =>
      `The skipped correlations leave out ${text(f, 'counts')}. A textbook p of the pairs left would not know that they were chosen; theirs looks for the odd pairs anew in every resample.`,
    source: 'Wilcox 2012, 9.4.3; methods 3.5',
  },
  TAU: {
    action: 'say',
    sentence: (f) =>
      `The correlations are different quantities: among normal pairs a tau of ${text(f, 'tau')} goes with an r of ${text(f, 'r')}, sin(\u03c0 tau / 2). They share an axis because all of them run from \u22121 to 1, not because they estimate one number.`,
    source: 'Greiner 1909; Kruskal 1958, J. Am. Stat. Assoc. 53, 814-861',
  },
} as const satisfies Readonly<Record<string, CautionEntry>>;
