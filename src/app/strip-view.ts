import { html, nothing, type TemplateResult } from 'lit';
import type { Computed, ViewContext } from '../../cells/kind.ts';
import { count } from '../../cells/numbers.ts';
import type { CellState } from '../engine/cell-state.ts';
import { computedOf } from './cell-model.ts';
import { LightElement } from './light-element.ts';
import type { Page } from './page.ts';
import type { VeilBound } from './veil-bound.ts';
import { STANDING } from './wiring.ts';

/** What the standing strip shows. */
export interface StripModel {
  /** The claim in words, or a sentence that says that there is none. */
  readonly claim: string;
  readonly hasClaim: boolean;
  /** "−84 ms [−131, −38]", or null where it is not worked out. */
  readonly now: string | null;
  readonly reference: string | null;
  readonly blind: boolean;
  /** What may be told while the conditions are hidden, or null. */
  readonly bound: VeilBound | null;
  /** State of the hidden standing cell; null where there is none. */
  readonly state: CellState | null;
  readonly context: ViewContext | null;
  readonly say: string | null;
  /** The joint inference over the strip: what it says, or the share done of it; null where there is none. */
  readonly joint: { readonly say: string | null; readonly progress: number } | null;
  readonly waitingFor: string;
}

/** Does the claim stand fast? The claim, its estimate now and as held, every defensible analysis, and their counts. */
export class StripView extends LightElement {
  static override properties = {
    model: { attribute: false },
    page: { attribute: false },
    line: { type: Boolean },
  };
  declare model: StripModel;
  declare page: Page;
  /** Folded to one line. */
  declare line: boolean;

  constructor() {
    super();
    this.line = false;
  }

  protected override render(): TemplateResult {
    const { model } = this;
    if (this.line) {
      return html`<p class="strip-line" data-part="strip">
        <span class="serif">${model.claim}</span> ${this.#now()}
        ${model.say === null ? nothing : html`<span class="strip-say">${verdicts(model.say)}</span>`}
      </p>`;
    }
    return html`<section class="standing" data-part="strip" aria-label="standing strip">
      <div class="claim serif"><p data-part="claim">${model.claim}</p>${this.#now()}</div>
      <div class="strip-chart" data-part="strip-chart">${this.#chart()}</div>
      <div class="count" data-part="strip-counts">${this.#counts()}</div>
    </section>`;
  }

  #now(): TemplateResult | typeof nothing {
    const { now, reference, blind, bound, hasClaim } = this.model;
    if (!hasClaim) return nothing;
    if (blind) {
      const width = bound === null ? ' while the conditions are hidden' : `; at most about ${bound.width}`;
      return html`<small data-part="hidden-now">estimate hidden${width}</small>`;
    }
    const letGo = html`<button
      type="button"
      class="word small"
      data-part="let-go"
      aria-label="let the reference go"
      @click=${() => this.page.parts.document.hold(null)}
    >
      let go
    </button>`;
    const held = reference === null ? nothing : html` \u00b7 reference: ${reference} ${this.line ? nothing : letGo}`;
    return html`<small data-part="now">now: ${now ?? 'not worked out'}${held}</small>`;
  }

  #chart(): TemplateResult | typeof nothing {
    const { model, page } = this;
    if (model.state === null) return nothing;
    if (model.blind || model.state.status === 'veiled') {
      return html`<div class="veil-strip" role="img" aria-label="hidden while the conditions are hidden"></div>`;
    }
    const computed = computedOf(model.state);
    const view = page.parts.views[STANDING];
    if (computed === undefined || view === undefined || model.context === null) return this.#progress();
    const old = model.state.status !== 'fresh' && model.state.status !== 'computing';
    return html`<div class=${old ? 'was' : ''}>${view(computed as Computed<never, never>, model.context)}</div>
      ${model.state.status === 'computing' ? this.#progress() : nothing}`;
  }

  #progress(): TemplateResult | typeof nothing {
    const { state } = this.model;
    if (state?.status !== 'computing') return nothing;
    return html`<progress class="strip-progress" max="1" .value=${state.progress} aria-label="analyses run"></progress>`;
  }

  /** The counts are there first; the joint p follows. */
  #joint(): TemplateResult | typeof nothing {
    const { joint } = this.model;
    if (joint === null) return nothing;
    if (joint.say !== null) return html`<span class="joint" data-part="strip-joint">${joint.say}</span>`;
    return html`<span class="joint quiet" data-part="strip-joint">
      relabelling \u2026
      <progress max="1" .value=${joint.progress} aria-label="relabellings run"></progress>
    </span>`;
  }

  #counts(): TemplateResult | string | typeof nothing {
    const { state, say, waitingFor, blind, bound } = this.model;
    if (state === null) return nothing;
    if (blind) return blindCounts(bound);
    if (state.status === 'failed') return html`<span class="failed">${state.sentence}</span>`;
    if (state.status === 'waiting') return `Waiting for ${waitingFor}.`;
    if (say !== null) return html`${verdicts(say)}${this.#joint()}`;
    return state.status === 'computing' ? 'Running every defensible analysis \u2026' : nothing;
  }
}

/** Refused and merged analyses are not told apart: which ones they are may depend on the conditions. */
function blindCounts(bound: VeilBound | null): string {
  if (bound === null || bound.analyses === null) return 'No analysis has looked at the conditions yet.';
  return `${count(bound.analyses)} analyses are planned. None has looked at the ${bound.factors} yet.`;
}

/** The verdicts in a sentence are told by weight and colour as well as by their words. */
export function verdicts(text: string): TemplateResult {
  const parts = text.split(/((?:supported|undecided|contradicted) in (?:\d[\d,]*\d|\d))/i);
  return html`${parts.map((part, i) => {
    if (i % 2 === 0) return part;
    const none = /\b0$/.test(part);
    return html`<b class=${none ? 'plain' : (part.split(' ')[0] ?? '').toLowerCase()}>${part}</b>`;
  })}`;
}

customElements.define('sf-strip', StripView);
