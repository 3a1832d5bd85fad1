import { html, type TemplateResult } from 'lit';
import type { Computed, ViewContext } from '../kind.ts';

/** Plain Markdown: headings, lists, code, strong and emphasis. No HTML; an address stays text. */
export function noteView({ detail }: Computed<null, { readonly text: string }>, _context: ViewContext): TemplateResult {
  return html`<div class="note-text">${blocks(detail.text).map(block)}</div>`;
}

function blocks(text: string): string[] {
  return text
    .split(/\n{2,}/)
    .map((each) => each.trim())
    .filter((each) => each !== '');
}

function block(text: string): TemplateResult {
  const lines = text.split('\n');
  const heading = /^#{1,3} (.*)$/.exec(lines[0] ?? '');
  if (heading && lines.length === 1) return html`<h4>${inline(heading[1] ?? '')}</h4>`;
  if (lines.every((line) => /^[-*] /.test(line))) {
    return html`<ul>${lines.map((line) => html`<li>${inline(line.slice(2))}</li>`)}</ul>`;
  }
  if (lines.every((line) => /^\d+\. /.test(line))) {
    return html`<ol>${lines.map((line) => html`<li>${inline(line.replace(/^\d+\. /, ''))}</li>`)}</ol>`;
  }
  if (lines[0] === '```' && lines.at(-1) === '```') return html`<pre>${lines.slice(1, -1).join('\n')}</pre>`;
  return html`<p>${inline(lines.join(' '))}</p>`;
}

/** `code`, **strong** and *emphasis*; everything else is text. */
function inline(text: string): (string | TemplateResult)[] {
  return text.split(/(`[^`]+`|\*\*[^*]+\*\*|\*[^*]+\*)/).map((part) => {
    if (/^`[^`]+`$/.test(part)) return html`<code>${part.slice(1, -1)}</code>`;
    if (/^\*\*[^*]+\*\*$/.test(part)) return html`<strong>${part.slice(2, -2)}</strong>`;
    if (/^\*[^*]+\*$/.test(part)) return html`<em>${part.slice(1, -1)}</em>`;
    return part;
  });
}
