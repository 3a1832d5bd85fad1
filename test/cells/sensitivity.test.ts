import { describe, expect, it } from 'vitest';
import { plainSentence } from '../../cells/kind.ts';
import { type JointSweep, type SensitivityDetail, sensitivityKind } from '../../cells/sensitivity/kind.ts';
import type { SensitivitySettings } from '../../cells/sensitivity/sentence.ts';
import type { ClaimValue } from '../../src/analysis/claim.ts';
import { sweepClaim } from '../../src/analysis/sweep.ts';
import { claimLower, GROUPS, groupColumns, resultOf, trialColumns } from '../support/joint.ts';
import { blankOf, contextOf, run } from '../support/kind-run.ts';

const usual = { ...(sensitivityKind.defaults(contextOf()) as SensitivitySettings), relabellings: 199 };

function claimOf(more: Partial<ClaimValue['claim']> = {}, people = 12): ClaimValue {
  return { claim: { ...claimLower, ...more }, result: resultOf(trialColumns(people, 5)), words: 'x', verdict: null };
}

const compute = (claim: ClaimValue, settings = usual) =>
  run<JointSweep, SensitivityDetail>(sensitivityKind, settings, { claim });

describe('the sensitivity cell', () => {
  it('by hand: its sentence, with the scope, rows and score the design has', () => {
    const words = (claim: ClaimValue | undefined, settings = usual) =>
      plainSentence(sensitivityKind.sentence(settings, claim === undefined ? contextOf() : contextOf({ claim })));
    expect(words(claimOf())).toBe(
      'Repeat the comparison for cutoffs none, 2, 2.5, 3 of MAD, SD within participant \u00d7 trims 0, 10, 20, 25 % \u00d7 5 rows, scored by mean, judged by the average Z, with 199 relabellings.',
    );
    expect(words(undefined)).toMatch(
      /in a scope blind to the comparison.*every row in the outcome\u2019s unit, judged/,
    );
    const scores = trialColumns(20, 1).ms;
    const groups = resultOf(groupColumns(scores.slice(0, 9), scores.slice(9, 20)), GROUPS, { estimator: 'welch' });
    expect(words({ ...claimOf(), result: groups })).toMatch(/all scores pooled \u00d7 trims .* \u00d7 4 rows, judged/);
  });

  it('theory: each option says how it stands to the question, and why', () => {
    const { editor } = blankOf(sensitivityKind.sentence(usual, contextOf({ claim: claimOf() })), 'row');
    if (editor.type !== 'choices') throw new Error('rows are chosen');
    const hint = (value: string) => editor.options.find((each) => each.value === value)?.hint;
    expect(hint('paired-t')).toMatch(/^same question; /);
    expect(hint('paired-ratio')).toMatch(/^perhaps another question: drawn apart; /);
    expect(editor.options.find((each) => each.value === 'median-differences')?.refused).toMatch(/resamples/);
    expect(editor.set(['paired-t'])).toEqual({ ...usual, row: ['paired-t'] });
  });

  it('agrees with the strip, digit for digit, and adds the joint inference', async () => {
    const claim = claimOf();
    const { value, detail } = await compute(claim);
    const strip = sweepClaim(claim.result, claim.claim);
    const estimates = (sweep: { specifications: JointSweep['specifications'] | typeof strip.specifications }) =>
      sweep.specifications.map((each) => each.finding.estimate ?? 0).sort((a, b) => a - b);
    expect(estimates(value)).toEqual(estimates(strip));
    expect(value.joint?.rows).toHaveLength(value.specifications.length);
    expect(value.joint?.enumerated).toBe(true);
    expect(detail.ribbons.map((ribbon) => ribbon.along)).toEqual(['trim', 'cutoff']);
    const said = sensitivityKind.say({ value, detail }, usual);
    expect(said).toMatch(/^supported in \d+ of \d+ analyses, .*; estimates from .* to .* ms, median .*; joint p /);
    expect(JSON.stringify(sensitivityKind.record({ value, detail }))).not.toMatch(/NaN|Infinity/);
  });

  it('by hand: exploratory analyses stand apart: not in the counts, in a table of their own, with a relabelled p', async () => {
    const plain = await compute(claimOf());
    const { value, detail } = await compute(claimOf(), {
      ...usual,
      row: ['paired-t', 'paired-ratio'],
      score: ['mean', 'median'],
    });
    expect(
      value.specifications.every(
        (each) => each.finding.estimator !== 'paired-ratio' && each.score.statistic === 'mean',
      ),
    ).toBe(true);
    expect(detail.exploratory.length).toBeGreaterThan(5);
    expect(detail.apart.joint?.rows).toHaveLength(detail.apart.places.length);
    const titles = sensitivityKind.tables?.({ value, detail }, usual).map((table) => table.title);
    expect(titles).toContain('analyses drawn apart');
    expect(sensitivityKind.tables?.(plain, usual).map((table) => table.title)).not.toContain('analyses drawn apart');
    expect(sensitivityKind.notes?.({ value, detail }, usual).some((note) => note.lead === 'Apart.')).toBe(true);
  });

  it('by hand: a scope that sees the condition needs a reason in the sentence, and then gets p from relabelling only', async () => {
    const settings = { ...usual, scope: ['participant', 'condition'], cutoff: ['none', '2'], row: ['paired-t'] };
    const context = contextOf({ claim: claimOf() });
    expect(plainSentence(sensitivityKind.sentence(settings, context))).toMatch(
      /The within condition rules are in because a reason is needed\.$/,
    );
    const refused = await compute(claimOf(), settings);
    expect(refused.detail.exploratory).toEqual([]);
    expect(sensitivityKind.notes?.(refused, settings).find((note) => note.lead === 'Left out.')?.text).toMatch(
      /no reason for it is written/,
    );
    const blank = blankOf(sensitivityKind.sentence(settings, context), 'scope:condition');
    if (blank.editor.type !== 'text') throw new Error('a reason is written');
    const written = blank.editor.set('contamination under voice only') as SensitivitySettings;
    const { detail } = await compute(claimOf(), written);
    expect(detail.exploratory.map((each) => each.finding.p)).toEqual(detail.exploratory.map(() => null));
    expect(detail.exploratory.length).toBeGreaterThan(0);
    expect(detail.apart.joint?.rows.every((row) => row.p !== null && row.p > 0 && row.p <= 1)).toBe(true);
  });

  it('by hand: a change of sign is a caution', async () => {
    const columns = trialColumns(12, 5);
    const level = columns.ms.map((ms, i) => (columns.alert[i] === 'voice' ? ms + 18 : ms));
    const claim = { ...claimOf(), result: resultOf({ ...columns, ms: level }) };
    const computed = await compute(claim, { ...usual, relabellings: 19 });
    const caution = sensitivityKind.notes?.(computed, usual).find((note) => note.type === 'caution');
    expect(computed.detail.spread?.reverses).toBe(
      (computed.detail.spread?.least ?? 0) < 0 && (computed.detail.spread?.most ?? 0) > 0,
    );
    expect(caution !== undefined).toBe(computed.detail.spread?.reverses === true);
    expect(computed.detail.spread?.reverses).toBe(true);
  });

  it('refuses in words: too many combinations, another statistic, settings of a file', () => {
    const many = { ...usual, row: Array.from({ length: 600 }, (_, i) => `r${i}`) };
    expect(sensitivityKind.check(many, contextOf())[0]).toMatch(/more than 10000/);
    expect(sensitivityKind.check({ ...usual, statistic: 'none such' }, contextOf())).toHaveLength(1);
    expect(sensitivityKind.check({ ...usual, relabellings: 0 }, contextOf())).toHaveLength(1);
    expect(sensitivityKind.check(usual, contextOf())).toEqual([]);
  });

  it('degenerate: without joint inference the cell still shows its grid, and says why', async () => {
    const { value, detail } = await compute(claimOf({ relation: 'different', margin: 5 }));
    expect(value.joint).toBe(null);
    expect(sensitivityKind.say({ value, detail }, usual)).toMatch(/no joint p: A difference beyond a margin/);
    expect(value.specifications.length).toBeGreaterThan(20);
  });
});
