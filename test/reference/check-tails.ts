import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { betaLower, betaQuantile, betaQuantileUpper, betaUpper } from '../../src/numerics/tails/beta.ts';
import { binomialLower, binomialMass, binomialUpper } from '../../src/numerics/tails/binomial.ts';
import {
  chiSquareLower,
  chiSquareQuantile,
  chiSquareQuantileUpper,
  chiSquareUpper,
} from '../../src/numerics/tails/chi-square.ts';
import { fLower, fQuantile, fQuantileUpper, fUpper } from '../../src/numerics/tails/f.ts';
import { gammaLower, gammaQuantile, gammaQuantileUpper, gammaUpper } from '../../src/numerics/tails/gamma.ts';
import {
  hypergeometricLower,
  hypergeometricMass,
  hypergeometricUpper,
} from '../../src/numerics/tails/hypergeometric.ts';
import { kendallLower, kendallUpper } from '../../src/numerics/tails/kendall.ts';
import {
  kolmogorovLimitLower,
  kolmogorovLimitUpper,
  kolmogorovOneSampleLower,
  kolmogorovOneSampleUpper,
  kolmogorovTwoSampleLower,
  kolmogorovTwoSampleUpper,
} from '../../src/numerics/tails/kolmogorov.ts';
import { noncentralFLower, noncentralFParameter, noncentralFUpper } from '../../src/numerics/tails/noncentral-f.ts';
import { noncentralTLower, noncentralTParameter, noncentralTUpper } from '../../src/numerics/tails/noncentral-t.ts';
import { normalLower, normalQuantile, normalQuantileUpper, normalUpper } from '../../src/numerics/tails/normal.ts';
import { owensT } from '../../src/numerics/tails/owens-t.ts';
import { rankSumLower, rankSumUpper } from '../../src/numerics/tails/rank-sum.ts';
import { signedRankLower, signedRankUpper } from '../../src/numerics/tails/signed-rank.ts';
import { spearmanLower, spearmanUpper } from '../../src/numerics/tails/spearman.ts';
import { digamma, erf, erfc, lgamma } from '../../src/numerics/tails/special.ts';
import {
  studentizedRangeLower,
  studentizedRangeQuantile,
  studentizedRangeUpper,
} from '../../src/numerics/tails/studentized-range.ts';
import { tLower, tQuantile, tQuantileUpper, tUpper } from '../../src/numerics/tails/t.ts';

/** One row of a grid: column name -> text. */
type Row = ReadonlyMap<string, string>;
type Function1to4 = (...args: number[]) => number;

/** How one grid file is read: argument columns, value columns with the function each one checks, and the tolerance. */
interface Grid {
  readonly takes: readonly string[];
  readonly gives: Readonly<Record<string, Function1to4>>;
  /** Largest error allowed, given the true value and the arguments. */
  readonly allows: (truth: number, args: readonly number[]) => number;
}

/** Relative 1e-11, or 1e-10 where a parameter is 1e5 or more (tolerances of the README beside the grids). */
const relative = (truth: number, args: readonly number[]) =>
  (args.some((each) => each >= 1e5 && each < Infinity) ? 1e-10 : 1e-11) * Math.abs(truth);
const quantileTolerance = (truth: number) => 1e-11 * Math.abs(truth);
const rangeTolerance = (truth: number) => 1e-9 * Math.abs(truth);
const lgammaTolerance = (truth: number) => 1e-14 * Math.max(1, Math.abs(truth));

function grid(takes: string, gives: Readonly<Record<string, Function1to4>>, allows: Grid['allows'] = relative): Grid {
  return { takes: takes.split(' '), gives, allows };
}

function tails(takes: string, lower: Function1to4, upper: Function1to4): Grid {
  return grid(takes, { lower, upper });
}

/** Gamma grids carry a scale; the functions have scale 1. */
const scaled = (tail: (x: number, shape: number) => number) => (x: number, shape: number, scale: number) =>
  tail(x / scale, shape);
const stretched = (quantile: (p: number, shape: number) => number) => (p: number, shape: number, scale: number) =>
  scale * quantile(p, shape);

const GRIDS: Readonly<Record<string, Grid>> = {
  beta_cdf: tails('x a b', betaLower, betaUpper),
  binom_cdf: grid('k n prob', { pmf: binomialMass, lower: binomialLower, upper: binomialUpper }),
  chisq_cdf: tails('x df', chiSquareLower, chiSquareUpper),
  digamma: grid('x', { value: digamma }),
  erf: grid('x', { erf, erfc }),
  f_cdf: tails('x df1 df2', fLower, fUpper),
  gamma_cdf: tails('x shape scale', scaled(gammaLower), scaled(gammaUpper)),
  hyper_cdf: grid('k N K n', { pmf: hypergeometricMass, lower: hypergeometricLower, upper: hypergeometricUpper }),
  kendall_cdf: tails('concordant n', kendallLower, kendallUpper),
  kolm_1s: tails('d n', kolmogorovOneSampleLower, kolmogorovOneSampleUpper),
  kolm_2s: grid('d m n', { lower_strict: kolmogorovTwoSampleLower, upper_incl: kolmogorovTwoSampleUpper }),
  kolm_lim: tails('x', kolmogorovLimitLower, kolmogorovLimitUpper),
  lgamma: grid('x', { value: lgamma }, lgammaTolerance),
  ncf_cdf: tails('x df1 df2 ncp', noncentralFLower, noncentralFUpper),
  ncf_ncp: grid('f df1 df2 p', { ncp: noncentralFParameter }, quantileTolerance),
  nct_cdf: tails('x df ncp', noncentralTLower, noncentralTUpper),
  nct_ncp: grid('t df p', { ncp: noncentralTParameter }, quantileTolerance),
  norm_cdf: tails('x', normalLower, normalUpper),
  owens_t: grid('h a', { value: owensT }),
  signrank_cdf: tails('w n', signedRankLower, signedRankUpper),
  spearman_cdf: grid('S n', { lower: spearmanLower, upper_incl: spearmanUpper }),
  t_cdf: tails('x df', tLower, tUpper),
  tukey_cdf: grid('q k df', { lower: studentizedRangeLower, upper: studentizedRangeUpper }, rangeTolerance),
  tukey_q: grid('p k df', { value: studentizedRangeQuantile }, rangeTolerance),
  wilcox_cdf: tails('w m n', rankSumLower, rankSumUpper),
};

/** Quantile grids: a column `tail` says which of the two functions a row checks. */
const QUANTILES: Readonly<Record<string, { takes: string; L: Function1to4; U: Function1to4 }>> = {
  beta_q: { takes: 'p a b', L: betaQuantile, U: betaQuantileUpper },
  chisq_q: { takes: 'p df', L: chiSquareQuantile, U: chiSquareQuantileUpper },
  f_q: { takes: 'p df1 df2', L: fQuantile, U: fQuantileUpper },
  gamma_q: { takes: 'p shape scale', L: stretched(gammaQuantile), U: stretched(gammaQuantileUpper) },
  norm_q: { takes: 'p', L: normalQuantile, U: normalQuantileUpper },
  t_q: { takes: 'p df', L: tQuantile, U: tQuantileUpper },
};

function gridFor(name: string, row: Row): Grid | undefined {
  const quantile = Object.hasOwn(QUANTILES, name) ? QUANTILES[name] : undefined;
  if (quantile === undefined) return Object.hasOwn(GRIDS, name) ? GRIDS[name] : undefined;
  return grid(quantile.takes, { value: row.get('tail') === 'U' ? quantile.U : quantile.L }, quantileTolerance);
}

function rowsOf(text: string): Row[] {
  const lines = text.split(/\r?\n/).filter((line) => line.trim() !== '');
  const names = (lines[0] ?? '').split(',');
  return lines.slice(1).map((line) => new Map(line.split(',').map((cell, i) => [names[i] ?? `column ${i}`, cell])));
}

function numberIn(row: Row, column: string): number {
  const text = row.get(column)?.trim() ?? '';
  if (/^[+-]?inf(inity)?$/i.test(text)) return text.startsWith('-') ? -Infinity : Infinity;
  const value = Number(text);
  if (text === '' || (Number.isNaN(value) && text !== 'NaN')) throw new TypeError(`no number in column ${column}`);
  return value;
}

/** What one row says about each value column: null where it agrees, else the miss in words. */
function checkRow(name: string, row: Row, one: Grid): (string | null)[] {
  const args = one.takes.map((column) => numberIn(row, column));
  const where = `${name}(${one.takes.map((column, i) => `${column}=${args[i]}`).join(', ')})`;
  return Object.entries(one.gives).map(([column, run]) => {
    try {
      const truth = numberIn(row, column);
      const ours = run(...args);
      const error = Math.abs(ours - truth);
      if (ours === truth || error <= one.allows(truth, args)) return null;
      return `${where} ${column}: ours ${ours}, reference ${truth}, relative error ${(error / Math.abs(truth)).toExponential(1)}`;
    } catch (error) {
      return `${where} ${column}: ${error instanceof Error ? error.message : String(error)}`;
    }
  });
}

/**
 * Runs every tail grid in a folder; which function a file checks is told by its name (README beside the grids).
 * @param dir folder of CSV grids
 * @returns values that passed and failed, files that no function is offered for (skipped), and each miss in words
 */
export function checkTails(dir: string): { passed: number; failed: number; skipped: number; misses: string[] } {
  let passed = 0;
  let skipped = 0;
  const misses: string[] = [];
  let failed = 0;
  for (const file of readdirSync(dir).sort()) {
    if (!file.endsWith('.csv')) continue;
    const name = file.slice(0, -'.csv'.length);
    const rows = rowsOf(readFileSync(join(dir, file), 'utf8'));
    if (!Object.hasOwn(GRIDS, name) && !Object.hasOwn(QUANTILES, name)) {
      skipped += rows.length;
      misses.push(`${file}: skipped, no function is offered for ${name}`);
      continue;
    }
    for (const row of rows) {
      for (const miss of checkRow(name, row, gridFor(name, row)!)) {
        if (miss === null) passed += 1;
        else {
          failed += 1;
          misses.push(miss);
        }
      }
    }
  }
  return { passed, failed, skipped, misses };
}
