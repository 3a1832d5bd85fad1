import { html, nothing, type TemplateResult } from 'lit';
import { counted } from '../data/words.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { safeName } from './download.ts';
import { LightElement } from './light-element.ts';
import { brokenIn } from './log-check.ts';
import type { Page } from './page.ts';
import { type CopyType, saveCopy } from './save-copy.ts';
import { pageAsBuilt } from './save-page.ts';
import { copyForSharing, type ShareChoices } from './share-copy.ts';
import { sharePart } from './share-part.ts';
import { signedAs } from './signed-as.ts';

const AS_IT_IS: ShareChoices = { leaveOut: [], replace: null };

/** Saving a copy: what the file carries, what of it is left out before sharing, and as which file. */
export class SaveSheet extends LightElement {
  static override properties = {
    page: { attribute: false },
    worksheet: { attribute: false },
    choices: { state: true },
  };
  declare page: Page;
  declare worksheet: Worksheet;
  declare choices: ShareChoices;

  constructor() {
    super();
    this.choices = AS_IT_IS;
  }

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
      ${worksheet.data.length === 0 ? nothing : this.#sharing()}
      <h3>As which file</h3>
      ${
        pageAsBuilt() === null
          ? html`<p class="hint">A file that opens by itself can be saved only from the built page.</p>`
          : this.#way('html', 'One file with the program in it: it opens from disk in any browser, without a network.')
      }
      ${this.#way('json', 'The worksheet alone, for opening in Standfast or replaying on the command line.')}`;
  }

  /** What is broken is not carried into a new chain, where it would look whole. */
  #sharing(): TemplateResult {
    const { page, worksheet, choices } = this;
    const broken = brokenIn(worksheet);
    if (broken.length > 0) {
      return html`<p class="problem" role="alert">
        ${broken.join(' ')} The file can be saved only as it is, with every column and code.
      </p>`;
    }
    const change = (next: ShareChoices): void => {
      this.choices = next;
    };
    return sharePart({ worksheet, registry: page.parts.registry, choices, change });
  }

  /** The open worksheet, or the copy made from it where something is left out or replaced. */
  #chosen(): Worksheet {
    const { worksheet, choices } = this;
    if (choices.leaveOut.length === 0 && choices.replace === null) return worksheet;
    const about = { id: crypto.randomUUID(), when: new Date().toISOString(), who: signedAs() };
    return copyForSharing(worksheet, choices, about);
  }

  #way(type: CopyType, hint: string): TemplateResult {
    const { page, worksheet } = this;
    return html`<div class="words">
      <button type="button" class="word main" data-part="save-${type}" @click=${() => void saveCopy(page, this.#chosen(), type)}>
        save ${safeName(worksheet.title)}.standfast.${type}
      </button>
      <span class="hint">${hint}</span>
    </div>`;
  }
}

customElements.define('sf-save', SaveSheet);
