import type { ClaimSpec } from './claim.ts';
import type { Result } from './compare.ts';
import type { AxisName, GridChoice } from './grid-options.ts';
import { type AxisShare, axisShares, type Spread, spreadOf } from './grid-spread.ts';
import { AXES, type Chosen, type Combination, type GridEntry, GridWork } from './grid-work.ts';
import type { ScoreSpec } from './score.ts';
import { type Specification, type Sweep, summarise } from './sweep.ts';

/** One analysis of the grid, with what leads to it. */
export interface GridSpecification extends Specification {
  readonly score: ScoreSpec;
  readonly mark: 'E' | 'U';
  readonly options: { readonly [axis in AxisName]: readonly string[] };
}

export interface GridSweep extends Sweep {
  readonly specifications: readonly GridSpecification[];
}

export interface Grid {
  /** Equivalent analyses, once each. */
  readonly sweep: GridSweep;
  /** Analyses whose question is not surely the same, once each, in the order asked for. */
  readonly exploratory: readonly GridSpecification[];
  /** Combinations asked for. */
  readonly declared: number;
  /** Combinations left out, by reason. */
  readonly refused: readonly { readonly why: string; readonly example: string; readonly count: number }[];
  /** Different sets of kept scores among the equivalent analyses. */
  readonly keptSets: number;
  readonly spread: Spread | null;
  readonly shares: readonly AxisShare[];
}

/**
 * Runs every combination of the chosen options, and the worksheet's own settings. Combinations that keep the same rows
 * and trim the same count by the same row are one analysis; those that ask another question stand apart.
 *
 * @param result the worksheet's comparison with its chain
 * @param claim what is claimed
 * @param choice values chosen on each axis; a value the worksheet does not have is left out
 * @returns equivalent and exploratory analyses, what was left out and why, how far estimates spread and by which axis
 * @source Steegen, Tuerlinckx, Gelman & Vanpaemel 2016; Del Giudice & Gangestad 2021; methods 2.1, 2.2
 */
export function runGrid(result: Result, claim: ClaimSpec, choice: GridChoice): Grid {
  const work = new GridWork(result, claim, choice);
  work.addOwn();
  const placed: { readonly combination: Combination; readonly key: string }[] = [];
  for (const combination of combinationsOf(work.chosen)) {
    const key = work.add(combination);
    if (key !== null) placed.push({ combination, key });
  }
  const entries = [...work.entries.values()];
  const equivalent = entries.filter((entry) => entry.mark === 'E');
  const specifications = equivalent.map(specificationOf);
  const sweep = { ...summarise(specifications, result.scores.design.roles.unit), specifications };
  const estimates = placed.flatMap(({ combination, key }) => {
    const entry = work.entries.get(key);
    const finding = entry?.specification.finding;
    if (entry?.mark !== 'E' || !finding?.sameUnit || finding.estimate === null) return [];
    return [{ combination, estimate: finding.estimate }];
  });
  return {
    sweep,
    exploratory: entries.filter((entry) => entry.mark === 'U').map(specificationOf),
    declared: placed.length + work.refusedCount(),
    refused: work.refusals(),
    keptSets: new Set(equivalent.map((entry) => entry.kept)).size,
    spread: spreadOf(
      specifications.flatMap(({ finding }) =>
        finding.sameUnit && finding.estimate !== null ? [finding.estimate] : [],
      ),
    ),
    shares: axisShares(estimates),
  };
}

function specificationOf({ specification, mark, score, options }: GridEntry): GridSpecification {
  const lists = AXES.map((axis) => [axis, [...options[axis]]] as const);
  return {
    ...specification,
    mark,
    score,
    options: Object.fromEntries(lists) as unknown as GridSpecification['options'],
  };
}

function combinationsOf(chosen: Chosen): Combination[] {
  let all: { [axis: string]: string }[] = [{}];
  for (const axis of AXES) {
    all = all.flatMap((sofar) => chosen[axis].map((option) => ({ ...sofar, [axis]: option.value })));
  }
  return all as unknown as Combination[];
}
