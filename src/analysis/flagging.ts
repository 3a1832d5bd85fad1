/**
 * Which rows a rule flags. The functions for blind rules take scores, marks and participants: they have no parameter
 * through which a condition could reach them. One function, flagExtremeByCondition, takes the condition, and says so.
 */
import { judgeScope } from './judge-scope.ts';
import { judgeTogether } from './judge-together.ts';
import type { ExtremeRule, KeptShareRule, LimitRule } from './rules.ts';

/** Limits of one scope: a score strictly outside them is set aside, one exactly on a limit is kept. */
export interface ScopeLimits {
  /** Code of the scope: participant, condition, or 0 where all scores are pooled. */
  readonly scope: number;
  readonly lower: number | null;
  readonly upper: number | null;
  /** Scores in this scope. */
  readonly n: number;
  /** Why there are no limits here. */
  readonly reason?: string;
  /** A repeated rule: how often it looked, and how many scores it set aside in its first pass and in all. */
  readonly passes?: { readonly count: number; readonly first: number; readonly total: number };
}

/** What a rule flagged, and the limits it used. */
export interface Flagged {
  /** One mark a row; 1 = set aside by this rule. */
  readonly rows: Uint8Array;
  readonly limits: readonly ScopeLimits[];
  /** Measure MCD: distance of each participant from the middle of all; NaN for a participant without one. */
  readonly distances?: Float64Array;
}

/** Scores a rule may look at while the conditions are hidden: no field of it carries a condition. */
export interface BlindScores {
  readonly values: Float64Array;
  readonly kept: Uint8Array;
  readonly participant: Int32Array;
  readonly participants: number;
  /** Measure MCD: the values of every column judged together. */
  readonly together?: readonly Float64Array[];
}

/** A fixed limit on trials, or on each participant's mean of a column. Takes no condition. */
export function flagLimit(scores: BlindScores, rule: LimitRule): Flagged {
  const rows = new Uint8Array(scores.values.length);
  const { limit } = rule;
  const limits: ScopeLimits[] = [
    {
      scope: 0,
      lower: rule.side === 'below' ? limit : null,
      upper: rule.side === 'above' ? limit : null,
      n: countKept(scores.kept),
    },
  ];
  if (limit === null) return { rows, limits };
  const outside = (value: number) => (rule.side === 'below' ? value < limit : value > limit);
  if (rule.on === 'trial') {
    for (let row = 0; row < rows.length; row++) if (outside(scores.values[row] as number)) rows[row] = 1;
    return { rows, limits };
  }
  const means = participantMeans(scores);
  for (let row = 0; row < rows.length; row++) {
    const who = scores.participant[row] as number;
    if (who >= 0 && outside(means[who] as number)) rows[row] = 1;
  }
  return { rows, limits };
}

/** Distance from the middle of all scores, or of the same participant's. Takes no condition. */
export function flagExtremeBlind(scores: BlindScores, rule: ExtremeRule): Flagged {
  if (rule.measure === 'MCD') return flagTogether(scores, rule);
  if (rule.on === 'participant') return flagParticipants(scores, new Int32Array(scores.participants), 1, rule);
  const scope = rule.scope === 'participant' ? scores.participant : new Int32Array(scores.values.length);
  return flagTrials(scores, scope, rule.scope === 'participant' ? scores.participants : 1, rule);
}

/** The same with scopes that split the conditions: allowed only once the conditions are open. */
export function flagExtremeByCondition(
  scores: BlindScores,
  condition: { readonly codes: Int32Array; readonly count: number; readonly perParticipant: Int32Array },
  rule: ExtremeRule,
): Flagged {
  if (rule.on === 'participant') return flagParticipants(scores, condition.perParticipant, condition.count, rule);
  if (rule.scope === 'condition') return flagTrials(scores, condition.codes, condition.count, rule);
  const scope = condition.codes.map((code, row) => {
    const who = scores.participant[row] as number;
    return code < 0 || who < 0 ? -1 : who * condition.count + code;
  });
  return flagTrials(scores, scope, scores.participants * condition.count, rule);
}

function flagTrials(scores: BlindScores, scope: Int32Array, scopes: number, rule: ExtremeRule): Flagged {
  const flags = new Uint8Array(scores.values.length);
  const { gathered, rows, start } = gather(scores, scope, scopes);
  const limits: ScopeLimits[] = [];
  for (let each = 0; each < scopes; each++) {
    const from = start[each] as number;
    const values = gathered.subarray(from, start[each + 1] as number);
    if (values.length === 0) continue;
    const judged = judgeScope(values, each, rule);
    limits.push(judged.limits);
    for (let i = 0; i < values.length; i++) if (judged.flags[i] === 1) flags[rows[from + i] as number] = 1;
  }
  return { rows: flags, limits };
}

function flagParticipants(scores: BlindScores, group: Int32Array, groups: number, rule: ExtremeRule): Flagged {
  const means = participantMeans(scores);
  const limits: ScopeLimits[] = [];
  const out = new Uint8Array(scores.participants);
  for (let each = 0; each < groups; each++) {
    const members: number[] = [];
    for (let who = 0; who < means.length; who++) {
      if (group[who] === each && !Number.isNaN(means[who] as number)) members.push(who);
    }
    if (members.length === 0) continue;
    const values = Float64Array.from(members, (who) => means[who] as number);
    const judged = judgeScope(values, each, rule);
    limits.push(judged.limits);
    members.forEach((who, i) => {
      out[who] = judged.flags[i] as number;
    });
  }
  return { rows: rowsOf(scores, out), limits };
}

/** Participants by their means of several columns at once; one without a kept value in some column is not judged. */
function flagTogether(scores: BlindScores, rule: ExtremeRule): Flagged {
  const means = (scores.together ?? [scores.values]).map((values) => participantMeans({ ...scores, values }));
  const members: number[] = [];
  for (let who = 0; who < scores.participants; who++) {
    if (means.every((column) => !Number.isNaN(column[who] as number))) members.push(who);
  }
  const columns = means.map((column) => Float64Array.from(members, (who) => column[who] as number));
  const judged = judgeTogether(columns, rule);
  const out = new Uint8Array(scores.participants);
  const distances = new Float64Array(scores.participants).fill(NaN);
  members.forEach((who, i) => {
    out[who] = judged.flags[i] as number;
    distances[who] = judged.distances[i] as number;
  });
  return { rows: rowsOf(scores, out), limits: [judged.limits], distances };
}

/** The rows of the participants marked. */
function rowsOf(scores: BlindScores, out: Uint8Array): Uint8Array {
  return Uint8Array.from(scores.participant, (who) => (who >= 0 ? (out[who] as number) : 0));
}

/** Kept scores and their rows sorted into scopes (counting sort): scope s is gathered[start[s] .. start[s + 1]). */
function gather(scores: BlindScores, scope: Int32Array, scopes: number) {
  const start = new Int32Array(scopes + 1);
  const usable = (row: number) =>
    scores.kept[row] === 1 && (scope[row] as number) >= 0 && !Number.isNaN(scores.values[row] as number);
  for (let row = 0; row < scope.length; row++) {
    if (usable(row)) start[(scope[row] as number) + 1] = (start[(scope[row] as number) + 1] as number) + 1;
  }
  for (let each = 0; each < scopes; each++) start[each + 1] = (start[each + 1] as number) + (start[each] as number);
  const next = start.slice();
  const gathered = new Float64Array(start[scopes] as number);
  const rows = new Int32Array(gathered.length);
  for (let row = 0; row < scope.length; row++) {
    if (!usable(row)) continue;
    const at = next[scope[row] as number] as number;
    gathered[at] = scores.values[row] as number;
    rows[at] = row;
    next[scope[row] as number] = at + 1;
  }
  return { gathered, rows, start };
}

/** Mean of each participant's kept scores; NaN for a participant without any. */
export function participantMeans(scores: BlindScores): Float64Array {
  const sum = new Float64Array(scores.participants);
  const n = new Int32Array(scores.participants);
  for (let row = 0; row < scores.values.length; row++) {
    const who = scores.participant[row] as number;
    const value = scores.values[row] as number;
    if (scores.kept[row] !== 1 || who < 0 || Number.isNaN(value)) continue;
    sum[who] = (sum[who] as number) + value;
    n[who] = (n[who] as number) + 1;
  }
  return sum.map((total, who) => total / (n[who] as number));
}

/** A participant with fewer than a share of the rows read still in. Takes no condition. */
export function flagKeptShare(
  kept: Uint8Array,
  participant: Int32Array,
  participants: number,
  rule: KeptShareRule,
): Flagged {
  const rows = new Uint8Array(kept.length);
  if (rule.least === null) return { rows, limits: [] };
  const read = new Int32Array(participants);
  const left = new Int32Array(participants);
  for (let row = 0; row < kept.length; row++) {
    const who = participant[row] as number;
    if (who < 0) continue;
    read[who] = (read[who] as number) + 1;
    if (kept[row] === 1) left[who] = (left[who] as number) + 1;
  }
  for (let row = 0; row < kept.length; row++) {
    const who = participant[row] as number;
    // Counts are compared as whole numbers, so that 70 % of 20 is 14 exactly.
    if (who >= 0 && (left[who] as number) * 100 < rule.least * (read[who] as number)) rows[row] = 1;
  }
  return { rows, limits: [] };
}

function countKept(kept: Uint8Array): number {
  let count = 0;
  for (const mark of kept) count += mark;
  return count;
}
