// A sheet file chosen by the user: read or refused, never half opened.
//
// 1. A refused file changes nothing on the desk; what is wrong with it is listed, place first.
// 2. Changes that no file has are not given up without being asked.
// Not here: reading the text of a file (src/sheet).

import { html } from 'lit';
import { readSheet, type Sheet } from '../sheet/index.ts';

export interface Opening {
  readonly name: string;
  readonly sheet?: Sheet;
  readonly problems: readonly string[];
}

export async function readFile(file: File): Promise<Opening> {
  let text: string;
  try {
    text = await file.text();
  } catch {
    return { name: file.name, problems: ['the file could not be read from the disk; choose it again'] };
  }
  const read = readSheet(text);
  if (read.ok) return { name: file.name, sheet: read.value, problems: [] };
  return { name: file.name, problems: read.problems.map((problem) => problem.message) };
}

export function openingNote(opening: Opening, act: { readonly open: () => void; readonly dismiss: () => void }) {
  if (opening.sheet !== undefined) {
    return html`<section class="opening" role="alert">
      <p><b>${opening.name}</b> is ready, but the sheet on the desk has changes that are in no file.</p>
      <p><button type="button" class="word" @click=${act.dismiss}>Stay with this sheet</button>
        <button type="button" class="word" @click=${act.open}>Open ${opening.name} and give the changes up</button></p>
    </section>`;
  }
  return html`<section class="opening" role="alert">
    <p><b class="not-met">${opening.name} was not opened.</b> The sheet on the desk is as it was.</p>
    <ul>${opening.problems.map((problem) => html`<li>${problem}</li>`)}</ul>
    <p><button type="button" class="word" @click=${act.dismiss}>Close this note</button></p>
  </section>`;
}
