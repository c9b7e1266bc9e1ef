// The look of the line that is typed into, in the inks of the page: its custom properties reach into the shadow root.
//
// Pieces differ by weight, slant and underline first, by ink second; in forced colours the system's colours hold.
// Not here: the styles around the line (edit.css).

import { EditorView } from '@codemirror/view';

const mono = "ui-monospace, 'DejaVu Sans Mono', Menlo, Consolas, monospace";

export const theme = EditorView.theme({
  '&': { color: 'var(--ink)', backgroundColor: 'transparent', fontSize: '0.9375rem' },
  '&.cm-focused': { outline: 'none' },
  '.cm-scroller': { fontFamily: mono, lineHeight: '1.5', overflow: 'visible' },
  '.cm-content': { padding: '0.125rem 0', caretColor: 'var(--ink)', minHeight: '1.5rem' },
  '.cm-line': { padding: '0 0.125rem' },
  '.cm-cursor': { borderLeftColor: 'var(--ink)', borderLeftWidth: '1.5px' },
  '&.cm-focused > .cm-scroller > .cm-selectionLayer .cm-selectionBackground, .cm-selectionBackground': {
    backgroundColor: 'color-mix(in srgb, var(--author) 24%, transparent) !important',
  },
  '.ts-name': { color: 'var(--ink)' },
  '.ts-function, .ts-constant': { color: 'var(--author)' },
  '.ts-number': { color: 'var(--ink)' },
  '.ts-quoted, .ts-unit, .ts-value': { color: 'var(--author)' },
  '.ts-unknown': { color: 'var(--checker)', fontStyle: 'italic' },
  '.ts-table': { color: 'var(--second)' },
  '.ts-title': { color: 'var(--second)', fontFamily: 'inherit' },
  '.ts-mark': { color: 'var(--second)' },
  '.cm-matchingBracket, &.cm-focused .cm-matchingBracket': {
    backgroundColor: 'transparent',
    outline: '1px solid var(--edge)',
  },
  '.cm-nonmatchingBracket, &.cm-focused .cm-nonmatchingBracket': {
    backgroundColor: 'transparent',
    color: 'var(--checker)',
    outline: '1px dashed var(--checker)',
  },
  '.cm-lintRange': {
    backgroundImage: 'none',
    paddingBottom: '0',
    textDecorationThickness: '1.5px',
    textUnderlineOffset: '0.2em',
  },
  '.cm-lintRange-error': { backgroundImage: 'none', textDecoration: 'underline wavy var(--checker)' },
  '.cm-lintRange-warning': { backgroundImage: 'none', textDecoration: 'underline dotted var(--checker)' },
  '.cm-lintRange-active': { backgroundColor: 'transparent' },
  '.cm-tooltip': {
    border: '1px solid var(--edge)',
    backgroundColor: 'var(--paper)',
    color: 'var(--ink)',
    fontFamily: 'inherit',
    fontSize: 'var(--small)',
    lineHeight: '1.4',
    maxWidth: 'min(36rem, 94vw)',
  },
  '.cm-tooltip.cm-tooltip-autocomplete > ul': {
    fontFamily: 'inherit',
    maxHeight: '15rem',
    maxWidth: 'min(36rem, 94vw)',
    minWidth: '14rem',
  },
  '.cm-tooltip.cm-tooltip-autocomplete > ul > li': {
    display: 'flex',
    gap: '1.25rem',
    alignItems: 'baseline',
    padding: '0.25rem 0.625rem',
    borderLeft: '3px solid transparent',
  },
  '.cm-tooltip.cm-tooltip-autocomplete > ul > li[aria-selected]': {
    backgroundColor: 'var(--wash)',
    color: 'var(--ink)',
    borderLeftColor: 'var(--author)',
  },
  '.cm-completionLabel': { fontFamily: mono },
  '.cm-completionDetail': {
    marginLeft: 'auto',
    fontStyle: 'normal',
    color: 'var(--second)',
    textAlign: 'right',
    overflow: 'hidden',
    textOverflow: 'ellipsis',
  },
  '.cm-completionMatchedText': { textDecoration: 'none', fontWeight: '650' },
  '.cm-diagnostic': { padding: '0.375rem 0.625rem', borderLeft: '3px solid var(--checker)' },
  '.cm-diagnostic-warning': { borderLeftStyle: 'double' },
  '.cm-diagnosticAction': {
    font: 'inherit',
    color: 'var(--author)',
    backgroundColor: 'transparent',
    border: '0',
    padding: '0.125rem 0',
    margin: '0 0 0 0.75rem',
    textDecoration: 'underline',
    cursor: 'pointer',
  },
});
