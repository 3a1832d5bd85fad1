import { html, nothing, type TemplateResult } from 'lit';
import { checkLog } from '../worksheet/decision-log.ts';
import type { LogEntry } from '../worksheet/format.ts';
import { copyText } from './cell-actions.ts';
import { LightElement } from './light-element.ts';
import type { Page } from './page.ts';
import { signAs, signedAs } from './signed-as.ts';

/** "28 Nov 2031, 14:05" in the reader's own time zone. */
export function timeWords(when: string): string {
  const date = new Date(when);
  if (Number.isNaN(date.getTime())) return when;
  const options = { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' } as const;
  return date.toLocaleString('en-GB', options);
}

const STATE = { blind: 'while hidden', 'opened-early': 'opened early', sealed: 'after sealing' };

function entryText(entry: LogEntry): string {
  const reason = entry.reason === undefined ? '' : ` Reason: ${entry.reason}.`;
  const who = entry.who === '' ? '' : `, ${entry.who}`;
  return `${timeWords(entry.when)}${who} (${STATE[entry.opening]}): ${entry.what}.${reason}`;
}

/** The decision log as sentences with their time: filtered by text, copied as text. */
export class LogSheet extends LightElement {
  static override properties = { page: { attribute: false }, log: { attribute: false }, filter: { state: true } };
  declare page: Page;
  declare log: readonly LogEntry[];
  declare filter: string;

  constructor() {
    super();
    this.log = [];
    this.filter = '';
  }

  protected override render(): TemplateResult {
    const letters = this.filter.trim().toLowerCase();
    const shown = this.log.filter((entry) => entryText(entry).toLowerCase().includes(letters));
    const check = checkLog(this.log);
    return html`<p class="hint">
        Each entry holds the hash of the one before it. That shows accidental or careless edits; a determined writer can
        rebuild the chain, and the clock is the writer\u2019s own.
      </p>
      ${check.whole ? nothing : html`<p class="problem" role="alert">${check.sentence}</p>`}
      <div class="words fields">
        <label
          >entries with
          <input
            type="search"
            data-part="log-filter"
            .value=${this.filter}
            @input=${(event: Event) => {
              this.filter = (event.target as HTMLInputElement).value;
            }}
        /></label>
        <label
          >new entries are signed
          <input
            type="text"
            maxlength="60"
            placeholder="nobody\u2019s name"
            .value=${signedAs()}
            @change=${(event: Event) => signAs((event.target as HTMLInputElement).value)}
        /></label>
        <button
          type="button"
          class="word"
          data-part="copy-log"
          @click=${() => void copyText(this.page, shown.map(entryText).join('\n'), 'the decision log')}
        >
          copy as text
        </button>
      </div>
      ${shown.length === 0 ? html`<p class="hint">${this.log.length === 0 ? 'Nothing has been decided yet.' : 'No entry has these words.'}</p>` : nothing}
      <ol class="log" data-part="log-entries" reversed start=${shown.length}>
        ${[...shown].reverse().map(
          (entry) =>
            html`<li>
              <time datetime=${entry.when}>${timeWords(entry.when)}</time>
              <p>
                ${entry.what}${entry.reason === undefined ? nothing : html`<br /><span class="hint">Reason: ${entry.reason}</span>`}
                <span class="hint">${STATE[entry.opening]}${entry.who === '' ? '' : `, ${entry.who}`}</span>
              </p>
            </li>`,
        )}
      </ol>`;
  }
}

customElements.define('sf-log', LogSheet);
