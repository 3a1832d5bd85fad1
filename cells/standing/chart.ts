import type { Sweep } from '../../src/analysis/sweep.ts';
import type { Settings, ViewContext } from '../kind.ts';
import { count } from '../numbers.ts';

/** Empty places between two groups of the strip. */
const GAP = 3;

/** One line of the strip: where it stands, its interval, and what it says of the claim. */
export interface StripLine {
  readonly x: number;
  readonly estimate: number;
  readonly low: number | null;
  readonly high: number | null;
  readonly verdict: string;
  readonly planned: boolean;
}

/** Rows for the drawing: lines in their groups, labels with counts, the place of the analysis in force. */
export function stripRows(sweep: Sweep, context: ViewContext) {
  const lines: StripLine[] = [];
  const drawn = sweep.groups.map(
    ({ order }) => order.filter((index) => sweep.specifications[index]?.finding.sameUnit).length,
  );
  const places = drawn.reduce((sum, n) => sum + (n === 0 ? 0 : n + GAP), 0);
  const perPlace = context.width / Math.max(1, places);
  const labels: { x: number; label: string }[] = [];
  let at = 0;
  for (const { group, order } of sweep.groups) {
    const members = order.filter((index) => sweep.specifications[index]?.finding.sameUnit);
    if (members.length === 0) continue;
    labels.push({ x: at + (members.length - 1) / 2, label: fittingLabel(group, members.length, perPlace) });
    for (const index of members) {
      const specification = sweep.specifications[index];
      if (!specification || specification.finding.estimate === null) continue;
      const { finding, verdict, planned } = specification;
      const [low, high] = finding.interval ?? [null, null];
      lines.push({ x: at, estimate: finding.estimate as number, low, high, verdict: verdict ?? 'not judged', planned });
      at++;
    }
    at += GAP;
  }
  return { lines: withEdges(lines), labels, ghost: ghostOf(sweep, context, at - GAP) };
}

/** Width of a character of a label, about, in px. */
const CHARACTER = 6.2;

/** Names short enough for a narrow group. */
const SHORT: Readonly<Record<string, string>> = {
  'differences of trimmed means': 'of margins',
  'trimmed means': 'trimmed',
  'winsorized means': 'winsorized',
  'means, separate variances': 'Welch',
  pseudomedians: 'H\u2013L',
  shifts: 'shift',
};

/** "trimmed means \u00b7 21", or what of it fits over the group's own places. */
function fittingLabel(group: string, members: number, perPlace: number): string {
  const room = (members + GAP - 0.5) * perPlace;
  const wordings = [group, SHORT[group] ?? group].map((words) => `${words} \u00b7 ${count(members)}`);
  return [...wordings, count(members)].find((words) => words.length * CHARACTER <= room) ?? '';
}

/** A one-sided interval runs to the edge of what is drawn. */
function withEdges(lines: StripLine[]): StripLine[] {
  const numbers = lines
    .flatMap((line) => [line.estimate, line.low, line.high])
    .filter((each): each is number => each !== null);
  const [least, most] = [Math.min(0, ...numbers), Math.max(0, ...numbers)];
  return lines.map((line) => ({
    ...line,
    low: line.low === null && line.high !== null ? least : line.low,
    high: line.high === null && line.low !== null ? most : line.high,
  }));
}

function ghostOf(sweep: Sweep, context: ViewContext, end: number) {
  const held = context.reference?.finding as
    | { estimate?: unknown; interval?: unknown; unit?: unknown }
    | null
    | undefined;
  if (!held || held.unit !== sweep.unit || typeof held.estimate !== 'number' || !Array.isArray(held.interval))
    return [];
  const [low, high] = held.interval as (number | null)[];
  return [{ from: -1, to: end, low: low ?? held.estimate, high: high ?? held.estimate, estimate: held.estimate }];
}

/** Vega-Lite: one thin line for each defensible analysis, sorted within its quantity; verdict by colour and by shape. */
export function stripChart(context: ViewContext): Settings {
  const x = { type: 'quantitative', axis: null, scale: { zero: false, nice: false, padding: 8 } };
  const y = { type: 'quantitative', scale: { zero: true, nice: false, padding: 2 }, axis: null };
  const scale = { domain: ['supported', 'undecided', 'contradicted', 'not judged'] };
  const verdict = { field: 'verdict', type: 'nominal', legend: null };
  const colour = {
    ...verdict,
    scale: { ...scale, range: ['var(--hold)', 'var(--loose)', 'var(--aside)', 'var(--soft)'] },
  };
  const shape = { ...verdict, scale: { ...scale, range: ['circle', 'diamond', 'triangle-up', 'cross'] } };
  const spec = {
    width: Math.max(160, context.width),
    height: 58,
    padding: { left: 2, right: 2, top: 2, bottom: 18 },
    autosize: { type: 'none' },
    layer: [
      {
        data: { name: 'ghost' },
        mark: { type: 'rect', opacity: 0.28 },
        encoding: {
          x: { ...x, field: 'from' },
          x2: { field: 'to' },
          y: { ...y, field: 'low' },
          y2: { field: 'high' },
          color: { value: 'var(--axis)' },
        },
      },
      {
        data: { name: 'lines' },
        transform: [{ filter: 'datum.planned' }],
        mark: { type: 'rule', strokeWidth: 9, opacity: 0.22 },
        encoding: { x: { ...x, field: 'x' }, color: { value: 'var(--ink)' } },
      },
      {
        data: { values: [{ zero: 0 }] },
        mark: { type: 'rule', strokeDash: [3, 3] },
        encoding: { y: { ...y, field: 'zero' }, color: { value: 'var(--soft)' } },
      },
      {
        data: { name: 'lines' },
        transform: [{ filter: 'datum.low !== null' }],
        mark: { type: 'rule', strokeWidth: 1.6, opacity: 0.75 },
        encoding: { x: { ...x, field: 'x' }, y: { ...y, field: 'low' }, y2: { field: 'high' }, color: colour },
      },
      {
        data: { name: 'lines' },
        mark: { type: 'point', filled: true, opacity: 1, size: 16 },
        encoding: { x: { ...x, field: 'x' }, y: { ...y, field: 'estimate' }, color: { value: 'var(--ink)' }, shape },
      },
      {
        data: { name: 'labels' },
        mark: { type: 'text', baseline: 'top', fontSize: 11, align: 'center' },
        encoding: {
          x: { ...x, field: 'x' },
          y: { value: 62 },
          text: { field: 'label', type: 'nominal' },
          color: { value: 'var(--soft)' },
        },
      },
    ],
  };
  return spec as unknown as Settings;
}
