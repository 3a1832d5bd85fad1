import { describe, expect, it } from 'vitest';
import type { ExclusionDetail } from '../../cells/exclusion/kind.ts';
import { exclusionKind } from '../../cells/exclusion/kind.ts';
import type { ExclusionSettings } from '../../cells/exclusion/sentence.ts';
import { plainSentence } from '../../cells/kind.ts';
import { type Design, declareDesign, type Roles } from '../../src/analysis/design.ts';
import { blankOf, choose, contextOf, run, sharedOf } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

const roles: Roles = {
  participant: 'officer',
  within: ['alert'],
  between: [],
  outcome: 'ack_ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};
const ms = [500, 510, 520, 530, 540, 550, 560, 570, 580, 120, 500, 510, 520, 530, 540, 550, 560, 570, 580, 4000];
const design = declareDesign(
  tableOf({
    officer: ms.map((_, i) => (i < 10 ? '7' : '23')),
    alert: ms.map((_, i) => (i % 2 ? 'voice' : 'tone')),
    ack_ms: ms,
  }),
  roles,
);
const settings: ExclusionSettings = {
  what: 'trial',
  how: 'beyond',
  participants: [],
  reason: '',
  column: '',
  limit: null,
  measure: 'MAD',
  cutoff: 3,
  sides: 'both',
  scope: 'participant',
  least: 70,
};
const context = contextOf({ design });
const words = (own: ExclusionSettings, more = {}) =>
  plainSentence(exclusionKind.sentence(own, { ...context, ...more }));

describe('the exclusion sentence', () => {
  it('by hand: reads as in product.md for each form of rule', () => {
    expect(words(settings)).toBe(
      'Set aside a trial when its ack_ms is further than 3 MAD from the median of the same officer, whatever the alert.',
    );
    expect(words({ ...settings, what: 'named', participants: ['23'], reason: 'the task was misread' })).toBe(
      'Set aside officer 23 because the task was misread.',
    );
    expect(words({ ...settings, how: 'below', limit: 150, reason: 'a faster press is an anticipation' })).toBe(
      'Set aside a trial when its ack_ms is below 150 ms, whatever the alert, because a faster press is an anticipation.',
    );
    expect(words({ ...settings, what: 'participant', how: 'kept-share' })).toBe(
      'Set aside an officer with fewer than 70 % kept trials.',
    );
    expect(words({ ...settings, cutoff: null })).toMatch(/further than any number of MAD from the median/);
  });

  it('by hand: a shared cutoff shows its value now', () => {
    const own = { ...settings, cutoff: { shared: 'cutoff' } };
    expect(words(own, { shared: [sharedOf('cutoff', 2.5)] })).toMatch(/further than 2.5 MAD/);
    expect(words(own, { shared: [sharedOf('cutoff', null)] })).toMatch(/any number of MAD/);
  });

  it('by hand: a rule that reads the condition does not say "whatever"', () => {
    expect(words({ ...settings, scope: 'condition' })).toBe(
      'Set aside a trial when its ack_ms is further than 3 MAD from the median of the same alert.',
    );
  });

  it('by hand: filling one blank gives the settings whole', () => {
    const parts = exclusionKind.sentence(settings, context);
    expect(choose(parts, 'measure', 'SD')).toEqual({ ...settings, measure: 'SD' });
    expect(choose(parts, 'how', 'beyond above')).toEqual({ ...settings, sides: 'above' });
    expect(choose(parts, 'what', 'participant')).toEqual({ ...settings, what: 'participant', scope: 'pooled' });
    const column = blankOf(parts, 'column').editor;
    expect(column.type === 'choice' && column.options.find((each) => each.value === 'alert')?.refused).toBe(
      'holds no numbers',
    );
  });

  it('theory: every form of the sentence can be computed from what its own blanks offer', async () => {
    for (const what of ['named', 'trial', 'participant'] as const) {
      const changed = choose(exclusionKind.sentence(settings, context), 'what', what) as ExclusionSettings;
      const filled = { ...changed, participants: ['7'], reason: 'r', limit: 200 };
      expect(exclusionKind.check(filled, context)).toEqual([]);
      await expect(run(exclusionKind, filled, { design })).resolves.toMatchObject({
        value: { participants: ['7', '23'] },
      });
    }
  });
});

describe('the exclusion cell', () => {
  it('by hand: counts, flow and words agree', async () => {
    const computed = await run<Design, ExclusionDetail>(exclusionKind, settings, { design });
    expect(exclusionKind.flow?.(computed, settings)).toEqual({
      setAside: 2,
      count: 18,
      label: 'trials kept',
      share: 0.9,
    });
    expect(exclusionKind.say(computed, settings)).toBe('2 trials set aside; 18 kept.');
    expect(exclusionKind.record(computed)).toMatchObject({ setAside: [10, 20], kept: 18, participants: [] });
  });

  it('theory: a cutoff that keeps the same rows is the same to the cells below, its limits are not', async () => {
    const a = await run<Design, ExclusionDetail>(exclusionKind, settings, { design });
    const b = await run<Design, ExclusionDetail>(exclusionKind, { ...settings, cutoff: 3.1 }, { design });
    const c = await run<Design, ExclusionDetail>(exclusionKind, { ...settings, cutoff: 50 }, { design });
    expect(exclusionKind.same?.(a.value, b.value)).toBe(true);
    expect(exclusionKind.same?.(a.value, c.value)).toBe(false);
    expect(a.detail.flagged.limits[0]?.lower).not.toBe(b.detail.flagged.limits[0]?.lower);
  });

  it('theory: another scope that happens to keep the same rows is not the same, since its cautions differ', async () => {
    const a = await run<Design>(exclusionKind, { ...settings, cutoff: 40 }, { design });
    const b = await run<Design>(exclusionKind, { ...settings, cutoff: 40, scope: 'condition' }, { design });
    expect(exclusionKind.same?.(a.value, b.value)).toBe(false);
  });

  it('refuses to set someone aside by name, or by a limit, without a reason', () => {
    expect(exclusionKind.check({ ...settings, what: 'named', participants: ['7'] }, context)[0]).toMatch(/reason/);
    expect(exclusionKind.check({ ...settings, how: 'below', limit: 100 }, context)[0]).toMatch(/reason/);
    expect(exclusionKind.check({ ...settings, how: 'below', reason: 'r' }, context)[0]).toMatch(/limit/);
  });

  it('by hand: cautions that apply are shown with their numbers', async () => {
    const notes = async (own: Partial<ExclusionSettings>) => {
      const computed = await run(exclusionKind, { ...settings, ...own }, { design });
      return exclusionKind.notes?.(computed, settings) ?? [];
    };
    expect((await notes({ measure: 'SD', cutoff: 3 })).find((each) => each.id === 'R11')?.text).toMatch(
      /With 10 scores no score can lie further than 2.85 SD/,
    );
    expect((await notes({ scope: 'condition' })).some((each) => each.id === 'R2')).toBe(true);
    expect((await notes({ scope: 'participant-condition' })).find((each) => each.id === 'R12')?.type).toBe('caution');
    expect((await notes({ cutoff: 0.5 })).some((each) => each.id === 'R16')).toBe(true);
    expect((await notes({})).find((each) => each.lead === 'Conventions.')?.text).toMatch(
      /1.4826.*exactly on the limit is kept.*one pass/,
    );
  });

  it('by hand: tables count by condition and list the rows of the file', async () => {
    const computed = await run(exclusionKind, settings, { design });
    const [counts, rows] = exclusionKind.tables?.(computed, settings) ?? [];
    expect(counts?.rows).toEqual([
      ['tone', '10', '0', '0 %'],
      ['voice', '10', '2', '20 %'],
    ]);
    expect(rows?.rows.map((row) => row[0])).toEqual(['10', '20']);
  });
});
