import type { Checks } from '../../src/analysis/checks.ts';
import type { Json } from '../kind.ts';

/** The numbers of the checks as they are saved and replayed: no words that a later version might put otherwise. */
export function checksRecord(checks: Checks): Json {
  const { layout, residuals, shape, envelope, outside, spreads, order, additivity, influence } = checks;
  return {
    design: checks.design,
    n: layout.participants.length,
    groups: layout.groups.length,
    columns: layout.columns.length,
    df: residuals.df,
    sd: residuals.sd,
    skew: [shape.skew.value, shape.skew.se, shape.skew.z],
    excess: [shape.excess.value, shape.excess.se, shape.excess.z],
    tests: shape.tests.map(({ id, statistic, p }) => [id, statistic, p]),
    beyond: shape.beyond,
    outside: [...outside],
    band: envelope === null ? null : { low: Array.from(envelope.low), high: Array.from(envelope.high) },
    spreads: spreads.map(({ checks: own }) => ({
      groups: own.groups.map(({ n, mean, sd }) => [n, mean, sd]),
      ratio: own.ratio === null ? null : [own.ratio.value, ...(own.ratio.interval ?? [null, null])],
      tests: own.tests.map(({ id, statistic, df1, df2, p }) => [id, statistic, df1, df2, p]),
    })),
    levels: checks.levels.map(({ mean, sd }) => [mean, sd]),
    sphericity: sphericityRecord(checks),
    order: [order.lag1, order.durbinWatson, order.runs, order.p],
    additivity: [additivity.growth, additivity.F, additivity.df, additivity.p],
    influence: {
      estimate: influence.estimate,
      se: influence.se,
      cooks: [...influence.cooks],
      largest: influence.largest.map(({ cook, without, change }) => [cook, without, change]),
    },
    power: checks.power.map(({ departure, found }) => [departure, found?.share ?? null, found?.runs ?? null]),
    levelsOfTests: checks.testLevels === null ? null : [checks.testLevels.pooled.share, checks.testLevels.welch.share],
  };
}

function sphericityRecord({ sphericity }: Checks): Json {
  if (sphericity === null) return null;
  const { factors, mauchly, pairs, groups } = sphericity;
  return {
    factors: factors === null ? null : [factors.gg, factors.hf, factors.lowerBound],
    mauchly: mauchly === null ? null : [mauchly.W, mauchly.chi2, mauchly.df, mauchly.p, mauchly.pSecondOrder],
    pairs: pairs.map(({ mean, sd, skew, statistic, p, adjusted }) => [mean, sd, skew, statistic, p, adjusted]),
    groups: groups.map(({ n, sds, gg }) => [n, ...sds, gg]),
  };
}
