import { html, type TemplateResult } from 'lit';
import { type Design, participantNoun } from '../../src/analysis/design.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { count, percent, plural } from '../numbers.ts';
import type { ExclusionDetail } from './kind.ts';
import { type Strip, stripOf } from './strip.ts';

/** The strip of a design object and rule: kept between draws so that a moved limit does not draw the points again. */
const strips = new WeakMap<object, Strip>();

/** Raw scores with what the rule sets aside, and the few counts that matter. */
export function exclusionView(
  { value, detail }: Computed<Design, ExclusionDetail>,
  _context: ViewContext,
): TemplateResult {
  if (detail.rule.rule === 'named') return namedView(value, detail);
  const strip = steady(value, detail);
  return html`
    <sf-points .points=${strip} label=${`${strip.axis}: ${sayAside(value)}`}></sf-points>
    ${tally(value, detail)}
  `;
}

function steady(design: Design, detail: ExclusionDetail): Strip {
  const noun = participantNoun(design.roles);
  const on =
    detail.rule.rule === 'kept-share' || (detail.rule.rule !== 'named' && detail.rule.on === 'participant')
      ? 'participants'
      : 'trials';
  const column =
    detail.rule.rule === 'limit' || detail.rule.rule === 'extreme' ? detail.rule.column : design.roles.outcome;
  const unit = column === design.roles.outcome && design.roles.unit !== '' ? ` (${design.roles.unit})` : '';
  const together = detail.rule.rule === 'extreme' ? detail.rule.columns : undefined;
  const one = on === 'participants' ? `mean ${column}${unit}` : `${column}${unit}`;
  const what = together === undefined ? one : `MCD distance on ${together.join(' and ')}`;
  const words = `${what} \u00b7 one row per ${noun}, in shuffled order \u00b7 conditions not shown`;
  const made = stripOf(design, detail, on, words);
  const before = strips.get(detail.before);
  const same =
    before &&
    before.axis === made.axis &&
    before.mark.length === made.mark.length &&
    before.mark.every((mark, i) => mark === made.mark[i]) &&
    before.x.every((x, i) => x === made.x[i]);
  const strip = same ? { ...before, limits: made.limits } : made;
  strips.set(detail.before, strip);
  return strip;
}

function sayAside(design: Design): string {
  const rows = design.steps.at(-1)?.rows.length ?? 0;
  return rows === 0 ? 'nothing set aside' : `${count(rows)} set aside, drawn as open circles`;
}

function namedView(design: Design, detail: ExclusionDetail): TemplateResult {
  const rows = design.steps.at(-1)?.rows.length ?? 0;
  const { rule } = detail;
  const who = rule.rule === 'named' ? rule.participants.length : 0;
  return html`<div class="tally">
    <div><b>${count(who)}</b>${who === 1 ? participantNoun(design.roles) : plural(participantNoun(design.roles))} set aside</div>
    <div><b>${count(rows)}</b>${rowsWord(design, rows)} with ${who === 1 ? 'that one' : 'them'}</div>
  </div>`;
}

function tally(design: Design, detail: ExclusionDetail): TemplateResult {
  const step = design.steps.at(-1);
  const rows = step?.rows ?? new Int32Array(0);
  let before = 0;
  for (const mark of detail.before.kept) before += mark;
  const perPerson = new Int32Array(design.participants.length);
  const present = new Uint8Array(design.participants.length);
  for (let row = 0; row < design.kept.length; row++) {
    if (detail.before.kept[row] === 1) present[design.participant[row] as number] = 1;
  }
  for (const row of rows)
    perPerson[design.participant[row] as number] = (perPerson[design.participant[row] as number] ?? 0) + 1;
  const counts = Array.from(perPerson).filter((_, who) => present[who] === 1);
  const [least, most] = [Math.min(...counts, before), Math.max(...counts, 0)];
  const noun = participantNoun(design.roles);
  return html`<div class="tally">
    <div><b>${count(rows.length)}</b>${rowsWord(design, rows.length)} set aside (${percent(rows.length / Math.max(1, before))})</div>
    <div><b>${least === most ? most : `${least} \u2013 ${most}`}</b>per ${noun}</div>
    ${
      step && step.participants.length > 0
        ? html`<div><b>${count(step.participants.length)}</b>${step.participants.length === 1 ? noun : plural(noun)} left without any</div>`
        : null
    }
    ${
      detail.rule.rule === 'extreme' && detail.rule.cutoff === null
        ? html`<div><b>none</b>for being extreme: that is left to the grid</div>`
        : null
    }
  </div>`;
}

function rowsWord(design: Design, n: number): string {
  const noun = design.roles.rows === 'one score' ? 'score' : 'trial';
  return n === 1 ? noun : plural(noun);
}
