import axe from 'axe-core';
import type { Page } from 'playwright-core';

interface Violation {
  readonly id: string;
  readonly help: string;
  readonly nodes: readonly { readonly target: readonly unknown[]; readonly failureSummary?: string }[];
}

const rules = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/**
 * What of WCAG 2.2 AA the page breaks, one line for each element, empty where nothing is. The checker is evaluated in
 * the page because the policy blocks script elements.
 */
export async function accessibilityProblems(page: Page, within = 'html'): Promise<string[]> {
  await page.evaluate(axe.source);
  const violations = await page.evaluate(
    async ([selector, tags]) => {
      const checker = (globalThis as unknown as { axe: { run(where: string, how: object): Promise<unknown> } }).axe;
      const found = await checker.run(selector, { runOnly: { type: 'tag', values: tags } });
      return (found as { violations: Violation[] }).violations;
    },
    [within, rules] as const,
  );
  return violations.flatMap((each) =>
    each.nodes.map((node) => `${each.id}: ${each.help}: ${node.target.join(' ')}: ${node.failureSummary ?? ''}`),
  );
}
