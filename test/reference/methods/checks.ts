/** Adapters of the sections "Distribution checks" and "Transformations" of test/reference/cases/README.md. */
import { andersonDarling } from '../../../src/numerics/checks/anderson-darling.ts';
import { autocorrelation } from '../../../src/numerics/checks/autocorrelation.ts';
import { dagostinoK2 } from '../../../src/numerics/checks/dagostino-k2.ts';
import { jarqueBera } from '../../../src/numerics/checks/jarque-bera.ts';
import { kurtosis } from '../../../src/numerics/checks/kurtosis.ts';
import { lillieforsTest } from '../../../src/numerics/checks/lilliefors.ts';
import { runsTest } from '../../../src/numerics/checks/runs-test.ts';
import { shapiroWilk } from '../../../src/numerics/checks/shapiro-wilk.ts';
import { skewness } from '../../../src/numerics/checks/skewness.ts';
import { boxCoxLambda } from '../../../src/numerics/transform/box-cox.ts';
import { yeoJohnsonLambda } from '../../../src/numerics/transform/yeo-johnson.ts';
import {
  type CaseArgs,
  type CaseData,
  type CaseMethod,
  type CaseMethods,
  differencesOrValues,
  numberArg,
  stringArg,
  undefinedResult,
} from './case-data.ts';

type Result = Record<string, unknown>;

/** A check of one vector of scores (or of paired differences); an undefined main quantity gives the undefined result. */
function check(main: string, find: (x: Float64Array, args: CaseArgs) => Result): CaseMethod {
  return (data: CaseData, args: CaseArgs) => {
    const found = find(differencesOrValues(data, args), args);
    return found[main] === null ? { ...undefinedResult } : found;
  };
}

export const checkMethods: CaseMethods = {
  skewness: check('g1', (x) => {
    const s = skewness(x);
    const rest = { z_simple: s.zSimple, z_dagostino: s.z, p_dagostino: s.p };
    return { g1: s.g1, G1: s.bigG1, b1: s.b1, se_G1: s.se, ...rest };
  }),
  kurtosis: check('g2', (x) => {
    const k = kurtosis(x);
    const rest = { z_simple: k.zSimple, z_anscombe_glynn: k.z, p_anscombe_glynn: k.p };
    return { g2: k.g2, G2: k.bigG2, b2: k.b2, se_G2: k.se, ...rest };
  }),
  shapiro_wilk: check('W', (x) => {
    const { w, p } = shapiroWilk(x);
    return { W: w, p };
  }),
  lilliefors_test: check('D', (x) => {
    const { d, pTable, pFormula } = lillieforsTest(x);
    return { D: d, p_table: pTable, p_dallal_wilkinson: pFormula };
  }),
  anderson_darling_normal: check('A2', (x) => {
    const { a2, a2Star, p } = andersonDarling(x);
    return { A2: a2, A2_star: a2Star, p };
  }),
  dagostino_k2: check('K2', (x) => {
    const { k2, p } = dagostinoK2(x);
    return { K2: k2, p };
  }),
  jarque_bera: check('JB', (x) => {
    const { jb, p } = jarqueBera(x);
    return { JB: jb, p };
  }),
  runs_test: check('z', (x, args) => {
    const cutoff = stringArg(args, 'cutoff') === 'mean' ? 'mean' : 'median';
    const { runs, atOrAbove, below, z, p } = runsTest(x, { cutoff, correct: args.correct === true });
    return { runs, n_at_or_above: atOrAbove, n_below: below, z, p };
  }),
  autocorrelation: check('r', (x, args) => {
    const { r, durbinWatson } = autocorrelation(x, { lags: numberArg(args, 'lags') });
    return { r, durbin_watson: durbinWatson };
  }),
  box_cox_lambda: check('lambda_', (x) => {
    const { lambda, logLikelihood } = boxCoxLambda(x);
    return { lambda_: lambda, log_likelihood: logLikelihood };
  }),
  yeo_johnson_lambda: check('lambda_', (x) => {
    const { lambda, logLikelihood } = yeoJohnsonLambda(x);
    return { lambda_: lambda, log_likelihood: logLikelihood };
  }),
};
