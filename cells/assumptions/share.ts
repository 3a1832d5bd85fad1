import type { SimulatedShare } from '../../src/analysis/checks-power.ts';
import { fixed } from '../numbers.ts';

/** "46 % (± 3)": a simulated share with two standard errors, no more digits than those allow. */
export function shareText(share: number, { se, runs }: SimulatedShare): string {
  if (share === 0) return `fewer than ${fixed(300 / runs, 1)} %`;
  if (share === 1) return `more than ${fixed(100 - 300 / runs, 1)} %`;
  const twice = 200 * se;
  const decimals = twice < 1 ? 1 : 0;
  return `${fixed(100 * share, decimals)} % (\u00b1 ${fixed(Math.max(twice, 0.1), decimals)})`;
}
