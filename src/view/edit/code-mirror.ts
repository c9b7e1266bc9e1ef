// The editor of one line of a formula: typed text with its pieces told apart, a list of what could be written, problems underlined.
//
// 1. One line: a line break that is pasted becomes a space. Enter keeps, Escape takes back, Tab leaves as in any field.
// 2. Enter takes a proposal only where one was chosen with the arrows: what was typed is never changed unasked.
// 3. Alt+Enter applies the first correction; the arrow down leads to the corrections under the line.
// 4. It lives in a shadow root, where its styles are adopted sheets: the policy of the page allows no style element. Lists and tips
//    hang in the top layer, so that no section of the sheet cuts them off.
// Loaded when the first line is typed into (line-editor.ts). Not here: what is a problem and what can be proposed.

import {
  autocompletion,
  type Completion,
  type CompletionContext,
  completionStatus,
  startCompletion,
} from '@codemirror/autocomplete';
import { defaultKeymap, history, historyKeymap } from '@codemirror/commands';
import { bracketMatching } from '@codemirror/language';
import { setDiagnostics } from '@codemirror/lint';
import { Compartment, EditorState, type Extension, Prec, StateEffect, StateField } from '@codemirror/state';
import { Decoration, type DecorationSet, drawSelection, EditorView, keymap, tooltips } from '@codemirror/view';
import type { Fix, Problem } from '../../quantity/index.ts';
import type { Proposals } from './assist.ts';
import { theme } from './code-theme.ts';
import type { Mark } from './marks.ts';

export interface LineViewOptions {
  readonly root: ShadowRoot;
  readonly parent: HTMLElement;
  readonly text: string;
  readonly selection: readonly [number, number];
  readonly marks: (text: string) => readonly Mark[];
  readonly propose: (text: string, caret: number, asked: boolean) => Proposals | undefined;
  readonly typed: (text: string) => void;
  readonly commit: () => void;
  readonly cancel: () => void;
  /** The arrow down where no list is open. */
  readonly below: () => boolean;
}

export interface LineView {
  readonly content: HTMLElement;
  setText(text: string): void;
  setProblems(problems: readonly Problem[]): void;
  setAttributes(attributes: Readonly<Record<string, string>>): void;
  /** What is marked depends on the sheet, which may have moved. */
  refresh(): void;
  applyFix(fix: Fix): void;
  focus(): void;
  destroy(): void;
}

const refreshed = StateEffect.define<null>();

export function createLineView(options: LineViewOptions): LineView {
  const layer = document.createElement('div');
  layer.className = 'layer';
  layer.setAttribute('popover', 'manual');
  options.parent.after(layer);
  const attributes = new Compartment();
  let firstFix: Fix | undefined;
  const view = new EditorView({
    root: options.root,
    parent: options.parent,
    state: EditorState.create({
      doc: oneLine(options.text),
      selection: { anchor: options.selection[0], head: options.selection[1] },
      extensions: [
        Prec.highest(
          keymap.of([
            { key: 'Alt-Enter', run: () => applyFirst() },
            { key: 'ArrowDown', run: ({ state }) => completionStatus(state) !== 'active' && options.below() },
            // A list that is about to open is no reason to press Escape twice.
            { key: 'Escape', run: ({ state }) => completionStatus(state) !== 'active' && did(options.cancel) },
          ]),
        ),
        autocompletion({
          override: [proposalsFrom(options)],
          selectOnOpen: false,
          icons: false,
          activateOnTypingDelay: 40,
          interactionDelay: 0,
          maxRenderedOptions: 60,
        }),
        // Behind the keys of the list: what it takes is not ours.
        keymap.of([
          { key: 'Enter', run: () => did(options.commit) },
          ...historyKeymap,
          ...defaultKeymap.filter(({ key }) => key !== 'Mod-Enter'),
        ]),
        history(),
        drawSelection(),
        bracketMatching(),
        tooltips({ position: 'fixed', parent: layer }),
        singleLine,
        marking(options.marks),
        theme,
        EditorView.clipboardInputFilter.of(oneLine),
        EditorView.lineWrapping,
        attributes.of([]),
        EditorView.updateListener.of((update) => {
          if (update.docChanged) options.typed(update.state.doc.toString());
        }),
      ],
    }),
  });
  layer.showPopover?.();
  const applyFix = (fix: Fix) => {
    const length = view.state.doc.length;
    const [from, to] = [Math.min(fix.from, length), Math.min(fix.to, length)];
    view.dispatch({
      changes: { from, to, insert: fix.text },
      selection: { anchor: from + fix.text.length },
      userEvent: 'input.fix',
    });
    view.focus();
  };
  const applyFirst = () => {
    if (firstFix === undefined) return false;
    applyFix(firstFix);
    return true;
  };
  return {
    content: view.contentDOM,
    setText(text) {
      if (text === view.state.doc.toString()) return;
      view.dispatch({ changes: { from: 0, to: view.state.doc.length, insert: oneLine(text) } });
    },
    setProblems(problems) {
      firstFix = problems.find((problem) => (problem.fixes ?? []).length > 0)?.fixes?.[0];
      const length = view.state.doc.length;
      const diagnostics = problems
        .map((problem) => ({ problem, reach: reachOf(problem, view.state.doc.toString()) }))
        .sort((a, b) => a.reach[0] - b.reach[0])
        .map(({ problem, reach }) => ({
          from: reach[0],
          to: Math.min(reach[1], length),
          severity: problem.severity,
          message: problem.message,
          actions: (problem.fixes ?? []).map((fix) => ({ name: fix.label, apply: () => applyFix(fix) })),
        }));
      view.dispatch(setDiagnostics(view.state, diagnostics));
    },
    setAttributes(next) {
      view.dispatch({ effects: attributes.reconfigure(EditorView.contentAttributes.of(next)) });
    },
    refresh: () => view.dispatch({ effects: refreshed.of(null) }),
    applyFix,
    focus: () => view.focus(),
    destroy() {
      view.destroy();
      layer.remove();
    },
  };
}

/** A key that was taken. */
const did = (action: () => void): true => {
  action();
  return true;
};

const oneLine = (text: string) => text.replace(/\s*[\r\n\u2028\u2029]+\s*/gu, ' ');

const singleLine = EditorState.transactionFilter.of((change) => (change.newDoc.lines > 1 ? [] : change));

/** A problem that is about nothing in particular is about the whole; one about no character at all takes the one beside it. */
function reachOf({ at }: Problem, text: string): readonly [number, number] {
  if (at === undefined) return [0, text.length];
  const [from, to] = [Math.min(at[0], text.length), Math.min(at[1], text.length)];
  if (from < to) return [from, to];
  return from > 0 ? [from - 1, from] : [0, Math.min(1, text.length)];
}

function marking(marks: (text: string) => readonly Mark[]): Extension {
  const decorate = (text: string): DecorationSet =>
    Decoration.set(
      marks(text)
        .filter(({ from, to }) => from < to && to <= text.length)
        .map(({ from, to, kind }) => Decoration.mark({ class: `ts-${kind}` }).range(from, to)),
      true,
    );
  return StateField.define<DecorationSet>({
    create: (state) => decorate(state.doc.toString()),
    update: (value, change) =>
      change.docChanged || change.effects.some((effect) => effect.is(refreshed)) ? decorate(change.newDoc.toString()) : value,
    provide: (field) => EditorView.decorations.from(field),
  });
}

function proposalsFrom({ propose }: LineViewOptions) {
  return (context: CompletionContext) => {
    const found = propose(context.state.doc.toString(), context.pos, context.explicit);
    if (found === undefined) return null;
    return {
      from: found.from,
      to: found.to,
      filter: false,
      options: found.list.map(
        ({ label, write, caret, detail, kind }): Completion => ({
          label,
          detail,
          type: kind,
          apply: (view, _completion, from, to) => {
            const insert = write ?? label;
            view.dispatch({
              changes: { from, to, insert },
              selection: { anchor: from + (caret ?? insert.length) },
              userEvent: 'input.complete',
            });
            // A table is followed by its column, the column by the key.
            if (kind === 'table' || kind === 'function') startCompletion(view);
          },
        }),
      ),
    };
  };
}
