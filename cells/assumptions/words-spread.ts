import type { Checks } from '../../src/analysis/checks.ts';
import type { GroupSpread, SpreadChecks } from '../../src/analysis/checks-spread.ts';
import { bounded, count, decimalsFor, degrees, fixed, limits, pValue } from '../numbers.ts';
import { shareText } from './share.ts';

/** Decimals for SDs of these groups. */
export function sdDecimals(groups: readonly GroupSpread[]): number {
  const sds = groups.flatMap(({ sd }) => (sd === null || sd === 0 ? [] : [sd]));
  return decimalsFor(sds.length === 0 ? 0 : Math.min(...sds));
}

const WHAT = { scores: '', differences: 'of the differences ', means: 'of the participants\u2019 means ' } as const;

/** Spread of groups: sizes, ratio, what it does to the test of means, and what the check could have shown. */
export function spreadSentences(checks: Checks): { lead: string; text: string }[] {
  return checks.spreads.map(({ what, checks: own }, at) => {
    const sizes = `SDs ${WHAT[what]}${sizesText(own)}`;
    const level = at === 0 ? levelClause(checks, own) : '';
    const test = own.tests.find(({ id }) => id === 'brown-forsythe');
    const brown =
      test?.statistic == null
        ? ''
        : ` Brown\u2013Forsythe F(${degrees(test.df1 ?? 0)}, ${degrees(test.df2 ?? 0)}) = ${fixed(test.statistic, 2)}, ${pValue(test.p ?? 1)}${at === 0 ? missClause(checks) : ''}.`;
    return { lead: at === 0 ? 'Spread' : 'Spread of means', text: `${sizes}${level}.${brown}` };
  });
}

/** "9.1 (voice, n = 10) and 4.2 (tone, n = 30), ratio 2.2 [1.3, 3.4], the larger in the smaller group". */
function sizesText({ groups, ratio, reason, pairing }: SpreadChecks): string {
  const decimals = sdDecimals(groups);
  const one = ({ name, n, sd }: GroupSpread) =>
    `${sd === null ? 'none' : fixed(sd, decimals)} (${name}, n = ${count(n)})`;
  if (ratio === null) return `${groups.map(one).join(', ')}; no ratio: ${reason ?? ''}`;
  const [larger, smaller] = [groups[ratio.larger], groups[ratio.smaller]] as [GroupSpread, GroupSpread];
  const interval = ratio.interval ? ` ${limits(ratio.interval, (value) => fixed(value, 1))}` : '';
  const between = groups.length > 2 ? ' at most' : '';
  const sign =
    pairing === 'none'
      ? 'in groups of one size'
      : `the larger in the ${pairing === 'negative' ? 'smaller' : 'larger'} group${groups.length > 2 ? 's, on the whole' : ''}`;
  const range = groups.length > 2 ? `from ${one(smaller)} to ${one(larger)}` : `${one(larger)} and ${one(smaller)}`;
  return `${range}, ratio${between} ${fixed(ratio.value, 1)}${interval}, ${sign}`;
}

/** ": Student's t would be liberal here, 15 % (± 2) false alarms at these SDs and n ...; the Welch line is the one to read". */
function levelClause({ testLevels, options }: Checks, own: SpreadChecks): string {
  if (testLevels === null) return '';
  const { pooled, welch } = testLevels;
  const test = own.groups.length > 2 ? 'the classical F' : 'Student\u2019s t';
  const off = pooled.share - options.alpha;
  const limit = 3.5 * Math.sqrt((options.alpha * (1 - options.alpha)) / pooled.runs);
  const rates = `, ${shareText(pooled.share, pooled)} false alarms at these SDs and n with normal scores, Welch ${shareText(welch.share, welch)}`;
  if (Math.abs(off) <= limit) return `: ${test} would keep about its level here${rates}`;
  const word = off > 0 ? 'liberal' : 'conservative';
  return `: ${test} would be ${word} here${rates}; the Welch line is the one to read`;
}

function missClause({ power, options }: Checks): string {
  const found = power.find(({ departure }) => departure === 'spread')?.found;
  if (!found) return '';
  return `; with these n it would miss twice the SD in the smallest group in ${shareText(1 - found.share, found)} of studies at \u03b1 = ${String(options.alpha).replace(/^0/, '')}`;
}

/** "ε̂ = .61: read the corrected df", with Mauchly's test as information only; empty below three levels. */
export function mauchlySentence({ sphericity }: Checks): string {
  if (sphericity === null) return '';
  const { factors, mauchly, pairs, reason } = sphericity;
  if (factors === null) return `\u03b5 is not given: ${reason ?? ''}.`;
  const sds = pairs.map(({ sd }) => sd);
  const decimals = decimalsFor(Math.max(...sds));
  const hf = factors.hf === null ? '' : `, ${bounded(Math.min(1, factors.hf), 2)} (Huynh\u2013Feldt)`;
  const spread = `SDs of the differences between two levels run from ${fixed(Math.min(...sds), decimals)} to ${fixed(Math.max(...sds), decimals)}.`;
  const test =
    mauchly?.W == null
      ? `Mauchly\u2019s test is not given: ${mauchly?.reason ?? ''}.`
      : `Mauchly W = ${bounded(mauchly.W, 2)}, \u03c7\u00b2(${degrees(mauchly.df ?? 0)}) = ${fixed(mauchly.chi2 ?? 0, 2)}, ${pValue(mauchly.pSecondOrder ?? mauchly.p ?? 1)}, is information only.`;
  return `\u03b5\u0302 = ${bounded(factors.gg, 2)} (Greenhouse\u2013Geisser)${hf}, 1 if all differences vary alike and ${bounded(factors.lowerBound, 2)} at the least: read the corrected df. ${spread} ${test}`;
}
