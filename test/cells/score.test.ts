import { describe, expect, it } from 'vitest';
import { plainSentence } from '../../cells/kind.ts';
import { scoreKind } from '../../cells/score/kind.ts';
import type { ScoreSettings } from '../../cells/score/sentence.ts';
import { declareDesign } from '../../src/analysis/design.ts';
import type { Scores } from '../../src/analysis/score.ts';
import { blankOf, choose, contextOf, run, sharedOf } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

/** Five trials of each alert for officer P7, three for P8, who has no trial under voice. */
const design = declareDesign(
  tableOf({
    officer: [...Array(10).fill('P7'), ...Array(3).fill('P8')],
    training: [...Array(10).fill('standard'), ...Array(3).fill('refresher')],
    alert: [...Array(5).fill('tone'), ...Array(5).fill('voice'), ...Array(3).fill('tone')],
    ack_ms: [1, 2, 3, 4, 90, 10, 20, 30, 40, 50, 7, 8, 12],
  }),
  {
    participant: 'officer',
    within: ['alert'],
    between: ['training'],
    outcome: 'ack_ms',
    unit: 'ms',
    direction: 'lower',
    rows: 'several trials',
  },
);
const settings: ScoreSettings = { statistic: 'mean', trim: 0 };
const context = contextOf({ design });
const compute = (own: ScoreSettings) => run<Scores>(scoreKind, own, { design });

describe('the score sentence', () => {
  it('by hand: reads as in product.md; the trim of trials shows with a trimmed mean only', () => {
    expect(plainSentence(scoreKind.sentence(settings, context))).toBe(
      'Score each officer under each alert by the mean of the kept trials.',
    );
    expect(plainSentence(scoreKind.sentence({ statistic: 'trimmed mean', trim: 20 }, context))).toBe(
      'Score each officer under each alert by the 20 % trimmed mean of the kept trials.',
    );
    const shared = contextOf({ design }, { shared: [sharedOf('of-trials', 10, '%')] });
    expect(
      plainSentence(scoreKind.sentence({ statistic: 'trimmed mean', trim: { shared: 'of-trials' } }, shared)),
    ).toMatch(/by the 10 % trimmed mean/);
  });

  it('by hand: filling one blank gives the settings whole', () => {
    const parts = scoreKind.sentence({ statistic: 'trimmed mean', trim: 20 }, context);
    expect(choose(parts, 'statistic', 'median')).toEqual({ statistic: 'median', trim: 20 });
    const trim = blankOf(parts, 'trim').editor;
    expect(trim.type === 'number' && trim.set(25)).toEqual({ statistic: 'trimmed mean', trim: 25 });
    expect(trim.type === 'number' && [trim.min, trim.max, trim.unit]).toEqual([0, 25, '%']);
  });
});

describe('the score cell', () => {
  it('by hand: means, medians and trimmed means of the kept trials', async () => {
    expect(Array.from((await compute(settings)).value.values)).toEqual([20, 30, 9, Number.NaN]);
    expect(Array.from((await compute({ ...settings, statistic: 'median' })).value.values)).toEqual([
      3,
      30,
      8,
      Number.NaN,
    ]);
    // 20 % of five is one trial at each end, 20 % of three is none
    expect(Array.from((await compute({ statistic: 'trimmed mean', trim: 20 })).value.values)).toEqual([
      3,
      30,
      9,
      Number.NaN,
    ]);
  });

  it('by hand: words, flow, notes, record and table; a missing score is null, never NaN', async () => {
    const computed = await compute(settings);
    expect(scoreKind.say(computed, settings)).toBe('2 officers scored.');
    expect(scoreKind.flow?.(computed, settings)).toEqual({ count: 2, label: 'scored' });
    expect(scoreKind.notes?.(computed, settings)).toEqual([
      { type: 'note', text: 'Each score is made from 3 to 5 kept trials.' },
    ]);
    expect(scoreKind.record(computed)).toEqual({
      participants: ['P7', 'P8'],
      conditions: ['tone', 'voice'],
      values: [20, 30, 9, null],
      trials: [5, 5, 3, 0],
    });
    const [table] = scoreKind.tables?.(computed, settings) ?? [];
    expect(table?.columns.map(({ name }) => name)).toEqual(['officer', 'training', 'tone (ms)', 'voice (ms)']);
    expect(table?.raw).toEqual([
      ['P7', 'standard', 20, 30],
      ['P8', 'refresher', 9, null],
    ]);
    expect(table?.rows[1]?.[3]).toBe('');
  });

  it('by hand: medians of few trials carry their caution with the number', async () => {
    const own: ScoreSettings = { statistic: 'median', trim: 0 };
    const notes = scoreKind.notes?.(await compute(own), own) ?? [];
    expect(notes.find((each) => each.type === 'caution')?.text).toMatch(/Miller 1988.*The fewest trials here: 3\.$/);
  });

  it('refuses a trimmed mean without its trim, and ignores a trim that is not used', async () => {
    expect(scoreKind.check({ statistic: 'trimmed mean', trim: null }, context)).toEqual(['Say how much is trimmed.']);
    expect(scoreKind.check({ statistic: 'mean', trim: null }, context)).toEqual([]);
    expect((await compute({ statistic: 'mean', trim: 25 })).value).toEqual((await compute(settings)).value);
  });

  it('theory: scores are hidden while the conditions are', () => {
    expect(scoreKind.blind).toBe('veil');
    expect(scoreKind.defaults(context)).toEqual(settings);
  });
});
