import { biweightMidcorrelation } from '../numerics/correlation/biweight-midcorrelation.ts';
import { kendallTau } from '../numerics/correlation/kendall.ts';
import { pearsonCorrelation } from '../numerics/correlation/pearson.ts';
import { percentageBendCorrelation } from '../numerics/correlation/percentage-bend.ts';
import { type SkippedBy, skippedCorrelation, skippedOfResample } from '../numerics/correlation/skipped.ts';
import { spearmanCorrelation } from '../numerics/correlation/spearman.ts';
import { winsorizedCorrelation } from '../numerics/correlation/winsorized-correlation.ts';
import type { AssociationSpec, Pairs } from './association.ts';
import { bootstrapPairs, type PairStatistic } from './association-bootstrap.ts';
import { type AssociationNumbers, associationFinding, tooManyForPairs } from './association-finding.ts';
import type { Finding } from './finding.ts';

/** One row of an association. */
export interface AssociationEstimator {
  readonly id: string;
  readonly group: 'correlations' | 'slopes';
  /** As it stands in the sentence. */
  readonly name: string;
  /** Whether the worksheet's trim is its share winsorized. */
  readonly trims: boolean;
  /** Whether SE, p or interval come from resamples. */
  readonly resamples: boolean;
  run(pairs: Pairs, spec: AssociationSpec): Finding;
}

/** Up to this many pairs without ties the p of a rank correlation counts orders. */
const COUNTED = { spearman: 9, kendall: 49 } as const;
const INTERVAL = 'SE and interval: percentile bootstrap over participants';

interface Words {
  readonly id: string;
  readonly name: string;
  readonly quantity: string;
  readonly method: string;
  readonly trims?: boolean;
  readonly resamples?: boolean;
}

function row(words: Words, numbers: (pairs: Pairs, spec: AssociationSpec) => AssociationNumbers): AssociationEstimator {
  const { id, name, trims = false, resamples = true } = words;
  const of = { ...words, group: 'correlations' as const };
  const run = (pairs: Pairs, spec: AssociationSpec) => associationFinding(of, pairs, spec, numbers(pairs, spec));
  return { id, group: 'correlations', name, trims, resamples, run };
}

function booted(pairs: Pairs, spec: AssociationSpec, statistic: PairStatistic) {
  const { se, p, interval, how, reason } = bootstrapPairs(pairs.x, pairs.y, statistic, spec);
  return { se, p, interval, how, reason };
}

const pearson = row(
  {
    id: 'pearson',
    name: 'Pearson correlation',
    quantity: 'strength of a straight-line relation (product-moment r)',
    resamples: false,
    method:
      'Pearson 1896; t with n \u2212 2 df (Fisher 1915); interval: atanh(r) \u2213 z / sqrt(n \u2212 3) (Fisher 1921)',
  },
  ({ x, y }, spec) => {
    const found = pearsonCorrelation(x, y, { level: 1 - spec.alpha, alternative: spec.alternative });
    return {
      ...tested(found),
      se: found.t === null || found.t === 0 || found.r === null ? null : found.r / found.t,
      interval: found.interval,
    };
  },
);

const spearman = row(
  {
    id: 'spearman',
    name: 'Spearman rank correlation',
    quantity: 'strength of a monotone relation (r of the ranks)',
    method: `Spearman 1904, midranks; p: orders counted to 9 pairs without ties, else t with n \u2212 2 df; ${INTERVAL}`,
  },
  (pairs, spec) => {
    const { x, y } = pairs;
    const counted = x.length <= COUNTED.spearman && spearmanCorrelation(x, y, { method: 'exact' }).p !== null;
    const found = spearmanCorrelation(x, y, { method: counted ? 'exact' : 't', alternative: spec.alternative });
    const { se, interval, reason } = booted(pairs, spec, (xs, ys) => spearmanCorrelation(xs, ys).rho);
    return {
      estimate: found.rho,
      reason: found.reason ?? reason,
      se,
      df: counted ? null : x.length - 2,
      statistic: found.s === null ? null : { name: 'S', value: found.s },
      p: found.p,
      pHow: counted ? 'all orders counted' : 't distribution',
      interval,
    };
  },
);

const kendall = row(
  {
    id: 'kendall',
    name: 'Kendall tau-b',
    quantity: 'pairs of participants in the same order minus pairs in the opposite order (tau-b)',
    method: `Kendall 1945; p: orders counted below 50 pairs without ties, else normal with the variance that ties leave (Kendall 1970, 4.9); ${INTERVAL}`,
  },
  (pairs, spec) => {
    const { x, y } = pairs;
    const exact = kendallTau(x, y, { method: 'exact', alternative: spec.alternative });
    const counted = x.length <= COUNTED.kendall && exact.p !== null;
    const found = counted ? exact : kendallTau(x, y, { alternative: spec.alternative });
    const many = tooManyForPairs(pairs);
    const { se, interval, reason } = many ?? booted(pairs, spec, (xs, ys) => kendallTau(xs, ys).tau);
    return {
      estimate: found.tau,
      reason: found.reason ?? reason,
      se,
      statistic: found.z === null ? { name: 'S', value: found.s } : { name: 'z', value: found.z },
      p: found.p,
      pHow: counted ? 'all orders counted' : 'normal approximation',
      interval,
    };
  },
);

const winsorized = row(
  {
    id: 'winsorized',
    name: 'winsorized correlation',
    quantity: 'strength of the relation with the ends of each score pulled in (winsorized r)',
    trims: true,
    method: `Wilcox 2012, 9.3.2; each score winsorized by itself, t with n \u2212 2g \u2212 2 df; ${INTERVAL}`,
  },
  (pairs, spec) => {
    const { trim, alternative } = spec;
    const { se, interval, reason } = booted(pairs, spec, (xs, ys) => winsorizedCorrelation(xs, ys, { trim }).r);
    const found = winsorizedCorrelation(pairs.x, pairs.y, { trim, alternative });
    return { ...tested(found), reason: found.reason ?? reason, se, interval };
  },
);

const percentageBend = row(
  {
    id: 'percentage-bend',
    name: 'percentage-bend correlation',
    quantity: 'strength of the relation with far scores bent in (percentage-bend r, beta .2)',
    method: `Wilcox 1994, Psychometrika 59, 601\u2013616; beta .2, t with n \u2212 2 df; ${INTERVAL}`,
  },
  (pairs, spec) => {
    const { se, interval, reason } = booted(pairs, spec, (xs, ys) => percentageBendCorrelation(xs, ys).r);
    const found = percentageBendCorrelation(pairs.x, pairs.y, { alternative: spec.alternative });
    return { ...tested(found), reason: found.reason ?? reason, se, interval };
  },
);

const biweight = row(
  {
    id: 'biweight',
    name: 'biweight midcorrelation',
    quantity: 'strength of the relation with far scores weighted down (biweight r)',
    method:
      'Wilcox 2012, 9.3.8; weights fall to 0 at 9 raw MADs; SE, p and interval: percentile bootstrap over participants',
  },
  (pairs, spec) => {
    const found = biweightMidcorrelation(pairs.x, pairs.y);
    const { how, ...rest } = booted(pairs, spec, (xs, ys) => biweightMidcorrelation(xs, ys).r);
    return { estimate: found.r, ...rest, reason: found.reason ?? rest.reason, pHow: how };
  },
);

function skipped(by: SkippedBy, id: string, name: string, how: string): AssociationEstimator {
  const method = `Wilcox 2012, 9.4.3; ${how}; then Pearson's r of the pairs left; SE, p and interval: percentile bootstrap over participants with the odd pairs found anew in each resample`;
  return row(
    { id, name, quantity: 'strength of the relation among the pairs that hang together', method },
    (pairs, spec) => {
      const { x, y } = pairs;
      const found = skippedCorrelation(x, y, { by });
      const cautions = found.kept < found.n ? ['SKIP'] : [];
      const kept = { estimate: found.r, kept: found.kept, cautions };
      if (found.r === null) return { ...kept, reason: found.reason, pHow: '' };
      const { how: pHow, ...rest } =
        (by === 'projection' ? tooManyForPairs(pairs) : null) ?? booted(pairs, spec, skippedOfResample(x, y, { by }));
      return { ...kept, ...rest, pHow };
    },
  );
}

function tested(found: { r: number | null; t: number | null; df: number | null; p: number | null; reason?: string }) {
  return {
    estimate: found.r,
    reason: found.reason,
    df: found.df,
    statistic: found.t === null ? null : { name: 't', value: found.t },
    p: found.p,
    pHow: 't distribution',
  };
}

/** The rows on the axis from -1 to 1, the classical ones first. */
export const correlationRows: readonly AssociationEstimator[] = [
  pearson,
  spearman,
  kendall,
  winsorized,
  percentageBend,
  biweight,
  skipped(
    'projection',
    'skipped-projection',
    'skipped correlation (projections)',
    'pairs far out along the line through any pair (ideal fourths, chi-square .975) left out',
  ),
  skipped(
    'mcd',
    'skipped-mcd',
    'skipped correlation (MCD)',
    'pairs beyond chi-square .975 from the reweighted MCD of three quarters of the pairs left out (Rousseeuw & Van Driessen 1999)',
  ),
];
