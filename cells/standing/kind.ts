import { findingRecord } from '../../src/analysis/finding.ts';
import type { Sweep } from '../../src/analysis/sweep.ts';
import { defineKind, type TableOut } from '../kind.ts';
import { count, decimalsFor, fixed, limits, pValue } from '../numbers.ts';

/** The standing strip: the claim under every analysis of the grid. It stands in the foot, not among the cells. */
export const standingKind = defineKind<Record<string, never>, { readonly claim: 'claim' }, 'sweep', null>({
  name: 'standing',
  version: 1,
  title: () => 'standing strip',
  offer: null,
  takes: { claim: 'claim' },
  gives: 'sweep',
  blind: 'veil',
  defaults: () => ({}),
  check: () => [],
  async compute(_settings, { claim }, env) {
    return { value: await env.run('sweep', { result: claim.result, claim: claim.claim }), detail: null };
  },
  sentence: () => ['Every defensible analysis of the claim.'],
  say: ({ value }) => sayCounts(value),
  tables: ({ value }) => [specificationTable(value)],
  record: ({ value }) => ({
    specifications: value.specifications.length,
    supported: value.supported,
    undecided: value.undecided,
    contradicted: value.contradicted,
    refused: value.refused,
    planned: value.planned,
    findings: value.specifications.map((each) => findingRecord(each.finding)),
  }),
});

/** "supported in 71 of 84 analyses, undecided in 13, contradicted in 0". */
export function sayCounts(sweep: Sweep): string {
  const all = sweep.specifications.length;
  const refused = sweep.refused > 0 ? `; ${count(sweep.refused)} without an interval` : '';
  return `supported in ${count(sweep.supported)} of ${count(all)} analyses, undecided in ${count(sweep.undecided)}, contradicted in ${count(sweep.contradicted)}${refused}`;
}

/** Every specification, for who wants the numbers. */
function specificationTable(sweep: Sweep): TableOut {
  const names = ['rule', 'row', 'estimate', 'interval', 'p', 'n', 'claim', 'marks', 'same as'];
  return {
    title: 'every analysis of the strip',
    columns: names.map((name) => ({ name, numeric: name === 'estimate' || name === 'n' })),
    rows: sweep.specifications.map((each) => {
      const { finding } = each;
      const [low, high] = finding.interval ?? [null, null];
      const decimals = low !== null && high !== null ? decimalsFor(high - low) : 2;
      const write = (value: number) => fixed(value, decimals);
      const marks = [each.planned ? 'now' : '', each.everyoneIn ? 'nobody set aside for being extreme' : ''];
      return [
        each.ruleLabel,
        finding.label,
        finding.estimate === null ? '' : write(finding.estimate),
        finding.interval ? limits(finding.interval, write) : (finding.reason ?? ''),
        finding.p === null ? '' : pValue(finding.p),
        count(finding.n),
        each.verdict ?? 'not judged',
        marks.filter((mark) => mark !== '').join(', '),
        each.also.join('; '),
      ];
    }),
    raw: sweep.specifications.map((each) => {
      const { finding } = each;
      const [low, high] = finding.interval ?? [null, null];
      return [
        each.ruleLabel,
        finding.label,
        finding.estimate,
        `[${low ?? ''}, ${high ?? ''}]`,
        finding.p,
        finding.n,
        each.verdict,
        each.planned ? 'now' : '',
        each.also.join('; '),
      ];
    }),
  };
}
