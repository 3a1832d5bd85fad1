import type { Checks } from '../../src/analysis/checks.ts';
import { byGroup, differencesOf, participantMeans } from '../../src/analysis/checks-residuals.ts';
import { mean, standardDeviation } from '../../src/numerics/moments.ts';
import { normalDensity, normalLower, normalQuantile } from '../../src/numerics/tails/normal.ts';

/** Most points drawn one by one in a figure. */
const MOST = 1500;

/** Points of the quantile plot, its band, and the ends of its line, all in SDs. */
export function quantilePoints(checks: Checks) {
  const { standard, envelope, outside } = checks;
  if (standard === null) return { points: [], band: [], line: [] };
  const n = standard.length;
  const out = new Set(outside);
  const step = Math.ceil(n / MOST);
  const points = Array.from(standard, (y, place) => ({
    x: normalQuantile((place + 0.625) / (n + 0.25)),
    y,
    out: out.has(place),
  })).filter(({ out: far }, place) => far || place % step === 0 || place === n - 1);
  const band = Array.from(envelope?.expected ?? [], (x, at) => ({
    x,
    low: envelope?.low[at] as number,
    high: envelope?.high[at] as number,
  }));
  const ends = [points[0]?.x ?? 0, points.at(-1)?.x ?? 0];
  return { points, band, line: ends.map((x) => ({ x, y: x })) };
}

/** The same as shares: the share below under the fitted curve against the share below in the sample. */
export function sharePoints(checks: Checks) {
  const { standard, envelope, outside } = checks;
  if (standard === null) return { points: [], band: [], line: [] };
  const n = standard.length;
  const out = new Set(outside);
  const step = Math.ceil(n / MOST);
  const points = Array.from(standard, (z, place) => ({
    x: (place + 0.5) / n,
    y: normalLower(z),
    out: out.has(place),
  })).filter(({ out: far }, place) => far || place % step === 0);
  const band = Array.from(envelope?.places ?? [], (place, at) => ({
    x: (place + 0.5) / n,
    low: normalLower(envelope?.low[at] as number),
    high: normalLower(envelope?.high[at] as number),
  }));
  return {
    points,
    band,
    line: [
      { x: 0, y: 0 },
      { x: 1, y: 1 },
    ],
  };
}

/** What the histogram counts: differences or scores of one group as they are, else residuals. */
export function histogramValues(checks: Checks): Float64Array {
  const { layout, residuals, design } = checks;
  if (layout.groups.length > 1 || design === 'repeated') return residuals.values;
  return design === 'differences' ? differencesOf(layout) : layout.values;
}

/** Counts in bins of a round width, and the fitted normal curve in counts. */
export function histogramRows(checks: Checks) {
  const values = histogramValues(checks);
  const { sd } = checks.residuals;
  if (sd === 0) return { bins: [], curve: [] };
  const middle = mean(values);
  const [low, high] = [values.reduce((a, b) => Math.min(a, b)), values.reduce((a, b) => Math.max(a, b))];
  const width = binWidth(sd, values.length);
  const first = Math.floor(low / width);
  const bins = Array.from({ length: Math.floor(high / width) - first + 1 }, (_, at) => ({
    from: (first + at) * width,
    to: (first + at + 1) * width,
    count: 0,
  }));
  for (const value of values) {
    const bin = bins[Math.min(bins.length - 1, Math.floor(value / width) - first)];
    if (bin) bin.count++;
  }
  const reach = [Math.min(low, middle - 3 * sd), Math.max(high, middle + 3 * sd)] as const;
  const curve = Array.from({ length: 61 }, (_, at) => {
    const x = reach[0] + ((reach[1] - reach[0]) * at) / 60;
    return { x, count: (values.length * width * normalDensity((x - middle) / sd)) / sd };
  });
  return { bins, curve };
}

/** Scott's width for normal samples (1979: 3.49 s n^(-1/3)), rounded down to 1, 2 or 5 times a power of ten. */
function binWidth(sd: number, n: number): number {
  const wanted = 3.49 * sd * n ** (-1 / 3);
  const power = 10 ** Math.floor(Math.log10(wanted));
  const factor = wanted / power;
  return power * (factor >= 5 ? 5 : factor >= 2 ? 2 : 1);
}

/** Distances from each group's mean, and one SD to either side. */
export function groupRows({ layout, residuals }: Checks) {
  const step = Math.ceil(layout.participants.length / MOST);
  const points = Array.from(layout.group, (code, who) => ({
    group: layout.groups[code] as string,
    off: residuals.values[who] as number,
  })).filter((_, who) => who % step === 0);
  const bars = byGroup(residuals.values, layout.group, layout.groups.length).flatMap((own, code) => {
    if (own.length < 2) return [];
    const sd = standardDeviation(own);
    return [{ group: layout.groups[code] as string, low: -sd, high: sd }];
  });
  return { points, bars };
}

/** Each participant's difference at the level of the participant, and the mean difference. */
export function levelPoints({ layout }: Checks) {
  const d = differencesOf(layout);
  const step = Math.ceil(d.length / MOST);
  const points = Array.from(participantMeans(layout), (x, who) => ({ x, y: d[who] as number })).filter(
    (_, who) => who % step === 0,
  );
  return { points, middle: [{ y: mean(d) }] };
}

/** SDs of the differences between two levels with their intervals. */
export function pairRows({ sphericity }: Checks) {
  return (sphericity?.pairs ?? []).map(({ first, second, sd, interval }) => ({
    pair: `${first} \u2212 ${second}`,
    sd,
    low: interval?.[0] ?? sd,
    high: interval?.[1] ?? sd,
  }));
}

/** One score a participant in the order of the file. */
export function orderPoints({ layout }: Checks) {
  return Array.from(layout.values, (y, at) => ({ x: at + 1, y })).slice(0, MOST);
}
