import { html, nothing, type TemplateResult } from 'lit';
import type { TableOut } from '../../cells/kind.ts';
import { csvOf, tabbedOf } from './csv.ts';
import { download } from './download.ts';
import { LightElement } from './light-element.ts';

/** A table, folded until asked for; copied as it is shown, taken away as CSV in full precision. */
export class TableView extends LightElement {
  static override properties = { table: { attribute: false }, open: { state: true }, said: { state: true } };
  declare table: TableOut | undefined;
  declare open: boolean;
  declare said: string;

  constructor() {
    super();
    this.table = undefined;
    this.open = false;
    this.said = '';
  }

  protected override render(): TemplateResult | typeof nothing {
    const { table } = this;
    if (table === undefined) return nothing;
    const toggle = (event: Event): void => {
      this.open = (event.target as HTMLDetailsElement).open;
    };
    return html`<details class="table" data-part="table" ?open=${this.open} @toggle=${toggle}>
      <summary>${table.title}</summary>
      ${this.open ? this.#content(table) : nothing}
    </details>`;
  }

  #content(table: TableOut): TemplateResult {
    return html`<div class="scroll" tabindex="0" role="region" aria-label=${table.title}>
        <table>
          <caption class="unseen">
            ${table.title}
          </caption>
          <thead>
            <tr>
              ${table.columns.map(
                (column) => html`<th scope="col" class=${column.numeric ? 'num' : ''}>${column.name}</th>`,
              )}
            </tr>
          </thead>
          <tbody>
            ${table.rows.map(
              (row) =>
                html`<tr>
                  ${row.map((text, i) => html`<td class=${table.columns[i]?.numeric === true ? 'num' : ''}>${text}</td>`)}
                </tr>`,
            )}
          </tbody>
        </table>
      </div>
      <div class="words">
        <button type="button" class="word" @click=${() => this.#copy(table)}>copy</button>
        <button type="button" class="word" @click=${() => this.#save(table)}>CSV</button>
        <span class="hint" role="status">${this.said}</span>
      </div>`;
  }

  async #copy(table: TableOut): Promise<void> {
    try {
      await navigator.clipboard.writeText(tabbedOf(table));
      this.said = 'copied';
    } catch {
      this.said = 'the browser did not let this page copy';
    }
  }

  #save(table: TableOut): void {
    download(new Blob(['\ufeff', csvOf(table)], { type: 'text/csv' }), `${table.title}.csv`);
  }
}

customElements.define('sf-table', TableView);
