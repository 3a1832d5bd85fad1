import type { GridSpecification } from '../../src/analysis/grid.ts';
import type { Ribbon } from '../../src/analysis/grid-ribbons.ts';
import type { Joint } from '../../src/analysis/joint.ts';
import type { TableOut } from '../kind.ts';
import { count, decimalsFor, fixed, limits, percent, pValue } from '../numbers.ts';
import type { JointSweep, SensitivityDetail } from './kind.ts';
import { AXIS_WORDS, decimalsOf } from './words.ts';

/** Everything the cell shows, for who wants the numbers. */
export function sensitivityTables(value: JointSweep, detail: SensitivityDetail): TableOut[] {
  const tables = [analysisTable('every analysis', value.specifications, value.joint, value.places)];
  if (detail.exploratory.length > 0)
    tables.push(analysisTable('analyses drawn apart', detail.exploratory, detail.apart.joint, detail.apart.places));
  tables.push(shareTable(detail), optionTable(detail));
  if (detail.refused.length > 0) tables.push(leftOutTable(detail));
  return [...tables, ...detail.ribbons.map((ribbon) => ribbonTable(ribbon, value.unit))];
}

function named(names: readonly string[], numeric: readonly string[]) {
  return names.map((name) => ({ name, numeric: numeric.includes(name) }));
}

function analysisTable(
  title: string,
  specifications: readonly GridSpecification[],
  joint: Joint | null,
  places: readonly number[],
): TableOut {
  const names = [
    'rule',
    'row',
    'score',
    'estimate',
    'interval',
    'p',
    'p relabelled',
    'p allowing for the grid',
    'n',
    'claim',
    'marks',
    'same as',
  ];
  const rowOf = new Map(places.map((place, i) => [place, joint?.rows[i]]));
  const p = (value: number | null | undefined) => (value === null || value === undefined ? '' : pValue(value));
  const marks = ({ planned, everyoneIn }: GridSpecification) =>
    [planned ? 'now' : '', everyoneIn ? 'nobody set aside for being extreme' : '']
      .filter((each) => each !== '')
      .join(', ');
  return {
    title,
    columns: named(names, ['estimate', 'n']),
    rows: specifications.map((each, place) => {
      const { finding } = each;
      const write = (value: number) => fixed(value, decimalsOf(each));
      return [
        each.ruleLabel,
        finding.label,
        each.score.statistic,
        finding.estimate === null ? '' : write(finding.estimate),
        finding.interval ? limits(finding.interval, write) : (finding.reason ?? ''),
        p(finding.p),
        p(rowOf.get(place)?.p),
        p(rowOf.get(place)?.adjusted),
        count(finding.n),
        each.verdict ?? 'not judged',
        marks(each),
        each.also.join('; '),
      ];
    }),
    raw: specifications.map((each, place) => {
      const { finding } = each;
      const [low, high] = finding.interval ?? [null, null];
      const row = rowOf.get(place);
      return [
        each.ruleLabel,
        finding.label,
        each.score.statistic,
        finding.estimate,
        `[${low ?? ''}, ${high ?? ''}]`,
        finding.p,
        row?.p ?? null,
        row?.adjusted ?? null,
        finding.n,
        each.verdict,
        marks(each),
        each.also.join('; '),
      ];
    }),
  };
}

/** Mean estimate under each option, and the share of the spread that goes with its axis. */
function shareTable({ shares, axes, spread }: SensitivityDetail): TableOut {
  const names = ['choice', 'option', 'mean estimate', 'combinations', 'share of the spread'];
  const label = (axis: string, value: string) =>
    axes.find((each) => each.axis === axis)?.options.find((each) => each.value === value)?.label ?? value;
  const decimals =
    spread === null ? 2 : decimalsFor(Math.max(spread.most - spread.least, Math.abs(spread.median) / 50));
  const flat = shares.flatMap(({ axis, share, means }) => means.map((each) => ({ axis, share, ...each })));
  return {
    title: 'what the estimates depend on',
    columns: named(names, names.slice(2)),
    rows: flat.map(({ axis, share, value, mean, n }) => [
      AXIS_WORDS[axis],
      label(axis, value),
      fixed(mean, decimals),
      count(n),
      share === null ? '' : percent(share),
    ]),
    raw: flat.map(({ axis, share, value, mean, n }) => [AXIS_WORDS[axis], value, mean, n, share]),
  };
}

function optionTable({ axes }: SensitivityDetail): TableOut {
  const words = { E: 'same question', U: 'uncertain', N: 'not the same' } as const;
  return {
    title: 'options, and why each is offered',
    columns: named(['choice', 'option', 'question', 'why'], []),
    rows: axes.flatMap(({ axis, options }) =>
      options.map((option) => [AXIS_WORDS[axis], option.label, words[option.mark], option.refused ?? option.why]),
    ),
  };
}

function leftOutTable({ refused }: SensitivityDetail): TableOut {
  return {
    title: 'left out',
    columns: named(['combinations', 'for example', 'why'], ['combinations']),
    rows: refused.map(({ why, example, count: n }) => [count(n), example, why]),
  };
}

function ribbonTable({ along, what, points }: Ribbon, unit: string): TableOut {
  const write = (value: number | null) => (value === null ? '' : fixed(value, unit === '' ? 2 : 1));
  return {
    title: `along the ${along}`,
    columns: named(
      [along, 'estimate', 'lower', 'upper', 'p', 'rows kept', 'claim'],
      ['estimate', 'lower', 'upper', 'rows kept'],
    ),
    rows: points.map((point) => [
      point.at === null ? 'none' : along === 'trim' ? `${point.at} %` : `${point.at} ${what}`,
      write(point.estimate),
      write(point.low),
      write(point.high),
      point.p === null ? '' : pValue(point.p),
      count(point.kept),
      point.verdict ?? '',
    ]),
    raw: points.map((point) => [point.at, point.estimate, point.low, point.high, point.p, point.kept, point.verdict]),
  };
}
