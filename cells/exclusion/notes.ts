import { cautionText } from '../../src/analysis/cautions.ts';
import { type Design, fullCondition, participantNoun } from '../../src/analysis/design.ts';
import { type ExtremeRule, readsCondition } from '../../src/analysis/rules.ts';
import type { Note } from '../kind.ts';
import { count, fixed, percent } from '../numbers.ts';
import type { ExclusionDetail } from './kind.ts';

/** What the margin says beside an exclusion rule. */
export function exclusionNotes(design: Design, detail: ExclusionDetail): Note[] {
  const { rule } = detail;
  const notes: Note[] = [];
  const factors = design.factors.map((factor) => factor.name).join(' or ') || 'condition';
  if (rule.rule !== 'named' && !readsCondition(rule)) {
    notes.push({ type: 'note', lead: 'Blind.', text: cautionText('BLINDCUT', { condition: factors }), id: 'BLINDCUT' });
  }
  if (rule.rule === 'extreme') notes.push(...extremeNotes(design, detail, rule, factors));
  notes.push(...shareNotes(design, detail));
  if (rule.rule === 'extreme') notes.push({ type: 'note', lead: 'Conventions.', text: conventions(rule) });
  return notes;
}

function extremeNotes(design: Design, detail: ExclusionDetail, rule: ExtremeRule, factors: string): Note[] {
  const notes: Note[] = [];
  const noun = participantNoun(design.roles);
  const where = rule.scope === 'participant' ? ` within a ${noun}` : '';
  if (rule.cutoff === null) {
    notes.push({
      type: 'note',
      text: 'Nobody is set aside for being extreme: how far the finding depends on that is what the strip below shows.',
    });
    return notes;
  }
  if (rule.scope === 'condition' || (rule.scope === 'participant-condition' && design.roles.rows === 'one score')) {
    notes.push({ type: 'caution', id: 'R2', text: cautionText('R2', { condition: factors, simulated: '' }) });
  } else if (rule.scope === 'participant-condition') {
    notes.push({
      type: 'caution',
      id: 'R2T',
      text: cautionText('R2T', { condition: factors, counts: countWords(detail) }),
    });
  }
  const limits = detail.flagged.limits;
  const flat = limits.filter((each) => each.reason?.startsWith('more than half'));
  if (flat.length > 0) {
    const names =
      rule.scope === 'participant'
        ? `For ${flat
            .slice(0, 3)
            .map((each) => design.participants[each.scope])
            .join(', ')}${flat.length > 3 ? ` and ${flat.length - 3} more` : ''} `
        : 'Here ';
    notes.push({ type: 'caution', id: 'R4', text: cautionText('R4', { where: names, measure: rule.measure }) });
  }
  const most = Math.max(0, ...limits.map((each) => each.n));
  const least = Math.min(...limits.map((each) => each.n));
  const largest = (most - 1) / Math.sqrt(Math.max(1, most));
  if (rule.measure === 'SD' && rule.cutoff > largest) {
    notes.push({
      type: 'caution',
      id: 'R11',
      text: cautionText('R11', { n: most, largest: fixed(largest, 2), cutoff: rule.cutoff, where }),
    });
  }
  if (rule.measure === 'MAD' && least < 10) {
    notes.push({ type: 'caution', id: 'R12', text: cautionText('R12', { where }) });
  }
  return notes;
}

/** The share set aside, and whether it differs between conditions. */
function shareNotes(design: Design, detail: ExclusionDetail): Note[] {
  const notes: Note[] = [];
  const step = design.steps.at(-1);
  if (!step || step.rows.length === 0 || detail.rule.rule === 'named') return notes;
  let before = 0;
  for (const mark of detail.before.kept) before += mark;
  if (step.rows.length > 0.05 * before) {
    notes.push({
      type: 'caution',
      id: 'R16',
      text: cautionText('R16', { share: percent(step.rows.length / before), what: 'are set aside' }),
    });
  }
  const shares = sharesByCondition(design, detail);
  const values = shares.map((each) => each.share);
  if (shares.length > 1 && Math.max(...values) - Math.min(...values) > 0.05) {
    const counts = shares.map((each) => `${each.label} ${count(each.aside)} (${percent(each.share)})`).join(', ');
    notes.push({ type: 'caution', id: 'R16', text: cautionText('R16C', { counts }) });
  }
  return notes;
}

function sharesByCondition(design: Design, detail: ExclusionDetail) {
  const code = fullCondition(design);
  const aside = new Set(design.steps.at(-1)?.rows ?? []);
  const cells = new Map<number, { label: string; before: number; aside: number }>();
  for (let row = 0; row < code.length; row++) {
    const key = code[row] as number;
    if (key < 0 || detail.before.kept[row] !== 1) continue;
    const label = design.factors.map((factor) => factor.levels[factor.codes[row] as number]).join(', ');
    const cell = cells.get(key) ?? { label, before: 0, aside: 0 };
    cell.before++;
    if (aside.has(row)) cell.aside++;
    cells.set(key, cell);
  }
  return [...cells.values()].map((cell) => ({ ...cell, share: cell.aside / cell.before }));
}

/** "18 to 20 scores": how many scores the scopes of the rule hold. */
function countWords(detail: ExclusionDetail): string {
  const sizes = detail.flagged.limits.map((each) => each.n);
  const [least, most] = [Math.min(...sizes), Math.max(...sizes)];
  return least === most ? `${least} scores each` : `${least} to ${most} scores`;
}

/** Every convention of the rule (methods 3.10). */
function conventions(rule: ExtremeRule): string {
  const measure =
    rule.measure === 'MAD'
      ? 'MAD = 1.4826 times the median distance from the median'
      : rule.measure === 'SD'
        ? 'SD with divisor n \u2212 1; a score counts in its own mean and SD'
        : 'quartiles interpolated (type 7)';
  const sides = rule.sides === 'both' ? 'both sides' : rule.sides === 'above' ? 'high side only' : 'low side only';
  return `${measure}; ${sides}; a score exactly on the limit is kept; one pass; raw scale; scopes of fewer than 3 scores are left alone; rules apply in the order of the cells (put rules on trials before rules on participants).`;
}
