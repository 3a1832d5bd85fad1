import { describe, expect, it } from 'vitest';
import { claimKind } from '../../cells/claim/kind.ts';
import { comparisonKind } from '../../cells/comparison/kind.ts';
import type { ComparisonSettings } from '../../cells/comparison/settings.ts';
import { plainSentence } from '../../cells/kind.ts';
import { sayCounts, standingKind } from '../../cells/standing/kind.ts';
import type { ClaimValue } from '../../src/analysis/claim.ts';
import type { Result } from '../../src/analysis/compare.ts';
import { declareDesign } from '../../src/analysis/design.ts';
import { applyRule } from '../../src/analysis/exclusion.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import type { Sweep } from '../../src/analysis/sweep.ts';
import { choose, contextOf, run, sharedOf } from '../support/kind-run.ts';
import { sleep } from '../support/samples.ts';
import { tableOf } from '../support/tables.ts';

const scores = scoreDesign(sleep, { statistic: 'mean', trim: 0 });
const context = contextOf({ scores });
const settings = comparisonKind.defaults(context) as ComparisonSettings;
const claimSettings = { first: 'drug2', relation: 'higher', second: 'drug1', margin: 0, title: '' } as const;

describe('the comparison cell', () => {
  it('by hand: its sentence, and a shared trim', () => {
    expect(plainSentence(comparisonKind.sentence(settings, context))).toBe(
      'Compare drug2 with drug1 on the 20 % trimmed mean of differences, two-sided, at \u03b1 = .05.',
    );
    const own = { ...settings, trim: { shared: 'trim' } };
    expect(plainSentence(comparisonKind.sentence(own, { ...context, shared: [sharedOf('trim', 10, '%')] }))).toMatch(
      /on the 10 % trimmed/,
    );
  });

  it('agrees with methods 3.1, sleep: the planned row in words', async () => {
    const computed = await run<Result>(comparisonKind, settings, { scores });
    expect(comparisonKind.say(computed, settings)).toMatch(
      /^drug2 minus drug1, 20 % trimmed mean of differences: 1.33 h, 95 % interval \[0.88, 1.79\], t\(5\) = 7.57, p < .001; robust d .* n = 10\.$/,
    );
    expect(comparisonKind.flow?.(computed, settings)).toEqual({ count: 10, label: 'compared' });
  });

  it('by hand: a between row is never offered for a within factor, and is refused if a file names it', () => {
    const parts = comparisonKind.sentence(settings, context);
    const blank = parts.find((part) => typeof part !== 'string' && part.key === 'estimator');
    const editor = typeof blank === 'object' ? blank.editor : undefined;
    expect(editor?.type === 'choice' && editor.options.map((each) => each.value)).not.toContain('welch');
    expect(comparisonKind.check({ ...settings, estimator: 'welch' }, context)[0]).toMatch(
      /for conditions between participants, but drug varies within/,
    );
  });

  it('by hand: choosing the other level as first keeps two different levels', () => {
    expect(choose(comparisonKind.sentence(settings, context), 'first', 'drug\u0000drug1')).toMatchObject({
      first: 'drug1',
      second: 'drug2',
    });
  });

  it('theory: tables carry every number of every row in full for the CSV', async () => {
    const computed = await run<Result>(comparisonKind, settings, { scores });
    const [rows, effects] = comparisonKind.tables?.(computed, settings) ?? [];
    expect(rows?.rows).toHaveLength(computed.value.findings.length);
    expect(rows?.raw?.[0]?.[3]).toBe(computed.value.findings[0]?.estimate);
    expect(effects?.rows.every((row) => (row[3] ?? '').length > 20)).toBe(true);
  });

  it('refuses where nobody is left under a condition, naming it', async () => {
    const nobody = scoreDesign(
      applyRule(sleep, { rule: 'limit', on: 'trial', column: 'extra_hours', side: 'above', limit: -100, reason: 'r' })
        .design,
      scores.score,
    );
    await expect(run(comparisonKind, settings, { scores: nobody })).rejects.toThrow(
      /Nobody is left with a score under drug2/,
    );
  });

  it('by hand: the simulated level of an exclusion within groups is quoted only where that case was simulated', async () => {
    const build = (n: number) => {
      const table = tableOf({
        p: Array.from({ length: 2 * n }, (_, i) => `p${i}`),
        g: Array.from({ length: 2 * n }, (_, i) => (i < n ? 'a' : 'b')),
        s: Array.from({ length: 2 * n }, (_, i) => ((i * 29) % 53) + (i === 3 ? 500 : 0)),
      });
      const design = declareDesign(table, {
        participant: 'p',
        within: [],
        between: ['g'],
        outcome: 's',
        unit: '',
        direction: 'lower',
        rows: 'one score',
      });
      const rule = {
        rule: 'extreme',
        on: 'trial',
        column: 's',
        measure: 'MAD',
        cutoff: 3,
        scope: 'condition',
        sides: 'both',
      } as const;
      return scoreDesign(applyRule(design, rule).design, { statistic: 'mean', trim: 0 });
    };
    const r2 = async (n: number) => {
      const above = build(n);
      const own = { ...comparisonKind.defaults(contextOf({ scores: above })), resamples: 99 };
      const computed = await run<Result>(comparisonKind, own, { scores: above });
      const planned = computed.value.findings[computed.value.planned];
      expect(computed.value.findings.every((finding) => finding === planned || finding.p === null)).toBe(true);
      // The planned row's p and interval come from the rules re-applied in relabellings and resamples.
      expect(planned?.pHow).toBe('relabelling with the rules re-applied, B = 99: the rule sees the condition');
      expect(planned?.interval?.[0]).toBeLessThan(planned?.estimate as number);
      expect(comparisonKind.notes?.(computed, own).some((each) => each.id === 'R2P')).toBe(true);
      return comparisonKind.notes?.(computed, own).find((each) => each.id === 'R2')?.text ?? '';
    };
    expect(await r2(20)).toMatch(/\.075 of normal and \.204 of lognormal/);
    expect(await r2(21)).not.toMatch(/simulated/);
  });
});

describe('claim and standing strip', () => {
  it('by hand: the claim reads as a sentence and is judged by the planned row', async () => {
    const result = (await run<Result>(comparisonKind, settings, { scores })).value;
    const computed = await run<ClaimValue>(claimKind, claimSettings, { result });
    expect(computed.value.verdict).toBe('supported');
    expect(claimKind.say(computed, claimSettings)).toBe(
      'drug2 is higher than drug1 on extra_hours. By the planned row: supported.',
    );
    const context2 = contextOf({ result });
    expect(plainSentence(claimKind.sentence(claimSettings, context2))).toBe(
      'The claim: drug2 is higher than drug1 on extra_hours by more than 0 h; in own words: as it stands.',
    );
  });

  it('refuses a claim about conditions that are not compared', async () => {
    const result = (await run<Result>(comparisonKind, settings, { scores })).value;
    await expect(run(claimKind, { ...claimSettings, first: 'drug9' }, { result })).rejects.toThrow(
      /comparison above is of drug2 with drug1/,
    );
  });

  it('by hand: a one-sided comparison against the claim is warned about', async () => {
    const result = (await run<Result>(comparisonKind, { ...settings, alternative: 'less' }, { scores })).value;
    const computed = await run<ClaimValue>(claimKind, claimSettings, { result });
    expect(claimKind.notes?.(computed, claimSettings).some((each) => /can never support/.test(each.text))).toBe(true);
  });

  it('theory: the strip counts every specification once, and says so in words', async () => {
    const result = (await run<Result>(comparisonKind, settings, { scores })).value;
    const claim = (await run<ClaimValue>(claimKind, claimSettings, { result })).value;
    const { value } = await run<Sweep>(standingKind, {}, { claim });
    expect(value.supported + value.undecided + value.contradicted + value.refused).toBe(value.specifications.length);
    expect(sayCounts(value)).toMatch(
      new RegExp(
        `^supported in ${value.supported} of ${value.specifications.length} analyses, undecided in ${value.undecided}`,
      ),
    );
  });
});
