// The bar over a screen: what lies there, how it stands, how far it is kept, and the acts on all of it.
//
// 1. Undo and redo keep the focus when nothing is left to take back: they are marked as disabled, not taken out of the order of keys.
// Not here: the acts themselves (session.ts, desk.ts), what is told (notices.ts).

import { html, nothing, type TemplateResult } from 'lit';
import type { Desk } from './desk.ts';
import { mark } from './mark.ts';
import { keptWord } from './notices.ts';
import type { Session } from './session.ts';
import { words } from './text.ts';
import { countLines } from './waiting.ts';

export interface BarActs {
  goTo(cell: string): void;
  toOpenPoints(): void;
  showKeys(): void;
}

/** Over a sheet. */
export function bar(session: Session, desk: Desk, acts: BarActs): TemplateResult {
  const { drawn: model } = desk;
  const { titleBlock: block } = model;
  const failed = model.summary.filter((one) => one.cases.some((each) => each.met === false));
  const { wrong, waiting } = countLines(model.problems);
  const errors = wrong.length;
  const toConfirm = model.openPoints.filter((point) => point.kind === 'to confirm' || point.kind === 'carried over').length;
  const first = (cell: string | undefined) => () => cell !== undefined && acts.goTo(cell);
  return html`<header class="bar">
      <p class="brand">${mark()}<span>Tightside</span></p>
      <p class="document"><b>${block.documentNumber ?? ''}</b> ${block.revision ? `rev ${block.revision} · ` : ''}${model.title} · ${model.status}</p>
      <p class="state">
        ${errors === 0 ? nothing : html`<button type="button" class="word not-met" @click=${first(wrong[0])}>${words(errors, 'line', 'lines')} with an error</button>`}
        ${waiting === 0 ? nothing : html`<span>${words(waiting, 'line waits', 'lines wait')}</span>`}
        ${
          failed.length > 0
            ? html`<button type="button" class="word not-met" @click=${first(failed[0]?.cell)}>${words(failed.length, 'criterion', 'criteria')} not met</button>`
            : model.summary.length > 0 && errors === 0
              ? html`<span>${model.summary.every((one) => one.cases.every((each) => each.met === true)) ? 'all criteria met' : 'no criterion fails'}</span>`
              : nothing
        }
        ${toConfirm === 0 ? nothing : html`<button type="button" class="word" @click=${() => acts.toOpenPoints()}>${toConfirm} to confirm</button>`}
      </p>
      ${keptWord(session)}
      <div class="tools" role="group" aria-label="Sheet">
        <button type="button" title="All sheets and templates" @click=${() => session.go({ screen: 'shelf' })}>Shelf</button>
        <button type="button" aria-disabled=${desk.undoLabel === null} title=${desk.undoLabel === null ? nothing : `Undo: ${desk.undoLabel}`} @click=${() => desk.undo()}>Undo</button>
        <button type="button" aria-disabled=${desk.redoLabel === null} title=${desk.redoLabel === null ? nothing : `Redo: ${desk.redoLabel}`} @click=${() => desk.redo()}>Redo</button>
        <button type="button" title=${session.fileName === null ? 'Save the sheet as a file' : `Save the sheet in ${session.fileName}`} @click=${() => void session.saveFile()}>Save file</button>
        ${session.id === null ? nothing : html`<button type="button" title="Keep this sheet as a template for similar jobs" @click=${() => session.go({ screen: 'keep', id: session.id! })}>Keep as template</button>`}
        <button type="button" @click=${() => print()}>Print</button>
        <button type="button" title="The keys of the page: ?" @click=${() => acts.showKeys()}>Keys</button>
      </div>
    </header>`;
}

/** Over any other screen, and where a sheet could not be opened. */
export function shelfBar(session: Session): TemplateResult {
  return html`<header class="bar">
      <p class="brand">${mark()}<span>Tightside</span></p>
      <p class="document"></p>
      <div class="tools" role="group" aria-label="Shelf">
        ${session.route.screen !== 'sheet' ? nothing : html`<button type="button" title="All sheets and templates" @click=${() => session.go({ screen: 'shelf' })}>Shelf</button>`}
        ${session.id === null || session.route.screen === 'sheet' ? nothing : html`<button type="button" @click=${() => session.go({ screen: 'sheet', id: session.id })}>Back to the sheet</button>`}
        <button type="button" title="Open a sheet file" @click=${() => void session.openFile()}>Open a file</button>
      </div>
    </header>`;
}
