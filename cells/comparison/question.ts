/** The first blank of a comparison: a level, every level, an interaction, chosen levels, or every score. */
import { type Asked, refusalOf } from '../../src/analysis/asked.ts';
import { choiceBlank } from '../blanks.ts';
import type { Blank, Option } from '../kind.ts';
import { type ComparisonSettings, type EffectSettings, type Factors, withFittingRow } from './settings.ts';

/** Between a factor's name and its level in an option's value; neither can contain it. */
const SEPARATOR = '\u0000';

/** First part of the value of an option that is not a level. */
const KIND = {
  levels: '\u0001levels',
  interaction: '\u0001interaction',
  contrast: '\u0001contrast',
  value: '\u0001value',
} as const;

/** What the first blank offers, and the settings each choice leads to. */
export function questionBlank(settings: ComparisonSettings, factors: Factors): Blank {
  const options = [...levelOptions(factors), ...questionOptions(factors)];
  const known = new Set(options.map((option) => option.value));
  const value = optionOf(settings);
  const label = settings.effect === undefined ? 'first condition' : 'what is compared';
  const blank = choiceBlank({ key: 'first', label }, value, options, 'which', (chosen) =>
    withFittingRow(factors, chosenSettings(settings, factors, chosen)),
  );
  if (known.has(value)) return blank;
  // A question the design above does not allow, or that is not there yet, still reads as what it is.
  const words = settings.effect === undefined ? settings.first : questionWords(settings.effect, factors);
  return words === '' ? blank : { ...blank, shown: words };
}

function levelOptions(factors: Factors): Option[] {
  return factors.flatMap((factor) =>
    factor.levels.map((level) => ({
      value: factor.name + SEPARATOR + level,
      label: level,
      ...(factors.length > 1 ? { hint: `${factor.name}, ${factor.scope} participants` } : {}),
    })),
  );
}

const HINTS = {
  levels: 'whether they differ at all',
  interaction: 'whether the differences are the same',
  contrast: 'the mean of some against the mean of others',
  value: 'against a value in the outcome\u2019s unit',
} as const;

/** Every question about several levels, chosen levels or a value that the design allows. */
function questionOptions(factors: Factors): Option[] {
  const offered: EffectSettings[] = [
    ...factors.map((factor): EffectSettings => ({ type: 'levels', factor: factor.name, pairs: 'none' })),
    ...factors.flatMap((one, i) =>
      factors.slice(i + 1).map((other): EffectSettings => ({ type: 'interaction', factors: [one.name, other.name] })),
    ),
    ...factors.filter((factor) => factor.levels.length > 2).map((factor) => newContrast(factors, factor.name)),
    { type: 'value', value: 0 },
  ];
  return offered
    .filter((effect) => refusalOf(factors, effect as Asked) === null)
    .map((effect) => ({ value: keyOf(effect), label: questionWords(effect, factors), hint: HINTS[effect.type] }));
}

function newContrast(factors: Factors, name: string): EffectSettings & { type: 'contrast' } {
  const [first = '', ...second] = factors.find((factor) => factor.name === name)?.levels ?? [];
  return { type: 'contrast', factor: name, first: [first], second };
}

/** "every alert", "alert differences between training groups", "chosen levels of alert", "every score". */
export function questionWords(effect: EffectSettings, factors: Factors): string {
  switch (effect.type) {
    case 'levels':
      return `every ${effect.factor}`;
    case 'interaction': {
      const [one, other] = effect.factors;
      const between = factors.find((factor) => factor.name === other)?.scope === 'between';
      return `${one} differences between ${between ? `${other} groups` : `levels of ${other}`}`;
    }
    case 'contrast':
      return `chosen levels of ${effect.factor}`;
    case 'value':
      return 'every score';
  }
}

function keyOf(effect: EffectSettings): string {
  const parts = effect.type === 'value' ? [] : effect.type === 'interaction' ? effect.factors : [effect.factor];
  return [KIND[effect.type], ...parts].join(SEPARATOR);
}

function optionOf(settings: ComparisonSettings): string {
  return settings.effect === undefined ? settings.factor + SEPARATOR + settings.first : keyOf(settings.effect);
}

function chosenSettings(settings: ComparisonSettings, factors: Factors, chosen: string): ComparisonSettings {
  const [head = '', ...rest] = chosen.split(SEPARATOR);
  const { effect, ...pair } = settings;
  const asked = effectOf(head, rest, factors, effect);
  if (asked !== null) return { ...pair, effect: asked };
  const first = rest[0] ?? '';
  const factor = factors.find((each) => each.name === head);
  const keeps = head === settings.factor && settings.second !== first;
  const second = keeps ? settings.second : (factor?.levels.find((level) => level !== first) ?? '');
  return { ...pair, factor: head, first, second };
}

function effectOf(
  head: string,
  rest: readonly string[],
  factors: Factors,
  before: EffectSettings | undefined,
): EffectSettings | null {
  const [one = '', other = ''] = rest;
  switch (head) {
    case KIND.levels:
      return before?.type === 'levels' && before.factor === one
        ? before
        : { type: 'levels', factor: one, pairs: 'none' };
    case KIND.interaction:
      return { type: 'interaction', factors: [one, other] };
    case KIND.contrast:
      return before?.type === 'contrast' && before.factor === one ? before : newContrast(factors, one);
    case KIND.value:
      return before?.type === 'value' ? before : { type: 'value', value: 0 };
    default:
      return null;
  }
}
