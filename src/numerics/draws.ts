/** Random scores for simulations, identical to the bit in every engine. */
import { portableExp, portableLog } from './exp-log.ts';
import type { Rng } from './rng.ts';

/**
 * Fills a vector with standard normal draws.
 * @param out overwritten (the one argument that is)
 * @param random stream, advanced by a number of words that depends on what is drawn
 * @source Marsaglia & Bray (1964): a point in the unit disc, (u, v) sqrt(-2 log s / s); built on the portable log
 * @checked theory: moments and tail shares within 4 SE; the same digits in every engine
 */
export function fillNormal(out: Float64Array, random: Rng): void {
  for (let i = 0; i < out.length; i += 2) {
    let u = 0;
    let v = 0;
    let s = 0;
    do {
      u = 2 * random.uniform() - 1;
      v = 2 * random.uniform() - 1;
      s = u * u + v * v;
    } while (s >= 1 || s === 0);
    const scale = Math.sqrt((-2 * portableLog(s)) / s);
    out[i] = u * scale;
    if (i + 1 < out.length) out[i + 1] = v * scale;
  }
}

/**
 * Fills a vector with exponential draws of mean 1.
 * @param out overwritten (the one argument that is)
 * @param random stream, advanced by two words a draw
 * @source inversion: -log(1 - u), u uniform on [0, 1)
 * @checked theory: moments within 4 SE
 */
export function fillExponential(out: Float64Array, random: Rng): void {
  for (let i = 0; i < out.length; i++) out[i] = -portableLog(1 - random.uniform());
}

/**
 * Fills a vector with lognormal draws.
 * @param out overwritten (the one argument that is)
 * @param random stream
 * @param sigma SD of the logs, > 0 (default 1)
 * @throws RangeError when sigma is not positive
 * @source exp of a normal draw times sigma; built on the portable exp and log
 * @checked theory: median 1, log moments within 4 SE
 */
export function fillLognormal(out: Float64Array, random: Rng, sigma = 1): void {
  if (!(sigma > 0 && sigma < Infinity)) throw new RangeError(`*sigma* must be a positive number; got ${sigma}`);
  fillNormal(out, random);
  for (let i = 0; i < out.length; i++) out[i] = portableExp(sigma * (out[i] as number));
}

/**
 * Fills a vector with draws from a contaminated normal distribution.
 * @param out overwritten (the one argument that is)
 * @param random stream
 * @param share probability of a contaminated draw, 0 to 1 (default .1)
 * @param sd SD of a contaminated draw, > 0 (default 10)
 * @throws RangeError when share is outside 0 to 1 or sd is not positive
 * @source Tukey (1960): (1 - share) N(0, 1) + share N(0, sd^2)
 * @checked theory: variance within 4 SE
 */
export function fillContaminated(out: Float64Array, random: Rng, share = 0.1, sd = 10): void {
  if (!(share >= 0 && share <= 1)) throw new RangeError(`*share* must be between 0 and 1; got ${share}`);
  if (!(sd > 0 && sd < Infinity)) throw new RangeError(`*sd* must be a positive number; got ${sd}`);
  fillNormal(out, random);
  for (let i = 0; i < out.length; i++) if (random.uniform() < share) out[i]! *= sd;
}
