import { isOmnibus } from '../../src/analysis/asked.ts';
import { type CautionId, cautionText } from '../../src/analysis/cautions.ts';
import type { Result } from '../../src/analysis/compare.ts';
import { participantNoun } from '../../src/analysis/design.ts';
import { groupsOfLevels, type Layout, takeLayout } from '../../src/analysis/layout.ts';
import { rerunsOf } from '../../src/analysis/pipeline.ts';
import { LEAST_FOR_P } from '../../src/analysis/row.ts';
import { spreadOf } from '../../src/analysis/rows-omnibus-between.ts';
import { standardDeviation } from '../../src/numerics/moments.ts';
import type { Note } from '../kind.ts';
import { count, counted, fixed, levelPercent } from '../numbers.ts';
import { leftNotes } from './words.ts';

/** What the margin says beside a comparison of several levels. */
export function omnibusNotes(result: Result): Note[] {
  const { comparison, scores, findings } = result;
  const { effect, alpha } = comparison;
  if (!isOmnibus(effect)) return [];
  const noun = participantNoun(scores.design.roles);
  const interaction = effect.type === 'interaction';
  const notes: Note[] = [
    {
      type: 'note',
      text: `${counted(findings[0]?.n ?? 0, noun)}. Each level stands with its own ${levelPercent(1 - alpha)} interval, which does not show the comparison: the rows below do. The square row is the one the plan names.`,
    },
    {
      type: 'note',
      text: interaction
        ? 'The rows say whether the differences are the same, not where they are not. A claim needs a comparison of two conditions of its own.'
        : 'The rows say whether the levels differ at all, not which. A claim needs a comparison of two conditions, or of chosen levels.',
    },
  ];
  notes.push(...leftNotes(result, noun));
  for (const id of applying(result)) {
    notes.push({ type: SAID.has(id) ? 'note' : 'caution', id, text: cautionText(id, factsOf(id, result)) });
  }
  if (result.pairs) notes.push({ type: 'note', lead: 'Pairs.', text: result.pairs.method });
  notes.push({
    type: 'note',
    text: cautionText('R8B', { resamples: count(comparison.resamples), seed: comparison.seed }),
  });
  return notes;
}

const SAID: ReadonlySet<CautionId> = new Set(['R15', 'R19', 'R2P']);

/** The cautions of every row, once each, the same in any order of rows. */
function applying(result: Result): CautionId[] {
  const ids = new Set<string>(result.findings.flatMap((finding) => finding.cautions));
  if (result.comparison.effect?.type === 'interaction') ids.add('R19');
  const order: CautionId[] = ['R2', 'R2P', 'R22', 'R3', 'R18', 'R24', 'EPS', 'WJN', 'R19', 'R15'];
  return order.filter((id) => ids.has(id));
}

function factsOf(id: CautionId, result: Result): Readonly<Record<string, string | number>> {
  const { comparison, scores } = result;
  switch (id) {
    case 'R2':
      return { condition: conditionWords(result), simulated: '' };
    case 'R2P':
      return { resamples: count(rerunsOf(comparison)), lost: '' };
    case 'R3':
      return { trim: comparison.trim };
    case 'R18':
      return spreadFacts(layoutOf(result), result);
    case 'R19':
      return { unit: scores.design.roles.unit || 'the outcome' };
    case 'R22':
      return { least: LEAST_FOR_P, where: leastWhere(result) };
    case 'R24':
      return { n: mostVariable(layoutOf(result)) };
    case 'EPS':
      return { epsilon: epsilonOf(result) };
    case 'WJN':
      return smallGroupFacts(result, layoutOf(result));
    default:
      return {};
  }
}

function conditionWords({ comparison }: Result): string {
  const { effect } = comparison;
  return effect?.type === 'interaction' ? effect.factors.join(' and ') : comparison.factor;
}

function layoutOf(result: Result): Layout {
  const { effect } = result.comparison;
  if (!isOmnibus(effect)) throw new RangeError('*result* must be a comparison of several levels');
  return takeLayout(result.scores, effect);
}

function groupsUnder(layout: Layout): Float64Array[] {
  const single = layout.within.length === 0 && layout.between.filter((each) => each.inEffect).length === 1;
  return single ? groupsOfLevels(layout) : layout.groups.map((group) => group.scores[0] as Float64Array);
}

function spreadFacts(layout: Layout, result: Result): Record<string, string> {
  const ids = new Set(result.findings.filter((each) => each.cautions.includes('R18')).map((each) => each.estimator));
  const groups = ids.has('anova') ? groupsUnder(layout) : layout.groups.map((group) => group.scores[0] as Float64Array);
  const spread = spreadOf(groups);
  const small = (spread?.withSize ?? 0) < 0;
  return {
    ratio: fixed(spread?.ratio ?? 1, 1),
    where: small ? 'smaller' : 'larger',
    groups: 'groups',
    test: 'the classical F',
    bias: small ? 'liberal (too many false alarms)' : 'conservative (too few)',
    beside: 'the rows with each group\u2019s own spread',
  };
}

function mostVariable(layout: Layout): number {
  const groups = groupsUnder(layout);
  const sds = groups.map((scores) => standardDeviation(scores));
  return groups[sds.indexOf(Math.max(...sds))]?.length ?? 0;
}

function leastWhere(result: Result): string {
  const finding = result.findings.find((each) => each.cautions.includes('R22'));
  const least = [...(finding?.counts ?? [])].sort((a, b) => a.h - b.h)[0];
  return least ? `under ${least.condition}` : 'under a level';
}

/** The estimated epsilon: the corrected df over the uncorrected. */
function epsilonOf(result: Result): string {
  const df = (id: string) => result.findings.find((each) => each.estimator === id)?.df ?? null;
  for (const [plain, corrected] of [
    ['repeated', 'repeated-gg'],
    ['mixed', 'mixed-gg'],
  ] as const) {
    const [all, own] = [df(plain), df(corrected)];
    if (all !== null && own !== null && own / all < 0.75) return fixed(own / all, 2);
  }
  return 'below .75';
}

function smallGroupFacts(result: Result, layout: Layout): Record<string, string | number> {
  const trim = result.comparison.trim;
  const kept = layout.groups.map((group) => {
    const n = group.scores[0]?.length ?? 0;
    return n - 2 * Math.floor((trim * n) / 100);
  });
  return { n: Math.min(...kept), columns: layout.groups[0]?.scores.length ?? 0 };
}
