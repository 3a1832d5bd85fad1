import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { checkTails } from '../../reference/check-tails.ts';

const folder = (name: string) => fileURLToPath(new URL(`../../reference/${name}`, import.meta.url));

describe('tail grids', () => {
  // Source: test/reference/tails/README.md; tolerances in check-tails.ts: relative 1e-11, 1e-10 from parameters of 1e5 on.
  test('agrees with mpmath and exact counts: every value of the 31 grids', () => {
    expect(checkTails(folder('tails'))).toEqual({ passed: 8319, failed: 0, skipped: 0, misses: [] });
  }, 120_000);

  // Source: test/reference/tails/wide/wide.py, mpmath at random arguments over wider ranges; same tolerances.
  test('agrees with mpmath at random arguments over wide ranges', () => {
    const { passed, failed, skipped, misses } = checkTails(folder('tails/wide'));
    expect(misses).toEqual([]);
    expect([failed, skipped]).toEqual([0, 0]);
    expect(passed).toBe(2400);
  });

  test('refuses to pass a wrong value, counts an unknown grid as skipped and reads infinities', () => {
    const dir = mkdtempSync(join(tmpdir(), 'grids-'));
    try {
      writeFileSync(
        join(dir, 't_cdf.csv'),
        'x,df,lower,upper\n0,Inf,0.5,0.5\n1,3,0.5,0.19550110947788532\n-1,-3,0.5,0.5\n',
      );
      writeFileSync(join(dir, 'nothing_cdf.csv'), 'x,lower\n1,0.5\n2,0.5\n');
      const result = checkTails(dir);
      expect([result.passed, result.failed, result.skipped]).toEqual([3, 3, 2]);
      expect(result.misses.join('\n')).toContain('t_cdf(x=1, df=3) lower: ours 0.80449889052211');
      expect(result.misses.join('\n')).toContain('*df* must be above 0; got -3');
      expect(result.misses.join('\n')).toContain('nothing_cdf');
    } finally {
      rmSync(dir, { recursive: true });
    }
  });
});
