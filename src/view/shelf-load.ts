// The shelf arrives when it is first looked at; and what a drop on the page brings.

import { html, type TemplateResult } from 'lit';
import type { DroppedFile } from '../store/index.ts';
import type { Session } from './session.ts';

let screen: ((session: Session) => TemplateResult) | undefined;
let failed = false;

/** Resolves when the shelf can be shown. */
export async function loadShelf(): Promise<void> {
  try {
    screen = (await import('./shelf/index.ts')).shelfScreen;
    failed = false;
  } catch {
    failed = true;
  }
}

/** `drawn` is called when the shelf has arrived. */
export function shelfScreen(session: Session, drawn: () => void): TemplateResult {
  if (screen !== undefined) return screen(session);
  if (failed)
    return html`<p class="loading" role="alert">The shelf could not be loaded. Load the page anew; the sheets are kept.</p>`;
  void loadShelf().then(drawn);
  return html`<p class="loading">Opening the shelf …</p>`;
}

/** Files with their handles where the browser gives them. To be called within the drop. */
export function droppedFiles(data: DataTransfer): Promise<readonly DroppedFile[]> {
  const items = [...data.items].filter((item) => item.kind === 'file');
  // All are asked for at once: after the first wait the browser has forgotten the rest.
  const handles = items.map((item) => {
    const asking = item as DataTransferItem & { getAsFileSystemHandle?(): Promise<FileSystemHandle | null> };
    return asking.getAsFileSystemHandle?.().catch(() => null) ?? Promise.resolve(null);
  });
  const files = items.map((item) => item.getAsFile());
  return Promise.all(
    files.map(async (file, index): Promise<DroppedFile | null> => {
      const handle = await handles[index];
      if (file === null) return null;
      const text = () => file.text();
      return handle?.kind === 'file'
        ? { name: file.name, handle: handle as FileSystemFileHandle, text }
        : { name: file.name, text };
    }),
  ).then((all) => all.filter((one) => one !== null));
}
