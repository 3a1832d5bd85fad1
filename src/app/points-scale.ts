/** Scores of one strip: a row a participant, some set aside, and the limits that set them aside. */
export interface PointStrip {
  readonly x: Float64Array;
  /** Row of each point, from 0. */
  readonly row: Int32Array;
  /** 1 = set aside. */
  readonly mark: Uint8Array;
  readonly rows: number;
  readonly log: boolean;
  readonly unit: string;
  /** The line under the axis. */
  readonly axis: string;
  /** Lower and upper limit: one for all rows, or one a row; NaN or null = no limit. */
  readonly limits: { readonly from: Float64Array | null; readonly to: Float64Array | null };
}

export interface PointScale {
  readonly log: boolean;
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly number[];
  /** Place on the axis, 0 to 1. */
  place(value: number): number;
}

function extent(strip: PointStrip): [number, number] {
  let low = Infinity;
  let high = -Infinity;
  const take = (value: number): void => {
    if (!Number.isFinite(value) || (strip.log && value <= 0)) return;
    if (value < low) low = value;
    if (value > high) high = value;
  };
  for (const value of strip.x) take(value);
  for (const limits of [strip.limits.from, strip.limits.to]) if (limits?.length === 1) take(limits[0] as number);
  if (low > high) return strip.log ? [1, 10] : [0, 1];
  return [low, high];
}

function linearTicks(low: number, high: number): number[] {
  const rough = (high - low) / 6;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((each) => each * power).find((each) => each >= rough) ?? 10 * power;
  const ticks: number[] = [];
  for (let n = Math.ceil(low / step); n * step <= high; n++) ticks.push(Number((n * step).toPrecision(12)));
  return ticks;
}

function logTicks(low: number, high: number): number[] {
  const decades = Math.log10(high / low);
  const inside = decades > 4 ? [1] : decades > 0.7 ? [1, 2, 5] : null;
  if (inside === null) return linearTicks(low, high);
  const ticks: number[] = [];
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power++) {
    for (const each of inside) {
      const tick = Number(`${each}e${power}`);
      if (tick >= low && tick <= high) ticks.push(tick);
    }
  }
  return ticks;
}

/** The axis of a strip: its ends a little beyond the scores, ticks at round numbers. */
export function pointScale(strip: PointStrip): PointScale {
  let [low, high] = extent(strip);
  if (strip.log) {
    const pad = low === high ? 1.5 : (high / low) ** 0.03;
    low /= pad;
    high *= pad;
    const span = Math.log(high / low);
    return { log: true, low, high, ticks: logTicks(low, high), place: (value) => Math.log(value / low) / span };
  }
  const pad = low === high ? Math.abs(low) / 2 || 1 : (high - low) * 0.03;
  low -= pad;
  high += pad;
  return { log: false, low, high, ticks: linearTicks(low, high), place: (value) => (value - low) / (high - low) };
}

/** The limit of a row, or null. */
export function limitAt(limits: Float64Array | null, row: number): number | null {
  if (limits === null) return null;
  const value = limits.length === 1 ? limits[0] : limits[row];
  return value === undefined || Number.isNaN(value) ? null : value;
}
