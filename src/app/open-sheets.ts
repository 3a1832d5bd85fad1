import { html, type TemplateResult } from 'lit';
import { focusOn } from './cell-actions.ts';
import type { Page } from './page.ts';

/** Opening the conditions without a sealed plan asks for a reason. */
export function openConditionsSheet(page: Page): TemplateResult {
  const open = (reason: string): void => {
    page.show({ sheet: null });
    page.parts.document.openConditions(reason);
  };
  return html`<p>
      The conditions have been hidden while the rules were set. Opening them cannot be taken back, and undo will not
      cross it. The reason stands in the decision log and in the file.
    </p>
    ${reasonForm(open, page.view.openReason ?? '', 'open the conditions')}`;
}

/** A change that would show what is hidden is made only with the conditions open, and asks first. */
export function changeOpensSheet(page: Page): TemplateResult {
  const { document: open } = page.parts;
  const change = (reason: string): void => {
    page.show({ sheet: null });
    open.answer(reason);
  };
  const leave = (): void => {
    open.answer(null);
    page.show({ sheet: null });
    focusOn('main');
  };
  return html`<p data-part="opens-why">${open.asked ?? ''}</p>
    <p>
      So this change counts as opening the conditions early. That cannot be taken back, and undo will not cross it. The
      reason stands in the decision log and in the file.
    </p>
    ${reasonForm(change, '', 'make the change and open the conditions')}
    <div class="words">
      <button type="button" class="word" data-part="leave-hidden" @click=${leave}>leave it as it was</button>
    </div>`;
}

function reasonForm(done: (reason: string) => void, reason: string, words: string): TemplateResult {
  const submit = (event: SubmitEvent): void => {
    event.preventDefault();
    const field = (event.target as HTMLFormElement).elements.namedItem('reason') as HTMLTextAreaElement;
    const given = field.value.trim();
    if (given !== '') done(given);
  };
  return html`<form @submit=${submit}>
    <label class="block"
      >why they are opened without a sealed plan
      <textarea
        name="reason"
        rows="3"
        required
        data-part="reason"
        placeholder="reanalysis of published data"
        .value=${reason}
      ></textarea>
    </label>
    <div class="words"><button type="submit" class="word main" data-part="open-now">${words}</button></div>
  </form>`;
}
