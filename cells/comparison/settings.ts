import { type Asked, askedFactors, isOmnibus, type PairProcedure } from '../../src/analysis/asked.ts';
import { ESTIMATORS, estimatorOf } from '../../src/analysis/estimators.ts';
import { defaultOmnibusRow, fittingOmnibusRows, omnibusRowOf } from '../../src/analysis/omnibus.ts';
import type { SampleScope } from '../../src/analysis/samples.ts';
import type { Scores } from '../../src/analysis/score.ts';
import type { Num } from '../kind.ts';

/** What is asked where it is not a pair of levels; absent = the pair of `first` and `second`. */
export type EffectSettings =
  | { readonly type: 'levels'; readonly factor: string; readonly pairs: PairProcedure }
  | { readonly type: 'interaction'; readonly factors: readonly [string, string] }
  | {
      readonly type: 'contrast';
      readonly factor: string;
      readonly first: readonly string[];
      readonly second: readonly string[];
    }
  | { readonly type: 'value'; readonly value: Num };

export type ComparisonSettings = {
  readonly factor: string;
  readonly first: string;
  readonly second: string;
  readonly effect?: EffectSettings;
  /** Id of the planned row. */
  readonly estimator: string;
  /** Percent at each end, over participants. */
  readonly trim: Num;
  readonly alternative: 'two-sided' | 'greater' | 'less';
  readonly alpha: number;
  /** Resamples of the bootstrap rows. */
  readonly resamples: number;
};

/** The question of the settings with its value looked up; undefined for a pair. */
export function askedOf(settings: ComparisonSettings, look: (value: Num) => number | null): Asked | undefined {
  const { effect } = settings;
  return effect?.type === 'value' ? { type: 'value', value: look(effect.value) } : effect;
}

export type Factors = Scores['design']['factors'];

/** Which rows fit the settings' question. */
export function scopeOf(factors: Factors, settings: ComparisonSettings): SampleScope | 'omnibus' | undefined {
  const { effect } = settings;
  if (effect === undefined) return factors.find((factor) => factor.name === settings.factor)?.scope;
  if (effect.type === 'value') return 'value';
  if (effect.type !== 'contrast') return 'omnibus';
  const scope = askedFactors(factors, effect)[0]?.scope;
  return scope === 'between' ? 'contrast' : scope;
}

/** A row that may be planned, as the sentence offers it. */
export interface PlannedRow {
  readonly id: string;
  readonly name: string;
  readonly hint: string;
  readonly trims: boolean;
  /** Whether its p or interval is resampled, so that the sentence names the number of resamples. */
  readonly resampled: boolean;
}

/** The rows that fit the settings' question, in order. */
export function rowsFor(factors: Factors, settings: ComparisonSettings): PlannedRow[] {
  const { effect } = settings;
  if (effect?.type === 'levels' || effect?.type === 'interaction') {
    return fittingOmnibusRows(factors, effect).map(({ id, name, hint, trims }) => ({
      id,
      name,
      hint,
      trims,
      resampled: false,
    }));
  }
  const scope = scopeOf(factors, settings);
  return ESTIMATORS.filter((each) => each.scope === scope).map(({ id, name, trims, sameUnit, closedForm }) => {
    const unit = sameUnit ? 'in the outcome\u2019s unit' : 'another quantity, without a unit';
    return { id, name, hint: closedForm ? unit : `${unit}, resampled`, trims, resampled: !closedForm };
  });
}

/** The row of an id whatever the question: what the sentence shows while the design above is not there. */
export function rowOfId(id: string): Pick<PlannedRow, 'name' | 'trims' | 'resampled'> | undefined {
  const omnibus = omnibusRowOf(id);
  if (omnibus) return { name: omnibus.name, trims: omnibus.trims, resampled: false };
  const row = estimatorOf(id);
  return row && { name: row.name, trims: row.trims, resampled: !row.closedForm };
}

const NEW_ROW: Readonly<Record<SampleScope, string>> = {
  within: 'trimmed-differences',
  between: 'yuen-welch',
  contrast: 'contrast-trimmed',
  value: 'trimmed-mean',
};

/** The settings with a planned row that fits their question: the present one where it does, else trimmed means. */
export function withFittingRow(factors: Factors, settings: ComparisonSettings): ComparisonSettings {
  const scope = scopeOf(factors, settings);
  if (scope === undefined || rowsFor(factors, settings).some((row) => row.id === settings.estimator)) return settings;
  const { effect } = settings;
  const estimator =
    effect !== undefined && isOmnibus(effect as Asked)
      ? defaultOmnibusRow(factors, effect as Extract<Asked, { type: 'levels' | 'interaction' }>)
      : NEW_ROW[scope === 'omnibus' ? 'within' : scope];
  return { ...settings, estimator };
}
