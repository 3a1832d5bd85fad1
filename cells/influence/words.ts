import type { Influence, LeftOut } from '../../src/analysis/influence.ts';
import type { Note, TableOut } from '../kind.ts';
import { count, counted, decimalsFor, fixed, limits, pValue } from '../numbers.ts';

const CHANGE = {
  'loses support': 'take the support away',
  'gains support': 'make the planned row support the claim',
  'changes sign': 'change the sign of the estimate',
  'falls below': 'bring the estimate below the smallest effect of interest',
} as const;

/** How estimates of this chain are written. */
export function writerOf({ full }: Influence): (value: number) => string {
  const [low, high] = full.interval ?? [null, null];
  const width = low !== null && high !== null ? high - low : 4 * (full.se ?? 0);
  const decimals = decimalsFor(width);
  return (value) => fixed(value, decimals);
}

/** The smallest set in one sentence: "exactly" only where every smaller set was tried. */
export function sayFlip(value: Influence): string {
  const { flip, removal, spec, n } = value;
  const change = CHANGE[spec.target];
  if (removal === null) {
    const many = flip.exact ? flip.noneUpTo : flip.triedUpTo;
    return flip.exact
      ? `No set of participants, however large, would ${change}.`
      : `No set of up to ${count(many)} participants was found that would ${change}.`;
  }
  const size = removal.participants.length;
  const who = counted(size, 'participant');
  const share = `of ${count(n)}`;
  if (!flip.exact) {
    const none = flip.noneUpTo > 0 ? `; every set of up to ${count(flip.noneUpTo)} was tried, and none would` : '';
    return `Removing ${who} ${share} is enough to ${change}; fewer may be enough too${none}.`;
  }
  const sets =
    flip.changing === null || flip.sets === null
      ? ''
      : `: ${count(flip.changing)} of the ${count(flip.sets)} sets of that size would`;
  return `Exactly ${who} ${share} would have to go to ${change}${sets}.`;
}

/** What the chain comes to without the set. */
export function sayRemoval(value: Influence): string {
  const { removal, setAside } = value;
  const aside = `The rules set ${counted(setAside, 'participant')} aside altogether.`;
  if (removal === null) return aside;
  const write = writerOf(value);
  const { finding } = removal;
  const unit = finding.unit === '' ? '' : ` ${finding.unit}`;
  const estimate = finding.estimate === null ? 'no estimate' : `${write(finding.estimate)}${unit}`;
  const interval = finding.interval === null ? '' : ` ${limits(finding.interval, write)}`;
  const p = finding.p === null ? '' : `, ${pValue(finding.p)}`;
  const groups = removal.composition.filter((each) => each.group !== '');
  const from =
    groups.length === 0
      ? ''
      : ` They are ${groups.map((each) => `${count(each.count)} from ${each.group}`).join(' and ')}.`;
  return `Without the set that changes most: ${estimate}${interval}${p}.${from} ${aside}`;
}

/** Leave-one-out in one sentence. */
export function saySingle(value: Influence): string {
  const { single, changed, verdict } = value;
  const estimates = single.flatMap((each) => (each.estimate === null ? [] : [each.estimate]));
  if (estimates.length === 0) return 'The planned row has no estimate without any one participant.';
  const ps = single.flatMap((each) => (each.p === null ? [] : [each.p]));
  const write = writerOf(value);
  const unit = value.full.unit === '' ? '' : ` ${value.full.unit}`;
  const range = `from ${write(Math.min(...estimates))} to ${write(Math.max(...estimates))}${unit}`;
  const p = ps.length === 0 ? '' : `, ${pValue(Math.min(...ps))} to ${pValue(Math.max(...ps))}`;
  const judged =
    verdict === null
      ? ''
      : ` ${changed === 0 ? 'No single removal' : `${count(changed)} of the ${count(single.length)} single removals`} would change the verdict (${verdict}).`;
  return `Leaving out one participant at a time, the whole chain run again: estimates ${range}${p}.${judged}`;
}

export function influenceNotes(value: Influence): Note[] {
  const notes: Note[] = [
    {
      type: 'note',
      text: 'A few participants are enough wherever p is near alpha; that alone does not speak against a finding. Removing people because of where they move the result is no rule: this says how far the finding leans on them.',
    },
  ];
  const size = value.removal?.participants.length;
  if (size !== undefined && size <= value.setAside) {
    notes.push({
      type: 'caution',
      text: `The rules set aside ${counted(value.setAside, 'participant')}, and ${count(size)} more would change the claim: the finding leans on who was left in.`,
    });
  }
  if (value.changed > 0) {
    notes.push({
      type: 'caution',
      text: `One participant decides: ${count(value.changed)} of ${count(value.single.length)} could each change the verdict alone.`,
    });
  }
  return notes;
}

/** The five whose removal changes the estimate most, everyone, and the set itself. */
export function influenceTables(value: Influence): TableOut[] {
  const bySize = [...value.single].sort((a, b) => Math.abs(b.change ?? 0) - Math.abs(a.change ?? 0));
  const tables = [
    tableOf(value, 'the five whose removal changes the estimate most', bySize.slice(0, 5)),
    tableOf(value, 'every participant left out in turn', value.single),
  ];
  if (value.removal !== null) {
    tables.push({
      title: 'who is in the set',
      columns: [{ name: 'participant', numeric: false }],
      rows: value.removal.participants.map((each) => [each]),
    });
  }
  return tables;
}

function tableOf(value: Influence, title: string, rows: readonly LeftOut[]): TableOut {
  const write = writerOf(value);
  const shown = (number: number | null) => (number === null ? '' : write(number));
  const names = ['left out', 'estimate', 'interval', 'p', 'change', 'change / SE', 'claim'];
  return {
    title,
    columns: names.map((name) => ({ name, numeric: ['estimate', 'change', 'change / SE'].includes(name) })),
    rows: rows.map((each) => [
      each.participant,
      shown(each.estimate),
      each.interval === null ? '' : limits(each.interval, write),
      each.p === null ? '' : pValue(each.p),
      shown(each.change),
      each.dfbeta === null ? '' : fixed(each.dfbeta, 2),
      each.verdict ?? 'not judged',
    ]),
    raw: rows.map((each) => {
      const [low, high] = each.interval ?? [null, null];
      return [
        each.participant,
        each.estimate,
        `[${low ?? ''}, ${high ?? ''}]`,
        each.p,
        each.change,
        each.dfbeta,
        each.verdict,
      ];
    }),
  };
}
