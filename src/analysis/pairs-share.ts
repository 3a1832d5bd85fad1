/** The share of pairs in which the first score is the lower or the higher. */
import { betaQuantile, betaQuantileUpper } from '../numerics/tails/beta.ts';
import type { RowContext } from './estimators.ts';
import type { EffectSize, Limits } from './finding.ts';
import type { Samples } from './samples.ts';

/** Share of pairs in which the first is lower (or higher), equal pairs as half, with the Clopper-Pearson interval. */
export function shareOfPairs(samples: Samples, lower: boolean, alternative: RowContext['alternative'], level: number) {
  const n = samples.x.length;
  let wins = 0;
  for (let i = 0; i < n; i++) {
    const d = (samples.x[i] as number) - (samples.y[i] as number);
    wins += d === 0 ? 0.5 : d < 0 === lower ? 1 : 0;
  }
  const tail = alternative === 'two-sided' ? (1 - level) / 2 : 1 - level;
  const low = wins === 0 ? 0 : betaQuantile(tail, wins, n - wins + 1);
  const high = wins === n ? 1 : betaQuantileUpper(tail, wins + 1, n - wins);
  const interval: Limits =
    alternative === 'greater' ? [low, null] : alternative === 'less' ? [null, high] : [low, high];
  return { value: wins / n, interval };
}

/** The share of pairs as the effect size of a row on medians or ranks. */
export function pairsEffect(samples: Samples, context: RowContext): EffectSize {
  const lower = context.direction !== 'higher';
  const share = shareOfPairs(samples, lower, 'two-sided', context.level);
  return {
    name: `P(${context.first} ${lower ? 'lower' : 'higher'}) within pairs`,
    value: share.value,
    interval: share.interval,
    how: 'Clopper & Pearson 1934',
  };
}
