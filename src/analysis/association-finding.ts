import type { AssociationSpec, Pairs } from './association.ts';
import type { Finding, Limits } from './finding.ts';

/** The words of a row. */
export interface AssociationWords {
  readonly id: string;
  readonly group: 'correlations' | 'slopes';
  readonly name: string;
  readonly quantity: string;
  readonly method: string;
  readonly trims?: boolean;
}

/** The numbers of a row; what is absent is null. */
export interface AssociationNumbers {
  readonly estimate: number | null;
  readonly reason?: string | undefined;
  readonly se?: number | null;
  readonly df?: number | null;
  readonly statistic?: Finding['statistic'];
  readonly p?: number | null;
  readonly pHow: string;
  readonly interval?: Limits | null;
  /** Pairs the estimate is made from, where not all. */
  readonly kept?: number;
  readonly cautions?: readonly string[];
}

/** Pairs below which a row describes and gives no p (methods R22: cell n < 5). */
export const LEAST_PAIRS = 5;
/** Pairs below which a bootstrap is unsteady (methods R17). */
export const FEW_PAIRS = 10;
/** Pairs up to which resamples of a statistic over all pairs of participants are drawn: beyond, they take minutes. */
export const MOST_PAIRS = 500;

/**
 * Joins words and numbers to a finding; withholds p and interval below 5 pairs (R22).
 *
 * @param words of the row
 * @param pairs what it was made from
 * @param spec direction and alpha
 * @param numbers what was found
 * @returns the finding; a slope's unit is the outcome's column per the other column
 */
export function associationFinding(
  words: AssociationWords,
  pairs: Pairs,
  spec: AssociationSpec,
  numbers: AssociationNumbers,
): Finding {
  const n = pairs.x.length;
  const few = n < LEAST_PAIRS;
  const reason = numbers.reason ?? (few ? `fewer than ${LEAST_PAIRS} participants: described only` : undefined);
  const give = <T>(value: T | null | undefined): T | null => (few || value === undefined ? null : value);
  const slope = words.group === 'slopes';
  const trims = words.trims === true;
  return {
    estimator: words.id,
    label: trims ? `${spec.trim} % ${words.name}` : words.name,
    quantity: words.quantity,
    group: words.group,
    unit: slope ? `${spec.y} per ${spec.x}` : '',
    sameUnit: slope,
    nullValue: 0,
    reversed: false,
    trim: trims ? spec.trim : 0,
    estimate: numbers.estimate,
    ...(reason === undefined ? {} : { reason }),
    se: give(numbers.se),
    df: give(numbers.df),
    statistic: numbers.statistic ?? null,
    p: give(numbers.p),
    pHow: numbers.pHow,
    interval: give(numbers.interval),
    level: 1 - spec.alpha,
    alternative: spec.alternative,
    effects: [],
    n,
    counts: numbers.kept === undefined ? [] : [{ condition: 'pairs left', n, h: numbers.kept }],
    cautions: [...(numbers.cautions ?? []), ...(few ? ['NOP'] : n < FEW_PAIRS ? ['FEWPAIRS'] : [])],
    method: words.method,
  };
}

/** Why no resamples are drawn of a statistic that looks at all pairs of participants; null up to 500 participants. */
export function tooManyForPairs({
  x,
}: Pairs): { se: null; p: null; interval: null; how: string; reason: string } | null {
  if (x.length <= MOST_PAIRS) return null;
  const reason = `more than ${MOST_PAIRS} participants: no resamples are drawn for this row`;
  return { se: null, p: null, interval: null, how: '', reason };
}
