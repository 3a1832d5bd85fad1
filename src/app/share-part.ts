import { html, nothing, type TemplateResult } from 'lit';
import type { Registry } from '../../cells/kind.ts';
import { counted, listed } from '../data/words.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { newCodes, type ShareChoices, textsWithCodes } from './share-copy.ts';
import { type ColumnLook, columnLooks, participantColumns, usedOtherwise } from './share-look.ts';

/** What is chosen in the part about sharing, and how it is changed. */
export interface Sharing {
  readonly worksheet: Worksheet;
  readonly registry: Registry;
  readonly choices: ShareChoices;
  change(choices: ShareChoices): void;
}

/** Before a file is given away: columns that look identifying can be left out, participant codes replaced. */
export function sharePart(sharing: Sharing): TemplateResult {
  const looks = columnLooks(sharing.worksheet, sharing.registry);
  const telling = looks.filter(({ why }) => why !== null);
  const others = looks.filter(({ why }) => why === null);
  const list = (columns: readonly ColumnLook[]): TemplateResult =>
    html`<ul class="kept">
      ${columns.map((look) => columnLine(sharing, look))}
    </ul>`;
  return html`<h3>Before sharing</h3>
    <div data-part="identifying">
      ${
        telling.length === 0
          ? html`<p class="hint">No column looks identifying by its name or its values. Look for yourself: this is a guess.</p>`
          : html`<p class="hint">These columns look identifying; others may be:</p>
              ${list(telling)}`
      }
    </div>
    ${codesPart(sharing)}
    ${
      others.length === 0
        ? nothing
        : html`<details class="block">
            <summary>${counted(others.length, 'other column')}</summary>
            ${list(others)}
          </details>`
    }
    ${changedWords(sharing.choices)}`;
}

function columnLine({ choices, change }: Sharing, { block, file, column, why, usedBy }: ColumnLook): TemplateResult {
  const isThis = (each: { block: string; column: string }): boolean => each.block === block && each.column === column;
  const toggle = (event: Event): void => {
    const rest = choices.leaveOut.filter((each) => !isThis(each));
    const out = (event.target as HTMLInputElement).checked;
    change({ ...choices, leaveOut: out ? [...rest, { block, column }] : rest });
  };
  return html`<li>
    <label
      ><input
        type="checkbox"
        data-column=${column}
        .checked=${choices.leaveOut.some(isThis)}
        ?disabled=${usedBy !== null}
        @change=${toggle}
      />
      leave out ${column} <span class="hint">of ${file}</span></label
    >
    <span class="hint">${[why, usedBy === null ? null : `it stays, because ${usedBy} uses it`].filter((part) => part !== null).join('; ')}</span>
  </li>`;
}

function codesPart({ worksheet, registry, choices, change }: Sharing): TemplateResult | typeof nothing {
  const columns = participantColumns(worksheet);
  const [column] = columns;
  if (column === undefined) return nothing;
  const user = usedOtherwise(worksheet, registry, column);
  if (columns.length > 1 || user !== null) {
    const why =
      user === null ? `participants stand in several columns (${listed(columns)})` : `${user} uses ${column}, too`;
    return html`<p class="hint">The participant codes cannot be replaced here: ${why}.</p>`;
  }
  const codes = newCodes(worksheet.data, column);
  const named = textsWithCodes(worksheet, codes);
  const toggle = (event: Event): void =>
    change({ ...choices, replace: (event.target as HTMLInputElement).checked ? column : null });
  return html`<label class="block"
      ><input type="checkbox" data-part="replace-codes" .checked=${choices.replace === column} @change=${toggle} />
      replace the ${counted(codes.size, 'participant code')} in ${column} by ${rangeWords([...codes.values()])}, in the order
      of first appearance</label
    >
    ${
      choices.replace === null
        ? nothing
        : html`<p class="hint">
            What was typed stays as it is: titles, reasons, notes, names in the log.
            ${named.length === 0 ? nothing : html`<b>A code stands in ${listed(named, 10)}.</b>`}
          </p>`
    }`;
}

function rangeWords(codes: readonly string[]): string {
  return codes.length < 2 ? codes.join('') : `${codes[0]} to ${codes.at(-1)}`;
}

function changedWords({ leaveOut, replace }: ShareChoices): TemplateResult | typeof nothing {
  if (leaveOut.length === 0 && replace === null) return nothing;
  return html`<p class="hint" data-part="share-says">
    The file then holds a copy whose results are worked out anew and whose decision log begins a new chain; its first
    entry says what was done. The worksheet here stays as it is.
  </p>`;
}
