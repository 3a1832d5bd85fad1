/** Outside check cases of several conditions: k groups, repeated measures, factorial designs, adjusted p values. */
import { alexanderGovern } from '../../../src/numerics/anova/alexander-govern.ts';
import { brownForsytheF } from '../../../src/numerics/anova/brown-forsythe.ts';
import { dunnTest } from '../../../src/numerics/anova/dunn.ts';
import { factorialAnova, type SumOfSquaresType } from '../../../src/numerics/anova/factorial.ts';
import { gamesHowell } from '../../../src/numerics/anova/games-howell.ts';
import { mixedAnova } from '../../../src/numerics/anova/mixed.ts';
import { oneWayAnova } from '../../../src/numerics/anova/one-way.ts';
import type { Pair } from '../../../src/numerics/anova/pairs.ts';
import { pairwiseWelch } from '../../../src/numerics/anova/pairwise-welch.ts';
import { repeatedMeasuresAnova } from '../../../src/numerics/anova/repeated-measures.ts';
import { trimmedPooledAnova } from '../../../src/numerics/anova/trimmed-pooled.ts';
import { trimmedRepeatedMeasuresAnova } from '../../../src/numerics/anova/trimmed-repeated-measures.ts';
import { tukeyHsd } from '../../../src/numerics/anova/tukey.ts';
import type { WithinEffect } from '../../../src/numerics/anova/within-effect.ts';
import { withinFactorsAnova } from '../../../src/numerics/anova/within-factors.ts';
import { bartlettTest } from '../../../src/numerics/bartlett.ts';
import { linearContrast } from '../../../src/numerics/contrast.ts';
import { flignerKilleen } from '../../../src/numerics/fligner-killeen.ts';
import { friedmanTest } from '../../../src/numerics/friedman.ts';
import { kruskalWallis } from '../../../src/numerics/kruskal-wallis.ts';
import { leveneTest } from '../../../src/numerics/levene.ts';
import type { MauchlyTest } from '../../../src/numerics/mauchly.ts';
import { type Adjustment, adjustP } from '../../../src/numerics/multiplicity.ts';
import { quadeTest } from '../../../src/numerics/quade.ts';
import { welchAnova } from '../../../src/numerics/welch-anova.ts';
import { welchJames } from '../../../src/numerics/welch-james.ts';
import {
  alternativeArg,
  type CaseArgs,
  type CaseData,
  type CaseMethods,
  cellText,
  type Groups,
  groupsOf,
  intervalText,
  levelArg,
  levelsOf,
  numberArg,
  numbersArg,
  numbersOf,
  repeatedScores,
  stringArg,
  stringsArg,
  trimPercent,
  undefinedResult,
  usedRows,
} from './case-data.ts';

type Plain = Record<string, unknown>;

/** The result in the cases' words, or "undefined" when the numerics give a reason instead. */
function given(result: { readonly reason?: string }, plain: () => Plain): Plain {
  return result.reason === undefined ? plain() : { ...undefinedResult, reason: result.reason };
}

function adjustment(args: CaseArgs): Adjustment {
  return stringArg(args, 'adjust') as Adjustment;
}

/** Arrays over pairs, with the level names of each pair. */
function pairColumns<P extends Pair>(
  result: { readonly pairs: readonly P[] | null; readonly reason?: string },
  { levels }: Groups,
  columns: (pair: P) => Plain,
): Plain {
  const { pairs } = result;
  if (pairs === null) return { ...undefinedResult, reason: result.reason };
  const rows = pairs.map(columns);
  const out: Plain = { pairs: pairs.map(({ first, second }) => [levels[first], levels[second]]) };
  for (const name of Object.keys(rows[0] ?? {})) out[name] = rows.map((row) => row[name]);
  return out;
}

const kGroups: CaseMethods = {
  one_way_anova(data, args) {
    const result = oneWayAnova(groupsOf(data, args).scores);
    return given(result, () => ({
      ...result,
      ss_between: result.ssBetween,
      ss_within: result.ssWithin,
      residual_sd: result.residualSd,
    }));
  },
  welch_anova(data, args) {
    const result = welchAnova(groupsOf(data, args).scores, { trim: trimPercent(args, 0) });
    return given(result, () => ({ ...result }));
  },
  trimmed_pooled_anova(data, args) {
    const result = trimmedPooledAnova(groupsOf(data, args).scores, { trim: trimPercent(args) });
    return given(result, () => ({ ...result }));
  },
  brown_forsythe_f(data, args) {
    const result = brownForsytheF(groupsOf(data, args).scores);
    return given(result, () => ({ ...result, df1_mehrotra: result.df1Mehrotra, p_mehrotra: result.pMehrotra }));
  },
  alexander_govern(data, args) {
    const result = alexanderGovern(groupsOf(data, args).scores);
    return given(result, () => ({ ...result }));
  },
  kruskal_wallis(data, args) {
    const result = kruskalWallis(groupsOf(data, args).scores);
    return given(result, () => ({ ...result, eta2_H: result.eta2H }));
  },
  levene_test(data, args) {
    const center = stringArg(args, 'center') as 'mean' | 'median' | 'trimmed';
    const result = leveneTest(groupsOf(data, args).scores, { center, trim: trimPercent(args, 0) });
    return given(result, () => ({ ...result }));
  },
  bartlett_test(data, args) {
    const result = bartlettTest(groupsOf(data, args).scores);
    return given(result, () => ({ ...result }));
  },
  fligner_killeen(data, args) {
    const result = flignerKilleen(groupsOf(data, args).scores);
    return given(result, () => ({ ...result }));
  },
  linear_contrast(data, args) {
    const result = linearContrast(groupsOf(data, args).scores, numbersArg(args, 'weights'), {
      trim: trimPercent(args, 0),
      variance: (args.variance ?? 'welch') as 'welch' | 'pooled',
      level: levelArg(args),
      alternative: alternativeArg(args),
    });
    return given(result, () => ({ ...result, ci: intervalText(result.interval!) }));
  },
};

const pairs: CaseMethods = {
  tukey_hsd(data, args) {
    const groups = groupsOf(data, args);
    return pairColumns(tukeyHsd(groups.scores, { level: levelArg(args) }), groups, (pair) => ({ ...pair }));
  },
  games_howell(data, args) {
    const groups = groupsOf(data, args);
    return pairColumns(gamesHowell(groups.scores, { level: levelArg(args) }), groups, (pair) => ({ ...pair }));
  },
  dunn_test(data, args) {
    const groups = groupsOf(data, args);
    const result = dunnTest(groups.scores, { adjust: adjustment(args) });
    return pairColumns(result, groups, ({ z, p, pAdjusted }) => ({ z, p, p_adjusted: pAdjusted }));
  },
  pairwise_welch(data, args) {
    const groups = groupsOf(data, args);
    const result = pairwiseWelch(groups.scores, { adjust: adjustment(args), trim: trimPercent(args, 0) });
    return pairColumns(result, groups, ({ p, pAdjusted }) => ({ p, p_adjusted: pAdjusted }));
  },
  p_adjust(_data, args) {
    return { p_adjusted: adjustP(numbersArg(args, 'p'), adjustment(args)) };
  },
};

function mauchlyKeys(test: MauchlyTest | null): Plain {
  if (test === null || test.W === null) return {};
  return {
    mauchly_W: test.W,
    mauchly_chi2: test.chi2,
    mauchly_df: test.df,
    mauchly_p: test.p,
    mauchly_p_second_order: test.pSecondOrder,
  };
}

function withinKeys(effect: WithinEffect): Plain {
  if (effect.F === null) return { ...undefinedResult, reason: effect.reason };
  return {
    F: effect.F,
    df1: effect.df1,
    df2: effect.df2,
    p: effect.p,
    ss_effect: effect.ssEffect,
    ss_error: effect.ssError,
    gg_epsilon: effect.ggEpsilon,
    hf_epsilon: effect.hfEpsilon,
    lb_epsilon: effect.lbEpsilon,
    p_gg: effect.pGg,
    p_hf: effect.pHf,
    partial_eta2: effect.partialEta2,
  };
}

const repeated: CaseMethods = {
  repeated_measures_anova(data, args) {
    const result = repeatedMeasuresAnova(repeatedScores(data, args).scores);
    return {
      ...withinKeys(result),
      n: result.n,
      k: result.k,
      ss_subjects: result.ssSubjects,
      generalized_eta2: result.generalizedEta2,
      ...mauchlyKeys(result.mauchly),
    };
  },
  friedman_test(data, args) {
    const result = friedmanTest(repeatedScores(data, args).scores);
    return given(result, () => ({
      ...result,
      kendalls_w: result.kendallsW,
      iman_davenport_F: result.imanDavenportF,
      iman_davenport_df: result.imanDavenportDf,
      iman_davenport_p: result.imanDavenportP,
    }));
  },
  quade_test(data, args) {
    const result = quadeTest(repeatedScores(data, args).scores);
    return given(result, () => ({ ...result }));
  },
  trimmed_repeated_measures_anova(data, args) {
    const result = trimmedRepeatedMeasuresAnova(repeatedScores(data, args).scores, { trim: trimPercent(args) });
    return given(result, () => ({
      ...result,
      trimmed_means: result.trimmedMeans,
      epsilon_hat: result.epsilonHat,
      epsilon_tilde: result.epsilonTilde,
    }));
  },
};

/** Levels of between factors and the place of each row's combination, first factor slowest. */
function crossing(data: CaseData, rows: Parameters<typeof levelsOf>[1], factors: readonly string[]) {
  const levels = factors.map((factor) => levelsOf(data, rows, factor));
  const cells = rows.map((row) =>
    factors.reduce((at, factor, i) => at * levels[i]!.length + levels[i]!.indexOf(cellText(row, factor)), 0),
  );
  const counts = levels.map((own) => own.length);
  return { counts, cells, size: counts.reduce((product, k) => product * k, 1) };
}

/** A layout with an effect that cannot be computed counts as undefined; what can be is given beside it. */
function undefinedUnless(computable: boolean): Plain {
  return computable ? {} : { ...undefinedResult };
}

const factorial: CaseMethods = {
  factorial_anova(data, args) {
    const factors = stringsArg(args, 'factors');
    const rows = usedRows(data, args);
    const { counts, cells, size } = crossing(data, rows, factors);
    const outcome = stringArg(args, 'outcome');
    const scores = Array.from({ length: size }, (_, c) =>
      numbersOf(
        rows.filter((_row, i) => cells[i] === c),
        outcome,
      ),
    );
    const result = factorialAnova(scores, counts, numberArg(args, 'ss_type') as SumOfSquaresType);
    return given(result, () => {
      const effects: Plain = {};
      for (const one of result.effects) {
        const { ss, F, p } = one;
        effects[one.factors.map((f) => factors[f]).join(':')] = {
          ss,
          F,
          p,
          df: one.df1,
          partial_eta2: one.partialEta2,
        };
      }
      return { effects, ss_error: result.ssError, df_error: result.dfError };
    });
  },
  mixed_anova(data, args) {
    const between = stringsArg(args, 'between')[0]!;
    const within = stringsArg(args, 'within')[0]!;
    const all = repeatedScores(data, args, [within]);
    const { cells, size } = crossing(data, all.firstRows, [between]);
    const groups = Array.from({ length: size }, (_, g) =>
      all.scores.map((level) => level.filter((_s, i) => cells[i] === g)),
    );
    const result = mixedAnova(groups);
    const { F, df1, df2, p, ssBetween, ssWithin } = result.between;
    const betweenKeys = F === null ? undefinedResult : { F, df1, df2, p, ss_effect: ssBetween, ss_error: ssWithin };
    return {
      ...undefinedUnless(F !== null && result.within.F !== null),
      effects: {
        [between]: betweenKeys,
        [within]: withinKeys(result.within),
        [`${between}:${within}`]: withinKeys(result.interaction),
      },
      n: result.n,
      group_n: result.groupN,
      ...mauchlyKeys(result.mauchly),
    };
  },
  within_within_anova(data, args) {
    const within = stringsArg(args, 'within');
    const { scores, columns, subjects } = repeatedScores(data, args, within);
    const counts = within.map((_, f) => new Set(columns.map((key) => key[f])).size);
    const effects: Plain = {};
    const found = withinFactorsAnova(scores, counts);
    for (const one of found) {
      effects[one.factors.map((f) => within[f]).join(':')] = { ...withinKeys(one), ...mauchlyKeys(one.mauchly) };
    }
    return { ...undefinedUnless(found.every((one) => one.F !== null)), effects, n: subjects.length };
  },
  welch_james(data, args) {
    const between = stringsArg(args, 'between');
    const within = stringsArg(args, 'within');
    const effect = stringsArg(args, 'effect');
    const { groups, counts, columns } = within.length > 0 ? repeatedCells(data, args) : plainCells(data, args);
    const withinCounts = within.map((_, f) => new Set(columns.map((key) => key[f])).size);
    const result = welchJames(
      groups,
      { between: counts, within: withinCounts },
      { between: between.map((name) => effect.includes(name)), within: within.map((name) => effect.includes(name)) },
      { trim: trimPercent(args, 0) },
    );
    return given(result, () => ({ ...result, p_johansen_chi2: result.pChiSquare }));
  },
};

function plainCells(data: CaseData, args: CaseArgs) {
  const rows = usedRows(data, args);
  const { counts, cells, size } = crossing(data, rows, stringsArg(args, 'between'));
  const outcome = stringArg(args, 'outcome');
  const groups = Array.from({ length: size }, (_, c) => [
    numbersOf(
      rows.filter((_row, i) => cells[i] === c),
      outcome,
    ),
  ]);
  return { groups, counts, columns: [[]] as readonly (readonly string[])[] };
}

function repeatedCells(data: CaseData, args: CaseArgs) {
  const all = repeatedScores(data, args);
  const { counts, cells, size } = crossing(data, all.firstRows, stringsArg(args, 'between'));
  const groups = Array.from({ length: size }, (_, c) =>
    all.scores.map((level) => level.filter((_s, i) => cells[i] === c)),
  );
  return { groups, counts, columns: all.columns };
}

/** A refusal of the numerics (a RangeError) answers an "undefined" case as well as a reason does. */
function refusing(method: CaseMethods[string]): CaseMethods[string] {
  return (data, args) => {
    try {
      return method(data, args);
    } catch (error) {
      if (error instanceof RangeError) return { ...undefinedResult, reason: error.message };
      throw error;
    }
  };
}

const offered: CaseMethods = { ...kGroups, ...pairs, ...repeated, ...factorial };

export const methods: CaseMethods = Object.fromEntries(
  Object.entries(offered).map(([name, method]) => [name, refusing(method)]),
);
