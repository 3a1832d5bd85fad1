import { html, nothing, type TemplateResult } from 'lit';
import { counted } from '../data/words.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { safeName } from './download.ts';
import { LightElement } from './light-element.ts';
import type { Page } from './page.ts';
import { type CopyType, saveCopy } from './save-copy.ts';
import { pageAsBuilt } from './save-page.ts';

/** Saving a copy: what the file carries, and as which file. */
export class SaveSheet extends LightElement {
  static override properties = { page: { attribute: false }, worksheet: { attribute: false } };
  declare page: Page;
  declare worksheet: Worksheet;

  protected override render(): TemplateResult {
    const { worksheet } = this;
    const rows = worksheet.data.reduce((sum, block) => sum + block.rows, 0);
    return html`<p data-part="save-carries">
        The file holds the sentences, the decision log, the results to full precision, and the participants\u2019 data with
        the labels of their conditions: ${counted(rows, 'row')}. Give it only to those who may have them.
      </p>
      ${
        worksheet.opening.state === 'blind'
          ? html`<p class="caution">
              <b>Caution.</b> The conditions are hidden on this page, but the file carries their labels: whoever opens it
              elsewhere can read them.
            </p>`
          : nothing
      }
      ${
        pageAsBuilt() === null
          ? html`<p class="hint">A file that opens by itself can be saved only from the built page.</p>`
          : this.#way('html', 'One file with the program in it: it opens from disk in any browser, without a network.')
      }
      ${this.#way('json', 'The worksheet alone, for opening in Standfast or replaying on the command line.')}`;
  }

  #way(type: CopyType, hint: string): TemplateResult {
    const { page, worksheet } = this;
    return html`<div class="words">
      <button type="button" class="word main" data-part="save-${type}" @click=${() => void saveCopy(page, worksheet, type)}>
        save ${safeName(worksheet.title)}.standfast.${type}
      </button>
      <span class="hint">${hint}</span>
    </div>`;
  }
}

customElements.define('sf-save', SaveSheet);
