// The shelf on the screen: the register of sheets and templates, a new sheet from a template, a sheet kept as a template.
//
// Not here: what the shelf does (src/store), the bar above it (page.ts).

import './shelf.css';
import { html, type TemplateResult } from 'lit';
import { keyed } from 'lit/directives/keyed.js';
import type { Session } from '../session.ts';
import { FillElement } from './fill.ts';
import { KeepElement } from './keep.ts';
import { RegisterElement } from './register.ts';

customElements.define('ts-register', RegisterElement);
customElements.define('ts-fill', FillElement);
customElements.define('ts-keep', KeepElement);

export function shelfScreen(session: Session): TemplateResult {
  const { route } = session;
  if (route.screen === 'template')
    return html`${keyed(route.id, html`<ts-fill .session=${session} .template=${route.id}></ts-fill>`)}`;
  if (route.screen === 'keep') return html`${keyed(route.id, html`<ts-keep .session=${session} .sheet=${route.id}></ts-keep>`)}`;
  // Drawn with the session, so that what lies on the desk is told as it is now.
  return html`<ts-register .session=${session} .onDesk=${session.id} .offline=${session.offline.state}></ts-register>`;
}
