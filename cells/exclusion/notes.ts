import { cautionText } from '../../src/analysis/cautions.ts';
import { type Design, fullCondition, participantNoun } from '../../src/analysis/design.ts';
import { type ExtremeRule, readsCondition } from '../../src/analysis/rules.ts';
import { scopeWords } from '../../src/analysis/scope-blindness.ts';
import type { Note } from '../kind.ts';
import { count, counted, fixed, percent } from '../numbers.ts';
import type { ExclusionDetail } from './kind.ts';

/** What the margin says beside an exclusion rule. */
export function exclusionNotes(design: Design, detail: ExclusionDetail): Note[] {
  const { rule } = detail;
  const notes: Note[] = [];
  const factors = design.factors.map((factor) => factor.name).join(' or ') || 'condition';
  if (rule.rule !== 'named' && !readsCondition(rule)) {
    const later = design.hidden ? ` The counts by ${factors} are shown once the conditions are open.` : '';
    const text = `${cautionText('BLINDCUT', { condition: factors })}${later}`;
    notes.push({ type: 'note', lead: 'Blind.', text, id: 'BLINDCUT' });
  }
  const uses = readsCondition(rule) ? scopeWords(rule, design.factors) : null;
  if (uses !== null) notes.push({ type: 'note', lead: 'What it uses.', text: uses });
  if (rule.rule === 'extreme') notes.push(...extremeNotes(design, detail, rule, factors));
  notes.push(...shareNotes(design, detail));
  if (rule.rule === 'extreme') notes.push({ type: 'note', lead: 'Conventions.', text: conventions(rule) });
  return notes;
}

function extremeNotes(design: Design, detail: ExclusionDetail, rule: ExtremeRule, factors: string): Note[] {
  const notes: Note[] = [];
  const noun = participantNoun(design.roles);
  const where = rule.scope === 'participant' ? ` within one ${noun}` : '';
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
  notes.push(...spreadNotes(design, detail, rule, where), ...procedureNotes(design, detail, rule));
  return notes;
}

/** Where a spread is zero, unsteady, or too wide for the rule ever to set anything aside. */
function spreadNotes(design: Design, detail: ExclusionDetail, rule: ExtremeRule, where: string): Note[] {
  const notes: Note[] = [];
  const { limits } = detail.flagged;
  const flat = limits.filter((each) => each.reason?.startsWith('more than half'));
  if (flat.length > 0) {
    const named = flat.slice(0, 3).map((each) => design.participants[each.scope]);
    const more = flat.length > 3 ? ` and ${flat.length - 3} more` : '';
    const who = design.hidden ? counted(flat.length, participantNoun(design.roles)) : `${named.join(', ')}${more}`;
    const names = rule.scope === 'participant' && rule.on === 'trial' ? `For ${who} ` : 'Here ';
    const side = flat.every((each) => each.reason?.endsWith('equal to it')) ? 'on one side of the median ' : '';
    notes.push({
      type: 'caution',
      id: 'R4',
      text: cautionText('R4', { where: names + side, measure: SPREADS[rule.measure] }),
    });
  }
  if (limits.length === 0 || rule.cutoff === null) return notes;
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
  // Each of the two MADs stands on half of the scores.
  if (rule.measure === 'double MAD' && least < 20) {
    notes.push({ type: 'caution', id: 'R12', text: cautionText('R12', { where: ` on a side of the median${where}` }) });
  }
  return notes;
}

/** What a repeated rule, a moving criterion, adjusted fences and distances on several columns have to say. */
function procedureNotes(design: Design, detail: ExclusionDetail, rule: ExtremeRule): Note[] {
  const notes: Note[] = [];
  const { limits } = detail.flagged;
  const noun =
    rule.on === 'participant' ? participantNoun(design.roles) : design.roles.rows === 'one score' ? 'score' : 'trial';
  const passes = limits.flatMap((each) => (each.passes ? [each.passes] : []));
  if (passes.length > 0) {
    const sum = (key: 'first' | 'total') => passes.reduce((total, each) => total + each[key], 0);
    const facts = {
      first: counted(sum('first'), noun),
      total: count(sum('total')),
      passes: Math.max(...passes.map((each) => each.count)),
    };
    notes.push({ type: 'caution', id: 'R13', text: cautionText('R13', facts) });
    if (rule.measure === 'SD') notes.push({ type: 'caution', id: 'R21', text: cautionText('R21', {}) });
  }
  const counts = countWords(detail);
  if (rule.measure === 'moving' || rule.measure === 'recursive') {
    notes.push({ type: 'note', id: 'MOVING', text: cautionText('MOVING', { counts }) });
  }
  if (rule.measure === 'adjusted fences' && Math.min(...limits.map((each) => each.n)) < 50) {
    notes.push({ type: 'caution', id: 'ADJUSTED', text: cautionText('ADJUSTED', { counts }) });
  }
  if (rule.measure === 'MCD') notes.push(...distanceNotes(design, detail, rule));
  return notes;
}

/** Participants for each column below which chi-square limits on MCD distances flag clearly too many. */
const ENOUGH_FOR_MCD = 20;

function distanceNotes(design: Design, detail: ExclusionDetail, rule: ExtremeRule): Note[] {
  const [limits] = detail.flagged.limits;
  if (limits?.reason !== undefined) {
    return [{ type: 'caution', id: 'TOGETHER', text: cautionText('TOGETHER', { reason: limits.reason }) }];
  }
  const columns = rule.columns?.length ?? 1;
  if (limits === undefined || limits.n >= ENOUGH_FOR_MCD * columns) return [];
  const n = counted(limits.n, participantNoun(design.roles));
  return [{ type: 'caution', id: 'MCDN', text: cautionText('MCDN', { n, columns }) }];
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
  if (sizes.length === 0) return 'no scores';
  const [least, most] = [Math.min(...sizes), Math.max(...sizes)];
  if (sizes.length === 1) return `${least} scores`;
  return least === most ? `${least} scores each` : `${least} to ${most} scores`;
}

/** What is zero where a rule has no limits. */
const SPREADS: Readonly<Record<ExtremeRule['measure'], string>> = {
  MAD: 'MAD',
  'double MAD': 'MAD of that side',
  SD: 'SD',
  fences: 'quartile distance',
  'hinge fences': 'hinge distance',
  'adjusted fences': 'hinge distance',
  Carling: 'quartile distance',
  moving: 'SD',
  recursive: 'SD',
  MCD: 'spread',
};

/** How each measure is made, with its author where it has one. */
const MADE: Readonly<Record<ExtremeRule['measure'], string>> = {
  MAD: 'MAD = 1.4826 times the median distance from the median',
  'double MAD':
    'one MAD from the scores at or below the median, one from those at or above it, each 1.4826 times the median distance (common practice)',
  SD: 'SD with divisor n \u2212 1; a score counts in its own mean and SD',
  fences: 'quartiles interpolated (type 7)',
  'hinge fences': 'hinges = medians of the lower and the upper half, the middle score in both (Tukey 1977)',
  'adjusted fences':
    'hinges; fences at k e^(\u22124 MC) and k e^(3 MC) hinge distances, the exponents changing places for MC below 0, MC = medcouple (Hubert & Vandervieren 2008)',
  Carling:
    'ideal fourths (type 8); median \u2213 k times their distance, k = (17.63 n \u2212 23.64) / (7.74 n \u2212 3.71) (Carling 2000)',
  moving:
    'mean and SD of all scores of the scope; cutoff 1.458 SD for 4 scores to 2.5 SD from 100 on, linear between the tabled sizes (Van Selst & Jolicoeur 1994, table from memory)',
  recursive:
    'mean and SD without the largest score; cutoff 8 SD for 4 scores to 3.5 SD from 100 on, linear between the tabled sizes; largest and smallest tested, repeated until neither goes (Van Selst & Jolicoeur 1994, modified recursive, table from memory)',
  MCD: 'distance from the reweighted MCD of three quarters of the participants (Rousseeuw & Van Driessen 1999), limit: chi-square with one df a column; participants by their means over everything they met',
};

/** Every convention of the rule (methods 3.10). */
function conventions(rule: ExtremeRule): string {
  const sides = rule.sides === 'both' ? 'both sides' : rule.sides === 'above' ? 'high side only' : 'low side only';
  const least = rule.measure === 'moving' || rule.measure === 'recursive' ? 4 : 3;
  const repeats = rule.measure === 'recursive' || rule.repeated === true;
  const passes = repeats ? 'pass after pass until nobody more is outside' : 'one pass';
  const around = rule.measure === 'MCD' ? '' : `${sides}; `;
  const small = rule.measure === 'MCD' ? '' : `scopes of fewer than ${least} scores are left alone; `;
  return `${MADE[rule.measure]}; ${around}a score exactly on the limit is kept; ${passes}; raw scale; ${small}rules apply in the order of the cells (put rules on trials before rules on participants).`;
}
