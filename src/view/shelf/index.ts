// The shelf on the screen: the sheets and templates of this browser.

import { html, type TemplateResult } from 'lit';
import type { Session } from '../session.ts';

export function shelfScreen(_session: Session): TemplateResult {
  return html`<h1>Shelf</h1>`;
}
