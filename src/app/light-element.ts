import { LitElement } from 'lit';

/** A part of the page that renders into the page itself: one style sheet, one tree for readers and for tests. */
export class LightElement extends LitElement {
  protected override createRenderRoot(): HTMLElement {
    return this;
  }
}
