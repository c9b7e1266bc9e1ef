// Styles of the shadow root of a line that is typed into: what stands there before the editor is loaded, and the layer of its lists.
// Not here: the editor's own (code-theme.ts), which come with it.

const mono = "ui-monospace, 'DejaVu Sans Mono', Menlo, Consolas, monospace";

export const lineSheet = `
  :host { display: block; min-width: 0; flex: 1 1 auto; font-family: inherit; }
  .layer { position: fixed; inset: 0 auto auto 0; width: 0; height: 0; margin: 0; padding: 0; border: 0; overflow: visible; background: none; }
  input { width: 100%; box-sizing: border-box; margin: 0; padding: 0.125rem; border: 0; border-radius: 0; background: transparent; color: var(--ink);
    font: 0.9375rem/1.5 ${mono}; }
  input:focus { outline: none; }
  .view { min-width: 0; }
`;
