import { type CautionId, cautionText, simulatedLevel } from '../../src/analysis/cautions.ts';
import type { Result } from '../../src/analysis/compare.ts';
import { participantNoun } from '../../src/analysis/design.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import { rerunsOf } from '../../src/analysis/pipeline.ts';
import { LEAST_FOR_P } from '../../src/analysis/row.ts';
import { spreadOf } from '../../src/analysis/rows-omnibus-between.ts';
import { type Samples, samplesFor } from '../../src/analysis/samples.ts';
import type { Note } from '../kind.ts';
import { alphaText, count, counted, fixed, levelPercent, plural } from '../numbers.ts';
import { omnibusNotes } from './notes-omnibus.ts';
import { leftNotes } from './words.ts';

/** What the margin says beside a comparison. */
export function comparisonNotes(result: Result): Note[] {
  if (result.scope === 'omnibus') return omnibusNotes(result);
  const { first, second, resamples, seed } = result.comparison;
  const { unit } = result.scores.design.roles;
  const planned = result.findings[result.planned];
  const noun = participantNoun(result.scores.design.roles);
  const people = peopleWords(result, planned, noun);
  const notes: Note[] = [
    {
      type: 'note',
      text: `${first} minus ${second}${unit === '' ? '' : `, in ${unit}`}, with ${levelPercent(1 - result.comparison.alpha)} intervals; ${people}. The square row is the one the plan names.`,
    },
  ];
  notes.push(...leftNotes(result, noun));
  for (const id of applying(result)) {
    notes.push({ type: warns(id) ? 'caution' : 'note', id, text: cautionText(id, factsOf(id, result)) });
  }
  notes.push({ type: 'note', text: cautionText('R8B', { resamples: count(resamples), seed }) });
  return notes;
}

function peopleWords(result: Result, planned: Finding | undefined, noun: string): string {
  if (result.scope === 'value') return counted(planned?.n ?? 0, noun);
  if (result.scope !== 'within') {
    return (planned?.counts ?? []).map((each) => `${count(each.n)} ${each.condition}`).join(', ');
  }
  const which = result.comparison.effect ? 'every score compared' : `both ${plural(result.comparison.factor)}`;
  return `${counted(planned?.n ?? 0, noun)} with ${which}`;
}

function warns(id: CautionId): boolean {
  return id !== 'R15' && id !== 'R2P';
}

/** The cautions of every row, once each, the same in any order of rows. */
function applying(result: Result): CautionId[] {
  const ids = new Set<string>();
  for (const finding of result.findings) for (const id of finding.cautions) ids.add(id);
  if (result.findings.some((finding) => !finding.sameUnit && finding.estimate !== null)) ids.add('R20');
  const order: CautionId[] = ['R2', 'R2P', 'R22', 'R3', 'R18', 'R24', 'R17', 'R25', 'R5', 'R20', 'R15'];
  return order.filter((id) => ids.has(id));
}

function factsOf(id: CautionId, result: Result): Readonly<Record<string, string | number>> {
  const { comparison, scores } = result;
  switch (id) {
    case 'R2':
      return { condition: comparison.factor, simulated: simulatedWords(result) };
    case 'R2P':
      return { resamples: count(rerunsOf(comparison)), lost: '' };
    case 'R3':
      return { trim: comparison.trim };
    case 'R5':
      return { n: count(nonPositive(result)) };
    case 'R17':
      return {
        counts: (result.findings[0]?.counts ?? []).map((each) => `${each.n} under ${each.condition}`).join(', '),
      };
    case 'R18':
      return spreadFacts(result);
    case 'R20':
      return {
        rows: result.scope === 'value' ? 'Shares' : 'The ratio and the probability',
        unit: scores.design.roles.unit || 'means',
      };
    case 'R22':
      return { least: LEAST_FOR_P, where: leastWhere(result) };
    case 'R24':
      return { n: Math.min(...(result.findings[0]?.counts ?? []).map((each) => each.n)) };
    case 'R25':
      return smallestFacts(result);
    default:
      return {};
  }
}

function samplesOf(result: Result): Samples {
  return samplesFor(result.scores, result.comparison);
}

function nonPositive(result: Result): number {
  const { x, y } = samplesOf(result);
  return [...x, ...y].filter((value) => value <= 0).length;
}

function spreadFacts(result: Result): Record<string, string> {
  const { x, y, parts } = samplesOf(result);
  const spread = spreadOf(parts?.map((part) => part.scores) ?? [x, y]);
  const small = (spread?.withSize ?? 0) < 0;
  return {
    ratio: fixed(spread?.ratio ?? 1, 1),
    where: small ? 'smaller' : 'larger',
    groups: parts ? 'groups' : 'group',
    test: parts ? 'the row with one spread' : "Student's test",
    bias: small ? 'liberal (too many false alarms)' : 'conservative (too few)',
    beside: "Welch's row",
  };
}

function leastWhere(result: Result): string {
  const finding = result.findings.find((each) => each.cautions.includes('R22'));
  const least = [...(finding?.counts ?? [])].sort((a, b) => a.h - b.h)[0];
  return least ? `under ${least.condition} in some rows` : 'in some rows';
}

function smallestFacts(result: Result): Record<string, string> {
  const { x, y } = samplesOf(result);
  const sides = result.comparison.alternative === 'two-sided' ? 2 : 1;
  let ways = 2 ** x.length;
  if (result.scope === 'between') {
    ways = 1;
    for (let i = 1; i <= x.length; i++) ways = (ways * (y.length + i)) / i;
  }
  return {
    n:
      result.scope === 'within'
        ? `${x.length} pairs`
        : result.scope === 'value'
          ? `${x.length} scores`
          : `groups of ${x.length} and ${y.length}`,
    smallest: fixed(sides / ways, 3).replace(/^0/, ''),
    alpha: alphaText(result.comparison.alpha).slice(4),
  };
}

/** The simulated level of methods 5.4, where the rule and the groups are among those simulated. */
function simulatedWords(result: Result): string {
  const { rules, roles } = result.scores.design;
  const rule = rules.find((each) => each.rule === 'extreme' && each.cutoff !== null && each.scope === 'condition');
  if (rule?.rule !== 'extreme' || rule.cutoff === null) return '';
  if (
    result.scope !== 'between' ||
    roles.rows !== 'one score' ||
    rule.sides !== 'both' ||
    rule.repeated === true ||
    roles.within.length > 0
  )
    return '';
  return simulatedLevel({ sizes: sizesBefore(result), measure: rule.measure, cutoff: rule.cutoff });
}

/** Group sizes before any rule. */
function sizesBefore(result: Result): number[] {
  const { design } = result.scores;
  const factor = design.factors.find((each) => each.name === result.comparison.factor);
  return [result.comparison.first, result.comparison.second].map((level) => {
    const people = new Set<number>();
    factor?.codes.forEach((code, row) => {
      if (factor.levels[code] === level) people.add(design.participant[row] as number);
    });
    return people.size;
  });
}
