import { fittingEstimators } from './compare.ts';
import type { Design } from './design.ts';
import { GRID_TRIMS, gridRules } from './sweep.ts';

/**
 * How many analyses the strip's grid holds for a comparison of two levels, counted without looking at the data: copies
 * that would be merged and analyses that would be refused are counted too.
 *
 * @param design with its roles and factors; its conditions may be hidden
 * @param factor name of the factor whose levels are compared
 * @returns rules x trims x closed-form rows in the outcome's unit; null where there is no such factor
 * @source the grid as sweepClaim runs it (sweep.ts)
 */
export function plannedAnalyses(design: Design, factor: string): number | null {
  const scope = design.factors.find((each) => each.name === factor)?.scope;
  if (scope === undefined) return null;
  const rows = fittingEstimators(scope).filter((each) => each.sameUnit && each.closedForm);
  const perRule = rows.reduce((sum, each) => sum + (each.trims ? GRID_TRIMS.length : 1), 0);
  return gridRules(design).length * perRule;
}
