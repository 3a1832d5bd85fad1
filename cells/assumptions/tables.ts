import type { Checks } from '../../src/analysis/checks.ts';
import type { TableOut } from '../kind.ts';
import { bounded, count, decimalsFor, degrees, fixed, limits, pValue } from '../numbers.ts';
import { DEPARTURES, TESTS } from './settings.ts';
import { shareText } from './share.ts';
import { quantityAtLength, statisticOf } from './words.ts';
import { sdDecimals } from './words-spread.ts';

type Raw = string | number | null;

/** One row twice: as shown, and in full precision. */
interface Row {
  readonly shown: readonly string[];
  readonly raw: readonly Raw[];
}

/** Every number of the checks, in tables of one subject each. */
export function checkTables(checks: Checks): TableOut[] {
  return [
    shapeTable(checks),
    ...spreadTables(checks),
    ...(checks.levels.length > 0 ? [levelTable(checks)] : []),
    ...(checks.sphericity === null ? [] : [pairTable(checks), covarianceTable(checks)]),
    ...(checks.power.length > 0 ? [powerTable(checks)] : []),
    influenceTable(checks),
  ];
}

function tableOf(title: string, names: readonly string[], numeric: readonly number[], rows: readonly Row[]): TableOut {
  return {
    title,
    columns: names.map((name, at) => ({ name, numeric: numeric.includes(at) })),
    rows: rows.map(({ shown }) => shown),
    raw: rows.map(({ raw }) => raw),
  };
}

const TOGETHER = 'described: residuals of one participant hang together';

function shapeTable(checks: Checks): TableOut {
  const { shape } = checks;
  const write = (value: number) => fixed(value, 3);
  const own = checks.sphericity === null;
  const moments = [shape.skew, shape.excess].map((moment, at): Row => {
    const name = at === 0 ? 'skew (G1)' : 'excess kurtosis (G2)';
    const { value } = moment;
    const described = { se: null, z: null, interval: null, reason: TOGETHER };
    const { se, z, interval, reason } = own ? moment : described;
    return {
      shown: [
        name,
        value === null ? '' : write(value),
        se === null ? '' : write(se),
        z === null ? '' : fixed(z, 2),
        interval ? limits(interval, write) : '',
        '',
        reason ?? '',
      ],
      raw: [name, value, se, z, interval ? `[${interval[0]}, ${interval[1]}]` : null, null, reason ?? ''],
    };
  });
  const tests = shape.tests.map((test): Row => {
    const p = test.p === null ? '' : pValue(test.p);
    const remark =
      checks.sphericity === null ? (test.reason ?? '') : 'residuals of one participant hang together: no p';
    const own = checks.sphericity === null;
    return {
      shown: [TESTS[test.id], statisticOf(test, 4), '', '', '', own ? p : '', remark],
      raw: [TESTS[test.id], test.statistic, null, null, null, own ? test.p : null, remark],
    };
  });
  return tableOf(
    `shape of the ${quantityAtLength(checks)}`,
    ['check', 'value', 'SE in normal samples', 'z', 'interval', 'p', 'remark'],
    [1, 2, 3],
    [...moments, ...tests],
  );
}

const SPREAD_TESTS = {
  levene: 'Levene (means)',
  'brown-forsythe': 'Brown\u2013Forsythe (medians)',
  bartlett: 'Bartlett (presumes normal scores)',
  'fligner-killeen': 'Fligner\u2013Killeen (ranks)',
} as const;

const SPREAD_OF = { scores: 'scores', differences: 'differences', means: 'participants\u2019 means' } as const;

function spreadTables({ spreads }: Checks): TableOut[] {
  return spreads.flatMap(({ what, checks: own }) => {
    const decimals = sdDecimals(own.groups);
    const groups = own.groups.map(
      ({ name, n, mean, sd }): Row => ({
        shown: [name, count(n), fixed(mean, decimals), sd === null ? '' : fixed(sd, decimals)],
        raw: [name, n, mean, sd],
      }),
    );
    const tests = own.tests.map((test): Row => {
      const df =
        test.df1 === null ? '' : [test.df1, test.df2].flatMap((each) => (each === null ? [] : [degrees(each)]));
      const name = SPREAD_TESTS[test.id];
      const symbol = test.df2 === null ? '\u03c7\u00b2' : 'F';
      return {
        shown: [
          name,
          test.statistic === null ? '' : `${symbol} = ${fixed(test.statistic, 3)}`,
          df === '' ? '' : df.join(', '),
          test.p === null ? '' : pValue(test.p),
          test.reason ?? '',
        ],
        raw: [name, test.statistic, df === '' ? null : df.join(', '), test.p, test.reason ?? ''],
      };
    });
    return [
      tableOf(`spread of the ${SPREAD_OF[what]} by group`, ['group', 'n', 'mean', 'SD'], [1, 2, 3], groups),
      tableOf(`tests of equal spread of the ${SPREAD_OF[what]}`, ['test', 'statistic', 'df', 'p', 'remark'], [], tests),
    ];
  });
}

function levelTable({ levels, layout }: Checks): TableOut {
  const decimals = decimalsFor(Math.max(...levels.map(({ sd }) => sd)));
  return tableOf(
    'scores under each level, described: the participants are the same, so no test of groups fits',
    [layout.target.factor, 'mean', 'SD'],
    [1, 2],
    levels.map(({ level, mean, sd }) => ({
      shown: [level, fixed(mean, decimals), fixed(sd, decimals)],
      raw: [level, mean, sd],
    })),
  );
}

function pairTable({ sphericity, options }: Checks): TableOut {
  const pairs = sphericity?.pairs ?? [];
  const decimals = decimalsFor(Math.max(...pairs.map(({ sd }) => sd)));
  const write = (value: number) => fixed(value, decimals);
  return tableOf(
    'differences between two levels',
    ['difference', 'mean', 'SD', 'interval of the SD', 'skew', `p, ${TESTS[options.test]}`, 'p, Holm'],
    [1, 2, 4],
    pairs.map((pair) => ({
      shown: [
        `${pair.first} minus ${pair.second}`,
        write(pair.mean),
        write(pair.sd),
        pair.interval ? limits(pair.interval, write) : '',
        pair.skew === null ? '' : fixed(pair.skew, 2),
        pair.p === null ? '' : pValue(pair.p),
        pair.adjusted === null ? '' : pValue(pair.adjusted),
      ],
      raw: [
        `${pair.first} minus ${pair.second}`,
        pair.mean,
        pair.sd,
        pair.interval ? `[${pair.interval[0]}, ${pair.interval[1]}]` : null,
        pair.skew,
        pair.p,
        pair.adjusted,
      ],
    })),
  );
}

function covarianceTable({ sphericity, layout }: Checks): TableOut {
  const groups = sphericity?.groups ?? [];
  const sds = groups.flatMap((group) => group.sds.filter((sd) => sd !== null));
  const decimals = decimalsFor(Math.max(0, ...sds));
  return tableOf(
    'SD of each level and \u03b5 (Greenhouse\u2013Geisser) by group',
    ['group', 'n', ...layout.columns.map((name) => `SD ${name}`), '\u03b5'],
    [1, ...layout.columns.map((_, at) => at + 2), layout.columns.length + 2],
    groups.map(({ name, n, sds: own, gg }) => ({
      shown: [
        name || 'everyone',
        count(n),
        ...own.map((sd) => (sd === null ? '' : fixed(sd, decimals))),
        gg === null ? '' : bounded(gg, 3),
      ],
      raw: [name || 'everyone', n, ...own, gg],
    })),
  );
}

function powerTable({ power, options }: Checks): TableOut {
  return tableOf(
    'what so many participants could have shown',
    ['departure', 'found by', 'in so many studies', 'simulated studies'],
    [3],
    power.map(({ departure, found }) => {
      const test = departure === 'spread' ? 'Brown\u2013Forsythe' : TESTS[options.test];
      const name = departure === 'spread' ? `${DEPARTURES[departure]}, in the smallest group` : DEPARTURES[departure];
      return {
        shown: [
          name,
          test,
          found === null ? 'not defined at this n' : shareText(found.share, found),
          found === null ? '' : count(found.runs),
        ],
        raw: [name, test, found?.share ?? null, found?.runs ?? null],
      };
    }),
  );
}

function influenceTable({ influence, layout }: Checks): TableOut {
  const decimals = influence.se === null ? 2 : decimalsFor(4 * influence.se);
  const grouped = layout.groups.length > 1;
  const single = influence.estimate !== null;
  const cut = <T>(cells: readonly T[]): T[] => cells.filter((_, at) => (grouped || at !== 1) && (single || at < 3));
  const names = cut([layout.noun, 'group', 'Cook\u2019s distance', 'estimate without', 'change in SE']);
  return tableOf(
    `the ${influence.largest.length} largest influences`,
    names,
    names.flatMap((name, at) => (name === layout.noun || name === 'group' ? [] : [at])),
    influence.largest.map(({ participant, group, cook, without, change }) => ({
      shown: cut([
        participant,
        group,
        cook === null ? '' : fixed(cook, 3),
        without === null ? '' : fixed(without, decimals),
        change === null ? '' : fixed(change, 2),
      ]),
      raw: cut<Raw>([participant, group, cook, without, change]),
    })),
  );
}
