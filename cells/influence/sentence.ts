import type { ClaimValue } from '../../src/analysis/claim.ts';
import type { FlipTarget } from '../../src/analysis/flip-set-target.ts';
import { choiceBlank, numberBlank } from '../blanks.ts';
import type { Context, Num, Option, Part } from '../kind.ts';

export type InfluenceSettings = {
  readonly target: FlipTarget;
  /** Smallest effect of interest, in the outcome's unit. */
  readonly smallest: Num;
};

/** "Find the fewest participants whose removal would change the claim: [it loses support]." */
export function influenceSentence(settings: InfluenceSettings, context: Context): Part[] {
  const claim = context.given.claim as ClaimValue | undefined;
  const supported = claim?.verdict === 'supported';
  const options: Option[] = [
    {
      value: 'loses support',
      label: 'it loses support',
      hint: 'the planned row no longer supports the claim',
      ...(claim && !supported ? { refused: 'The planned row does not support the claim now.' } : {}),
    },
    {
      value: 'gains support',
      label: 'it gains support',
      hint: 'the planned row comes to support the claim',
      ...(supported ? { refused: 'The planned row supports the claim already.' } : {}),
    },
    { value: 'changes sign', label: 'its estimate changes sign', hint: 'whatever the interval says' },
    { value: 'falls below', label: 'its estimate falls below the smallest effect of interest' },
  ];
  const target = choiceBlank(
    { key: 'target', label: 'what counts as a change' },
    settings.target,
    options,
    'which change',
    (value) => ({
      ...settings,
      target: value,
    }),
  );
  const unit = claim?.result.scores.design.roles.unit ?? '';
  const smallest = numberBlank(
    { key: 'smallest', label: 'smallest effect of interest' },
    settings.smallest,
    context,
    { min: 0, max: 1e9, step: 1, unit },
    (value) => ({ ...settings, smallest: value }),
  );
  return [
    'Find the fewest participants whose removal would change the claim: ',
    target,
    ...(settings.target === 'falls below' ? [' of ', smallest] : []),
    '.',
  ];
}
