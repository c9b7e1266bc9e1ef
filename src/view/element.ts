// The base of our elements: drawn into the page itself, because mathematics needs the page's faces and print needs one flow.

import { LitElement } from 'lit';

export class PageElement extends LitElement {
  protected override createRenderRoot(): HTMLElement {
    return this;
  }
}

export const isField = (target: EventTarget | null) =>
  target instanceof HTMLInputElement || target instanceof HTMLSelectElement || target instanceof HTMLTextAreaElement;
