import type { Design } from '../../src/analysis/design.ts';
import { participantMeans } from '../../src/analysis/flagging.ts';
import { rng } from '../../src/numerics/rng.ts';
import type { ExclusionDetail } from './kind.ts';

/** What the strip of raw scores draws: one row a participant, in shuffled order, without codes or conditions. */
export interface Strip {
  readonly x: Float64Array;
  readonly row: Int32Array;
  readonly mark: Uint8Array;
  readonly rows: number;
  readonly log: boolean;
  readonly unit: string;
  readonly axis: string;
  readonly limits: { readonly from: Float64Array | null; readonly to: Float64Array | null };
}

/** Order of the participants in every strip: the same each time, and not that of the file. */
const SHUFFLE_SEED = 20;

/** Scores the rule looked at, those it set aside marked, and its limits. */
export function stripOf(
  design: Design,
  detail: ExclusionDetail,
  width: 'trials' | 'participants',
  words: string,
): Strip {
  const place = shuffled(design.participants.length);
  const drawn = width === 'trials' ? trialPoints(design, detail) : meanPoints(design, detail);
  const row = drawn.participant.map((who) => place[who] as number);
  const log = isSkewed(drawn.x);
  return {
    x: drawn.x,
    row,
    mark: drawn.mark,
    rows: design.participants.length,
    log,
    unit: detail.flagged.distances === undefined ? design.roles.unit : '',
    axis: `${words}${log ? ', log scale' : ''}`,
    limits: limitsByRow(design, detail, place),
  };
}

function valuesOf(design: Design, detail: ExclusionDetail): Float64Array {
  const { rule } = detail;
  const name = rule.rule === 'limit' || rule.rule === 'extreme' ? rule.column : design.roles.outcome;
  const column = design.table.columns.find((each) => each.name === name);
  return column?.type === 'number' ? column.values : design.outcome;
}

function trialPoints(design: Design, detail: ExclusionDetail) {
  const values = valuesOf(design, detail);
  const x: number[] = [];
  const participant: number[] = [];
  const mark: number[] = [];
  const aside = new Set(design.steps.at(-1)?.rows ?? []);
  for (let row = 0; row < values.length; row++) {
    const who = design.participant[row] as number;
    if (detail.before.kept[row] !== 1 || who < 0 || Number.isNaN(values[row] as number)) continue;
    x.push(values[row] as number);
    participant.push(who);
    mark.push(aside.has(row) ? 1 : 0);
  }
  return { x: Float64Array.from(x), participant: Int32Array.from(participant), mark: Uint8Array.from(mark) };
}

function meanPoints(design: Design, detail: ExclusionDetail) {
  const means =
    detail.flagged.distances ??
    participantMeans({
      values: valuesOf(design, detail),
      kept: detail.before.kept,
      participant: design.participant,
      participants: design.participants.length,
    });
  const lost = new Set(design.steps.at(-1)?.participants ?? []);
  const present = Array.from(means.keys()).filter((who) => !Number.isNaN(means[who] as number));
  return {
    x: Float64Array.from(present, (who) => means[who] as number),
    participant: Int32Array.from(present),
    mark: Uint8Array.from(present, (who) => (lost.has(design.participants[who] as string) ? 1 : 0)),
  };
}

function limitsByRow(design: Design, detail: ExclusionDetail, place: Int32Array): Strip['limits'] {
  const { limits } = detail.flagged;
  const { rule } = detail;
  if (limits.length === 0) return { from: null, to: null };
  const perParticipant = rule.rule === 'extreme' && rule.on === 'trial' && rule.scope === 'participant';
  if (!perParticipant) {
    const [only] = limits;
    if (limits.length > 1 || !only) return { from: null, to: null };
    return {
      from: only.lower === null ? null : Float64Array.of(only.lower),
      to: only.upper === null ? null : Float64Array.of(only.upper),
    };
  }
  const from = new Float64Array(design.participants.length).fill(NaN);
  const to = from.slice();
  for (const each of limits) {
    const at = place[each.scope] as number;
    if (each.lower !== null) from[at] = each.lower;
    if (each.upper !== null) to[at] = each.upper;
  }
  const some = (values: Float64Array) => values.some((value) => !Number.isNaN(value));
  return { from: some(from) ? from : null, to: some(to) ? to : null };
}

/** Where each participant's row stands: a seeded shuffle (Fisher & Yates). */
function shuffled(n: number): Int32Array {
  const place = Int32Array.from({ length: n }, (_, index) => index);
  const draw = rng(SHUFFLE_SEED);
  for (let i = n - 1; i > 0; i--) {
    const j = draw.below(i + 1);
    const held = place[i] as number;
    place[i] = place[j] as number;
    place[j] = held;
  }
  return place;
}

/** Whether a log scale shows the scores better: all above zero and spread over more than a factor of ten. */
function isSkewed(x: Float64Array): boolean {
  let low = Infinity;
  let high = -Infinity;
  for (const value of x) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return low > 0 && high / low > 10;
}
