import { html, nothing, type TemplateResult } from 'lit';
import type { LogEntry } from '../worksheet/format.ts';
import { copyText } from './cell-actions.ts';
import { csvOf } from './csv.ts';
import { download, safeName } from './download.ts';
import { LightElement } from './light-element.ts';
import { brokenIn, wholeWords } from './log-check.ts';
import { entryText, filtered, logTable, logText, STATE, signersOf, timeWords, WHAT_IT_PROVES } from './log-words.ts';
import type { Page } from './page.ts';
import { signAs, signedAs } from './signed-as.ts';

/** The decision log as sentences with their time: checked, filtered by text and signer, taken away as text or CSV. */
export class LogSheet extends LightElement {
  static override properties = {
    page: { attribute: false },
    log: { attribute: false },
    filter: { state: true },
    who: { state: true },
  };
  declare page: Page;
  declare log: readonly LogEntry[];
  declare filter: string;
  /** Only entries of this signer; null = everyone's. */
  declare who: string | null;

  constructor() {
    super();
    this.log = [];
    this.filter = '';
    this.who = null;
  }

  protected override render(): TemplateResult {
    const shown = filtered(this.log, this.filter, this.who);
    const broken = brokenIn(this.page.worksheet);
    return html`<p class="hint">${WHAT_IT_PROVES}</p>
      ${
        broken.length === 0
          ? html`<p class="hint hashes" data-part="log-whole">${wholeWords(this.page.worksheet)}</p>`
          : broken.map((sentence) => html`<p class="problem" role="alert">${sentence}</p>`)
      }
      ${this.#fields()} ${this.#away(shown)}
      ${shown.length === 0 ? html`<p class="hint">${this.log.length === 0 ? 'Nothing has been decided yet.' : 'No entry is like that.'}</p>` : nothing}
      <ol class="log" data-part="log-entries" reversed start=${shown.length}>
        ${[...shown].reverse().map(entryView)}
      </ol>`;
  }

  #fields(): TemplateResult {
    return html`<div class="words fields">
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
      ${this.#signers()}
      <label
        >new entries are signed
        <input
          type="text"
          maxlength="60"
          data-part="sign-as"
          placeholder="nobody\u2019s name"
          .value=${signedAs()}
          @change=${(event: Event) => signAs((event.target as HTMLInputElement).value)}
      /></label>
    </div>`;
  }

  #signers(): TemplateResult | typeof nothing {
    const signers = signersOf(this.log);
    if (signers.length < 2) return nothing;
    const choose = (event: Event): void => {
      const at = Number((event.target as HTMLSelectElement).value);
      this.who = at < 0 ? null : (signers[at] ?? null);
    };
    return html`<label
      >signed by
      <select data-part="log-who" @change=${choose}>
        <option value="-1" ?selected=${this.who === null}>anyone</option>
        ${signers.map(
          (name, i) =>
            html`<option value=${i} ?selected=${this.who === name}>${name === '' ? 'nobody\u2019s name' : name}</option>`,
        )}
      </select></label
    >`;
  }

  /** Copies what is shown; the files hold every entry, because a chain with gaps proves nothing. */
  #away(shown: readonly LogEntry[]): TemplateResult {
    const { page } = this;
    const save = (text: string, type: string, ending: string): void =>
      download(new Blob([text], { type }), `${safeName(page.worksheet.title)} decision log.${ending}`);
    const csv = (): void => save(`\ufeff${csvOf(logTable(this.log))}`, 'text/csv', 'csv');
    return html`<div class="words">
      <button
        type="button"
        class="word"
        data-part="copy-log"
        @click=${() => void copyText(page, shown.map((entry) => entryText(entry)).join('\n'), 'the decision log')}
      >
        copy as text
      </button>
      <button type="button" class="word" data-part="log-text" @click=${() => save(logText(page.worksheet), 'text/plain', 'txt')}>
        save all of it as text
      </button>
      <button type="button" class="word" data-part="log-csv" @click=${csv}>save all of it as CSV</button>
    </div>`;
  }
}

function entryView(entry: LogEntry): TemplateResult {
  return html`<li>
    <time datetime=${entry.when}>${timeWords(entry.when)}</time>
    <p>
      ${entry.what}${entry.reason === undefined ? nothing : html`<br /><span class="hint">Reason: ${entry.reason}</span>`}
      <span class="hint">${STATE[entry.opening]}${entry.who === '' ? '' : `, ${entry.who}`}</span>
    </p>
  </li>`;
}

customElements.define('sf-log', LogSheet);
