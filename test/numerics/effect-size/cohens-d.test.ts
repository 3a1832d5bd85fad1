import { describe, expect, it } from 'vitest';
import { cohensD } from '../../../src/numerics/effect-size/cohens-d.ts';
import { studentT } from '../../../src/numerics/student.ts';
import { close, scores, soybean, sunflower } from '../samples.ts';

describe("Cohen's d", () => {
  it('by hand: 1, 3 against 2, 6 with three denominators', () => {
    const d = (denominator: 'pooled' | 'average' | 'second') =>
      cohensD(scores(1, 3), scores(2, 6), { denominator }).value;
    expect(close(d('pooled'), -2 / Math.sqrt(5), 1e-14) && close(d('average'), -2 / Math.sqrt(5), 1e-14)).toBe(true);
    expect(close(d('second'), -2 / Math.sqrt(8), 1e-14)).toBe(true);
  });
  it('agrees with R 4.2 pt inverted by uniroot (rtol 1e-9)', () => {
    const own = cohensD(sunflower, soybean);
    expect(close(own.value, 1.5933427516438405, 1e-12)).toBe(true);
    expect(
      close(own.interval?.[0], 0.68899308328740505, 1e-9) && close(own.interval?.[1], 2.4727992230321343, 1e-9),
    ).toBe(true);
  });
  it('theory: the limits exclude 0 exactly when Student rejects', () => {
    const p = studentT(sunflower, soybean).p as number;
    for (const step of [-1e-6, 1e-6]) {
      const low = cohensD(sunflower, soybean, { level: 1 - p + step }).interval?.[0] as number;
      expect(low > 0).toBe(step < 0);
    }
  });
  it('invariance: unit and offset; exchange turns the sign', () => {
    const own = cohensD(sunflower, soybean).value as number;
    expect(
      close(
        cohensD(
          sunflower.map((x) => 4 * x + 64),
          soybean.map((x) => 4 * x + 64),
        ).value,
        own,
        1e-12,
      ),
    ).toBe(true);
    expect(close(cohensD(soybean, sunflower).value, -own, 1e-13)).toBe(true);
  });
  it('degenerate: no spread, a group of one, no interval for other denominators', () => {
    expect(cohensD(scores(1, 1), scores(2, 2))).toEqual({
      value: null,
      interval: null,
      reason: 'all scores within each condition are equal',
    });
    expect(cohensD(scores(1, 3), scores(2, 2), { denominator: 'second' }).reason).toBe(
      'all scores within the second condition are equal',
    );
    expect(cohensD(scores(1), scores(2, 3)).reason).toBe('a condition has only one score');
    expect(cohensD(sunflower, soybean, { denominator: 'average' }).interval).toBe(null);
  });
  it('refuses an empty group', () => {
    expect(() => cohensD(scores(), soybean)).toThrow(RangeError);
  });
});
