import { describe, expect, it } from 'vitest';
import { type Finding, findingRecord } from '../../src/analysis/finding.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';

const { findings } = compareAll(
  scoresOf('plant_growth', { between: ['group'], outcome: 'weight' }),
  everyLevel('group'),
);

describe('findingRecord', () => {
  it('by hand: both degrees of freedom of an F, one of any other statistic', () => {
    expect(findingRecord(findings[0] as Finding)).toMatchObject({ estimator: 'anova', df: 2, df2: 27, n: 30 });
    const rank = findingRecord(findings.find((each) => each.estimator === 'kruskal-wallis') as Finding);
    expect(Object.keys(rank)).not.toContain('df2');
  });

  it('theory: words are left out, so that a later wording changes no record', () => {
    const own = findings[0] as Finding;
    const reworded = { ...own, label: 'x', quantity: 'y', method: 'z', pHow: '', cautions: ['R15'] };
    expect(findingRecord(reworded)).toEqual(findingRecord(own));
  });

  it('invariance: a record goes through JSON unchanged', () => {
    for (const finding of findings) {
      expect(JSON.parse(JSON.stringify(findingRecord(finding)))).toEqual(findingRecord(finding));
    }
  });
});
