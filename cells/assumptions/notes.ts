import { type CautionId, cautionText } from '../../src/analysis/cautions.ts';
import type { Checks } from '../../src/analysis/checks.ts';
import type { Note } from '../kind.ts';
import { count, levelPercent } from '../numbers.ts';
import { quantityAtLength } from './words.ts';

/** What the margin says beside the checks. */
export function checkNotes(checks: Checks): Note[] {
  const { layout, options, envelope } = checks;
  const unit = layout.unit === '' ? '' : `, in ${layout.unit}`;
  const notes: Note[] = [
    {
      type: 'note',
      text: `Looked at: ${quantityAtLength(checks)}${unit}; ${levelPercent(1 - options.alpha)} intervals.`,
    },
    {
      type: 'note',
      text: 'In order of weight (common practice): independence, then equal spread where groups differ in size, then outliers and heavy tails, then skew, and the exact shape last. A test says little where n is small, and too much where it is large.',
    },
  ];
  if (layout.left.length > 0) {
    const named = layout.left.slice(0, 3).map(({ participant, why }) => `${layout.noun} ${participant} (${why})`);
    const more = layout.left.length - named.length;
    notes.push({ type: 'note', text: `Not looked at: ${named.join('; ')}${more > 0 ? `; and ${more} more` : ''}.` });
  }
  for (const id of refused(checks)) notes.push({ type: 'note', id, text: cautionText(id, factsOf(id, checks)) });
  if (envelope !== null) {
    notes.push({
      type: 'note',
      text: `Band and shares are simulated with seed ${options.seed}: ${count(envelope.simulations)} normal samples of this design for the band (Myllym\u00e4ki et al. 2017), ${count(options.runs ?? 1000)} studies for each departure; \u00b1 is two standard errors.`,
    });
  }
  return notes;
}

/** What is not offered here, and says why. */
function refused({ design, layout }: Checks): CautionId[] {
  if (design === 'groups') return ['R8'];
  if (design === 'differences') return ['R6', 'R8'];
  return layout.groups.length > 1 ? ['R8'] : [];
}

function factsOf(id: CautionId, checks: Checks): Readonly<Record<string, string>> {
  const { layout, design } = checks;
  if (id === 'R6') return { levels: layout.columns.join(' and ') };
  const what = design === 'groups' || layout.groups.length > 1 ? 'groups' : 'conditions';
  return { what, drawn: quantityAtLength(checks) };
}
