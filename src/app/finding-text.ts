import { decimalsFor, fixed, limits } from '../../cells/numbers.ts';

/** The parts of a Finding that the strip writes; a held one comes from a file and is looked at with care. */
interface WrittenFinding {
  readonly estimate?: unknown;
  readonly interval?: unknown;
  readonly unit?: unknown;
  readonly nullValue?: unknown;
}

function limitOf(value: unknown): number | null {
  return typeof value === 'number' && Number.isFinite(value) ? value : null;
}

/** "−84 ms [−131, −38]"; null where there is no estimate. */
export function findingText(finding: unknown): string | null {
  if (finding === null || typeof finding !== 'object') return null;
  const { estimate, interval, unit } = finding as WrittenFinding;
  if (typeof estimate !== 'number' || !Number.isFinite(estimate)) return null;
  const ends = Array.isArray(interval) ? ([limitOf(interval[0]), limitOf(interval[1])] as const) : null;
  const width = ends !== null && ends[0] !== null && ends[1] !== null ? ends[1] - ends[0] : Math.abs(estimate);
  const decimals = decimalsFor(width);
  const write = (value: number): string => fixed(value, decimals);
  const after = typeof unit === 'string' && unit !== '' ? ` ${unit}` : '';
  return `${write(estimate)}${after}${ends === null ? '' : ` ${limits(ends, write)}`}`;
}
