import type { Checks } from '../../src/analysis/checks.ts';
import type { Departure, SimulatedShare } from '../../src/analysis/checks-power.ts';
import type { ShapeTest } from '../../src/analysis/checks-shape.ts';
import { bounded, count, decimalsFor, fixed, limits, pValue } from '../numbers.ts';
import { DEPARTURES, TESTS } from './settings.ts';
import { shareText } from './share.ts';
import { mauchlySentence, spreadSentences } from './words-spread.ts';

/** What is looked at, in words: one place for figures, sentences and tables. */
export function quantityOf({ design, layout }: Checks): string {
  const groups = layout.groups.length > 1;
  switch (design) {
    case 'sample':
      return 'scores';
    case 'groups':
      return 'residuals';
    case 'differences':
      return groups ? 'residuals of the differences' : 'differences';
    case 'repeated':
      return 'residuals';
  }
}

/** Where the means were taken out: "residuals from the means of 3 groups". */
export function quantityAtLength({ design, layout }: Checks): string {
  const [first = '', second = ''] = layout.columns;
  const groups = `the ${layout.groups.length} groups`;
  switch (design) {
    case 'sample':
      return `the scores of ${layout.participants.length} participants`;
    case 'groups':
      return `residuals from the means of ${groups}`;
    case 'differences':
      return layout.groups.length > 1
        ? `differences ${first} minus ${second}, less their mean in each of ${groups}`
        : `differences ${first} minus ${second}, one for each participant`;
    case 'repeated':
      return `scores less each participant\u2019s mean and less each level\u2019s mean${layout.groups.length > 1 ? ` in each of ${groups}` : ''}`;
  }
}

/** The sentences under the pictures, in the order of weight; each can stand alone. */
export function sentencesOf(checks: Checks): { readonly lead: string; readonly text: string }[] {
  const said = [
    { lead: 'Independence', text: orderSentence(checks) },
    ...spreadSentences(checks),
    { lead: 'Sphericity', text: mauchlySentence(checks) },
    { lead: 'Shape', text: [bandSentence(checks), testSentence(checks), sizeSentence(checks)].join(' ') },
    { lead: 'Additivity', text: additivitySentence(checks) },
    { lead: 'Influence', text: influenceSentence(checks) },
  ];
  return said.filter(({ text }) => text !== '');
}

/** What never changes: the checks are looked at, they choose nothing. */
export const NOT_CHOSEN = 'The check did not select the test.';

/** The result in one plain sentence. */
export function sayChecks(checks: Checks): string {
  const spread = [...spreadSentences(checks).map(({ text }) => text), mauchlySentence(checks)].find(
    (each) => each !== '',
  );
  return [testSentence(checks), spread ?? '', NOT_CHOSEN].filter((each) => each !== '').join(' ');
}

/** "W = .93", "D = .12", "A²* = 0.70". */
export function statisticOf({ symbol, statistic }: Pick<ShapeTest, 'symbol' | 'statistic'>, decimals = 2): string {
  if (statistic === null) return '';
  return `${symbol} = ${symbol.startsWith('A') ? fixed(statistic, decimals) : bounded(statistic, decimals)}`;
}

function bandSentence({ standard, envelope, outside, shape }: Checks): string {
  if (standard === null) return 'What is left does not vary, so it has no shape.';
  if (envelope === null) return `With ${count(shape.n)} of them a band would show nothing.`;
  const places = envelope.places.length < shape.n ? ` (looked at in ${count(envelope.places.length)} places)` : '';
  const out = outside.length === 0 ? 'No point lies' : `${count(outside.length)} of ${count(shape.n)} points lie`;
  const one = outside.length === 1 ? `1 of ${count(shape.n)} points lies` : out;
  return `${one} outside the simultaneous 95 % band${places}; one normal sample in twenty leaves it somewhere.`;
}

/** "Shapiro-Wilk W = .93, p = .38. No strong evidence against normal residuals; with n = 12 the test would ..." */
function testSentence(checks: Checks): string {
  const { options, shape } = checks;
  const name = TESTS[options.test];
  if (checks.sphericity !== null)
    return `${pairsSentence(checks)} ${powerSentence(checks, ', on one of them,')}`.trim();
  const test = shape.tests.find(({ id }) => id === options.test);
  if (test?.statistic == null) return `${name} is not given: ${test?.reason ?? 'not defined'}.`;
  const p = test.p === null ? (test.reason ?? '') : pValue(test.p);
  const against = isAgainst(test.p, options.alpha, test.statistic)
    ? `Evidence against normal ${quantityOf(checks)}`
    : `No strong evidence against normal ${quantityOf(checks)}`;
  return `${name} ${statisticOf(test)}, ${p}. ${against}${powerClause(checks)}.`;
}

/** A missing p stands for one too small for its formula. */
function isAgainst(p: number | null, alpha: number, statistic: number): boolean {
  return p === null ? statistic >= 10 : p <= alpha;
}

function pairsSentence({ sphericity, options }: Checks): string {
  const pairs = (sphericity?.pairs ?? []).filter(({ p }) => p !== null);
  const [least] = [...pairs].sort((a, b) => (a.p as number) - (b.p as number));
  if (!least) return '';
  return `${TESTS[options.test]} on the ${pairs.length} differences between two levels: the smallest ${pValue(least.p as number)} is that of ${least.first} minus ${least.second} (${pValue(least.adjusted ?? 1)} with Holm\u2019s correction).`;
}

function powerClause(checks: Checks): string {
  const power = shapePowerWords(checks);
  return power === '' ? '' : `; with n = ${count(checks.layout.participants.length)} the test would miss ${power}`;
}

function powerSentence(checks: Checks, where: string): string {
  const power = shapePowerWords(checks);
  return power === '' ? '' : `With n = ${count(checks.layout.participants.length)} it would miss${where} ${power}.`;
}

/** "an exponential population in 46 % of studies (± 3), a t with 3 df in 79 % (± 3)". */
function shapePowerWords({ power }: Checks): string {
  const known = power.filter(({ departure, found }) => departure !== 'spread' && found !== null);
  return known
    .map(({ departure, found }, at) => {
      const missed = 1 - (found as SimulatedShare).share;
      return `${DEPARTURES[departure]} in ${shareText(missed, found as SimulatedShare)}${at === 0 ? ' of studies' : ''}`;
    })
    .join(', ');
}

/** How often a departure would be found, in words. */
export function foundText(departure: Departure, found: SimulatedShare | null): string {
  return found === null ? `${DEPARTURES[departure]}: not defined at this n` : shareText(found.share, found);
}

function sizeSentence({ shape, sphericity }: Checks): string {
  const write = (value: number) => fixed(value, 2);
  const { skew, excess, beyond, n } = shape;
  if (skew.value === null || !skew.interval) return '';
  if (sphericity !== null && excess.value !== null)
    return `Skew ${write(skew.value)} and excess kurtosis ${write(excess.value)} describe the residuals; one participant\u2019s hang together, so no interval fits.`;
  const heavy =
    excess.value === null || !excess.interval
      ? ''
      : `, excess kurtosis ${write(excess.value)} ${limits(excess.interval, write)}`;
  const far =
    beyond === null
      ? ''
      : ` ${beyond === 0 ? 'None' : count(beyond)} of ${count(n)} ${beyond === 1 ? 'lies' : 'lie'} beyond 3 MAD of their median.`;
  return `Skew ${write(skew.value)} ${limits(skew.interval, write)}${heavy}; both are 0 for a normal population, the intervals use the SE of normal samples.${far}`;
}

function orderSentence({ order, layout }: Checks): string {
  const decides =
    'It is settled by how the study was run. The order of the file may mean nothing; it can hint only where rows stand as they were collected.';
  if (order.lag1 === null) return `${decides} Not looked at: ${order.reason ?? 'not defined'}.`;
  const runs = order.p === null ? '' : `, runs about the median ${pValue(order.p)}`;
  return `${decides} In that order one ${layout.noun} and the next correlate ${bounded(order.lag1, 2)}${runs}.`;
}

function additivitySentence({ additivity, design, layout }: Checks): string {
  if (design === 'sample' || (design === 'groups' && layout.groups.length < 3)) return '';
  const { growth, interval, F, df, p, reason } = additivity;
  const write = (value: number) => fixed(value, 2);
  const size = growth === null || !interval ? '' : `${write(growth)} ${limits(interval, write)}`;
  if (additivity.what === 'spread') {
    return size === ''
      ? `Spread against level is not given: ${reason ?? ''}.`
      : `The groups\u2019 SDs follow the ${size} power of their means; 0 would be one spread at every level, 1 a spread in proportion to it.`;
  }
  if (F === null) return `Not looked at: ${reason ?? ''}.`;
  const grows =
    size === ''
      ? ''
      : `Change grows with the level by ${size}: 0 is the same change at every level, 1 a change in proportion to it. `;
  return `${grows}Tukey\u2019s single degree of freedom F(1, ${df}) = ${fixed(F, 2)}, ${pValue(p ?? 1)}.`;
}

function influenceSentence({ influence, layout }: Checks): string {
  const [first] = influence.largest;
  if (!first || first.cook === null) return '';
  const cook = `Cook\u2019s distance ${fixed(first.cook, 2)}`;
  if (first.without === null || first.change === null || influence.estimate === null || influence.se === null)
    return `The largest ${cook} is that of ${layout.noun} ${first.participant}.`;
  const decimals = decimalsFor(4 * influence.se);
  const unit = layout.unit === '' ? '' : ` ${layout.unit}`;
  return `Without ${layout.noun} ${first.participant} the mean${layout.columns.length + layout.groups.length > 2 ? ' difference' : ''} is ${fixed(first.without, decimals)}${unit} instead of ${fixed(influence.estimate, decimals)}, a move of ${fixed(Math.abs(first.change), 2)} SE (${cook}, the largest).`;
}
