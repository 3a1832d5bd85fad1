import { tQuantileUpper } from '../numerics/tails/t.ts';
import { winsorizedVariance } from '../numerics/winsorized.ts';
import type { Design } from './design.ts';
import { type ScoreSpec, scoreDesign } from './score.ts';

/** The comparison whose interval is bounded. */
export interface VeilQuestion {
  /** The factor whose levels are compared. */
  readonly factor: string;
  /** Percent trimmed at each end, integer 0 to 25. */
  readonly trim: number;
  /** Between 0 and 1. */
  readonly alpha: number;
}

/**
 * About how far the interval of a comparison of two conditions reaches to either side at most, told without looking
 * at the conditions.
 *
 * Within participants it comes from the differences of all pairs of conditions taken with both signs, so that neither
 * a direction nor a mean difference shows; between participants from the spread of all scores together and the number
 * of participants declared for the two smallest groups. Both are larger than the spread that the interval is made
 * from by what the conditions differ, hence "at most"; with trimming, several conditions or unequal spreads only "about":
 * winsorizing all of it together takes more from what is spread wider.
 *
 * @param design hidden (hidden-design.ts), with its rules applied
 * @param score how kept rows become a participant's score
 * @param question a factor of the design, the trim and alpha
 * @returns half the width in the outcome's unit; null where too few participants are left, or the design is not hidden
 * @source within: t(1 - alpha/2; h - 1) s_w / ((1 - 2 trim) sqrt(n)), Tukey & McLaughlin 1963, with s_w uncentred;
 *   between: t sqrt(sum of (n_j - 1) s_w^2 / (h_j (h_j - 1))), Yuen 1974, df = smaller h - 1
 * @checked by hand; without trimming against 50 drawn samples; four fifths of every demo's open half width, or more
 */
export function veilWidth(design: Design, score: ScoreSpec, question: VeilQuestion): number | null {
  const { hidden } = design;
  const factor = design.factors.find((each) => each.name === question.factor);
  if (hidden === undefined || factor === undefined) return null;
  const blocks = blockScores(design, score);
  if (factor.scope === 'within') return withinWidth(blocks, question);
  const sizes = hidden.sizes.find((each) => each.factor === question.factor)?.sizes ?? [];
  return betweenWidth(blocks.map(meanOf), sizes, question);
}

/** Complete participants' scores, one a block of rows under the same conditions. */
function blockScores(design: Design, score: ScoreSpec): Float64Array[] {
  const { hidden, ...rest } = design;
  if (hidden === undefined || hidden.blockCount === 0) return [];
  const levels = Array.from({ length: hidden.blockCount }, (_, block) => String(block));
  const factors = [{ name: 'block', scope: 'within' as const, levels, codes: hidden.blocks }];
  const scores = scoreDesign({ ...rest, factors }, score);
  const width = levels.length;
  return scores.participants
    .map((_, who) => scores.values.slice(who * width, (who + 1) * width))
    .filter((own) => !own.some(Number.isNaN));
}

function withinWidth(blocks: readonly Float64Array[], { trim, alpha }: VeilQuestion): number | null {
  const n = blocks.length;
  const h = n - 2 * Math.floor((trim * n) / 100);
  const differences: number[] = [];
  for (const own of blocks) {
    for (let a = 0; a < own.length; a++) {
      for (let b = 0; b < own.length; b++) if (a !== b) differences.push((own[a] as number) - (own[b] as number));
    }
  }
  if (h < 2 || differences.length < 2) return null;
  const spread = Math.sqrt(winsorizedVariance(Float64Array.from(differences), trim));
  return (tQuantileUpper(alpha / 2, h - 1) * spread) / ((1 - (2 * trim) / 100) * Math.sqrt(n));
}

function betweenWidth(
  scores: readonly number[],
  sizes: readonly number[],
  { trim, alpha }: VeilQuestion,
): number | null {
  const smallest = sizes.slice(0, 2);
  const left = smallest.map((n) => n - 2 * Math.floor((trim * n) / 100));
  if (smallest.length < 2 || left.some((h) => h < 2) || scores.length < 2) return null;
  const variance = winsorizedVariance(Float64Array.from(scores), trim);
  const squared = smallest.map((n, j) => ((n - 1) * variance) / ((left[j] as number) * ((left[j] as number) - 1)));
  return tQuantileUpper(alpha / 2, Math.min(...left) - 1) * Math.sqrt(squared.reduce((sum, each) => sum + each, 0));
}

function meanOf(own: Float64Array): number {
  return own.reduce((sum, each) => sum + each, 0) / own.length;
}
