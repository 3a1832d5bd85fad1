import { largestSize, noSpread } from '../inference.ts';
import { covariance, sum, sumOfSquares } from '../moments.ts';
import { requireScores } from '../scores.ts';
import { type BestExponent, bestExponent, normalLogLikelihood } from './best-exponent.ts';
import { powered, poweredSlope } from './power.ts';

/**
 * Yeo-Johnson transformation of scores of either sign.
 * @param x scores (n)
 * @param lambda exponent; 1 leaves the scores as they are
 * @returns ((x+1)^lambda - 1) / lambda for x >= 0, -((1-x)^(2-lambda) - 1) / (2-lambda) for x < 0
 * @throws RangeError when a score or *lambda* is not finite
 * @source Yeo & Johnson 2000, Biometrika 87, 954-959, eq. 2.1
 * @checked by hand, 1e-15
 */
export function yeoJohnson(x: Float64Array, lambda: number): Float64Array {
  requireScores(x, 0);
  if (!Number.isFinite(lambda)) throw new RangeError(`*lambda* must be finite; got ${lambda}`);
  return x.map((score) => (score >= 0 ? powered(Math.log1p(score), lambda) : -powered(Math.log1p(-score), 2 - lambda)));
}

/**
 * Exponent that makes Yeo-Johnson transformed scores likeliest as normal ones.
 * @param x scores (n, any unit)
 * @returns lambda and log likelihood; null with a reason for fewer than 3 or equal scores or no maximum between -50 and 50
 * @throws RangeError when a score is not finite
 * @source Yeo & Johnson 2000, eq. 3.1: (lambda - 1) sum sign(x) log(|x| + 1) - n/2 log(mean squared deviation)
 * @checked outside check cases yeo_johnson_lambda, lambda 1e-5, log likelihood 1e-9 relative
 */
export function yeoJohnsonLambda(x: Float64Array): BestExponent {
  requireScores(x, 0);
  const n = x.length;
  if (n < 3) return { lambda: null, logLikelihood: null, reason: 'fewer than 3 scores' };
  const size = largestSize(x);
  if (noSpread(Math.sqrt(sumOfSquares(x) / n), size)) {
    return { lambda: null, logLikelihood: null, reason: 'all scores are equal' };
  }
  const stretch = sum(x.map((score) => Math.sign(score) * Math.log1p(Math.abs(score))));
  return bestExponent({
    logLikelihood: (lambda) => (lambda - 1) * stretch + normalLogLikelihood(yeoJohnson(x, lambda)),
    score: (lambda) => {
      const transformed = yeoJohnson(x, lambda);
      const slopes = x.map((score) =>
        score >= 0 ? poweredSlope(Math.log1p(score), lambda) : poweredSlope(Math.log1p(-score), 2 - lambda),
      );
      return stretch - (n * (n - 1) * covariance(transformed, slopes)) / sumOfSquares(transformed);
    },
  });
}
