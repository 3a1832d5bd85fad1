import { plural } from '../../cells/numbers.ts';
import type { Design } from '../analysis/design.ts';
import { estimatorOf } from '../analysis/estimators.ts';
import { plannedAnalyses } from '../analysis/planned-analyses.ts';
import type { ScoreSpec } from '../analysis/score.ts';
import { veilWidth } from '../analysis/veil-width.ts';
import type { Cell } from '../worksheet/format.ts';
import type { Page } from './page.ts';
import { cellOf, givesOf } from './wiring.ts';

/** What may be told of a veiled comparison, and of what is built on it. */
export interface VeilBound {
  /** "±60 ms": how far the planned interval reaches at most, about. */
  readonly width: string;
  /** The same for means, where the planned row trims; else null. */
  readonly means: string | null;
  /** The condition compared, and its plural. */
  readonly factor: string;
  readonly factors: string;
  /** Analyses of the strip's grid. */
  readonly analyses: number | null;
}

/** What may be told while the conditions are hidden of a comparison of two levels that this cell is, or depends on. */
export function veilBound(page: Page, cellId: string): VeilBound | null {
  const comparison = above(page, cellId, 'result');
  if (comparison === null) return null;
  const scoreCell = above(page, comparison.id, 'scores');
  const { engine } = page.parts;
  const design = engine.context(comparison.id).design;
  if (scoreCell === null || design === undefined) return null;
  const { factor, trim, alpha, effect, estimator } = engine.settings(comparison.id);
  const row = typeof estimator === 'string' ? estimatorOf(estimator) : undefined;
  if (effect !== undefined || row === undefined || !row.sameUnit) return null;
  if (typeof factor !== 'string' || typeof alpha !== 'number') return null;
  const own = row.trims && typeof trim === 'number' ? trim : 0;
  const { statistic, trim: trials } = engine.settings(scoreCell.id);
  const score = { statistic, trim: typeof trials === 'number' ? trials : 0 } as ScoreSpec;
  const width = boundOf(design, score, factor, own, alpha);
  if (width === null) return null;
  return {
    width,
    means: own === 0 ? null : boundOf(design, score, factor, 0, alpha),
    factor,
    factors: plural(factor),
    analyses: plannedAnalyses(design, factor),
  };
}

/** The nearest cell up the ports that gives `type`: this one itself, or one it reads. */
function above(page: Page, cellId: string, type: 'result' | 'scores'): Cell | null {
  const seen = new Set<string>();
  for (let level = [cellId]; level.length > 0; ) {
    const cells = level.filter((id) => !seen.has(id)).map((id) => cellOf(page.worksheet, id));
    for (const id of level) seen.add(id);
    const there = cells.filter((cell) => cell !== undefined);
    const found = there.find((cell) => givesOf(page.parts.registry, cell) === type);
    if (found !== undefined) return found;
    level = there.flatMap((cell) => Object.values(cell.from));
  }
  return null;
}

/** Widths of a design object: they are asked for with every drawing. */
const known = new WeakMap<Design, Map<string, string | null>>();

function boundOf(design: Design, score: ScoreSpec, factor: string, trim: number, alpha: number): string | null {
  const widths = known.get(design) ?? new Map<string, string | null>();
  known.set(design, widths);
  const key = JSON.stringify([score, factor, trim, alpha]);
  const before = widths.get(key);
  if (before !== undefined) return before;
  const width = veilWidth(design, score, { factor, trim, alpha });
  const { unit } = design.roles;
  // Two digits: it is a bound, and only about.
  const text = width === null ? null : `\u00b1${Number(width.toPrecision(2))}${unit === '' ? '' : ` ${unit}`}`;
  widths.set(key, text);
  return text;
}
