import { largestSize, noSpread } from '../inference.ts';
import { covariance, mean } from '../moments.ts';
import { requireScores } from '../scores.ts';
import { type BestExponent, bestExponent, normalLogLikelihood } from './best-exponent.ts';
import { powered, poweredSlope } from './power.ts';

/**
 * Box-Cox transformation of positive scores.
 * @param x scores (n), all above 0
 * @param lambda exponent; 0 = natural log
 * @returns (x^lambda - 1) / lambda
 * @throws RangeError when a score is not above 0 or *lambda* is not finite
 * @source Box & Cox 1964, J. R. Stat. Soc. B 26, 211-252, eq. 1
 * @checked by hand, 1e-15
 */
export function boxCox(x: Float64Array, lambda: number): Float64Array {
  requireScores(x, 0);
  if (!Number.isFinite(lambda)) throw new RangeError(`*lambda* must be finite; got ${lambda}`);
  const bad = x.find((score) => !(score > 0));
  if (bad !== undefined) throw new RangeError(`*x* must hold numbers above 0; got ${bad}`);
  return x.map((score) => powered(Math.log(score), lambda));
}

/**
 * Exponent that makes transformed scores likeliest as normal ones.
 * @param x scores (n, any unit)
 * @returns lambda and log likelihood; null with a reason for fewer than 3 scores, a score of 0 or below, equal scores or no
 *   maximum between -50 and 50
 * @throws RangeError when a score is not finite
 * @source Box & Cox 1964, eq. 8: (lambda - 1) sum log x - n/2 log(mean squared deviation of transformed scores)
 * @checked outside check cases box_cox_lambda, lambda 1e-6, log likelihood 1e-9 relative
 */
export function boxCoxLambda(x: Float64Array): BestExponent {
  requireScores(x, 0);
  const n = x.length;
  if (n < 3) return { lambda: null, logLikelihood: null, reason: 'fewer than 3 scores' };
  if (x.some((score) => score <= 0)) return { lambda: null, logLikelihood: null, reason: 'a score is 0 or below' };
  const logs = x.map(Math.log);
  const center = mean(logs);
  // Dividing the scores by their geometric mean leaves lambda and keeps large powers in range.
  const u = logs.map((value) => value - center);
  if (noSpread(largestSize(u), Math.max(1, largestSize(logs)))) {
    return { lambda: null, logLikelihood: null, reason: 'all scores are equal' };
  }
  return bestExponent({
    logLikelihood: (lambda) => {
      return normalLogLikelihood(u.map((value) => powered(value, lambda))) - n * center;
    },
    score: (lambda) => {
      const transformed = u.map((value) => powered(value, lambda));
      return -covariance(
        transformed,
        u.map((value) => poweredSlope(value, lambda)),
      );
    },
  });
}
