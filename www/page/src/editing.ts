/** What the open row and the sheet text have in common: highlighting, marks of findings, undo over everything. */
import { StateEffect, StateField, type Extension } from "@codemirror/state";
import { Decoration, EditorView, ViewPlugin, type DecorationSet, type ViewUpdate } from "@codemirror/view";
import { initSync, kinds, marks } from "../generated/engine.js";
import type { Finding } from "./report.js";
import { advance, offsetOf } from "./sheet-text.js";

/** Longer texts are shown without highlighting, so that no key ever waits. */
const HIGHLIGHT_MOST = 262_144;

let names: string[] | null = null;

/** Makes the engine's lexer callable here, off its thread, for highlighting as one types. */
export function loadHighlighter(module: WebAssembly.Module): void {
  initSync({ module });
  names = Array.from(kinds());
}

/** The nonce that the page's content policy admits styles by. */
export function styleNonce(): string {
  return document.querySelector<HTMLStyleElement>("style[nonce]")?.nonce ?? "";
}

/** Both editors' foundation. */
export function foundation(label: string): Extension[] {
  return [
    EditorView.cspNonce.of(styleNonce()),
    EditorView.lineWrapping,
    EditorView.contentAttributes.of({ "aria-label": label, spellcheck: "false", autocapitalize: "off", autocorrect: "off" }),
    highlighting,
    problems,
  ];
}

const highlighting = ViewPlugin.fromClass(
  class {
    decorations: DecorationSet;
    constructor(view: EditorView) {
      this.decorations = highlighted(view.state.doc.toString());
    }
    update(update: ViewUpdate): void {
      if (update.docChanged) this.decorations = highlighted(update.state.doc.toString());
    }
  },
  { decorations: (plugin) => plugin.decorations },
);

function highlighted(text: string): DecorationSet {
  if (!names || text.length > HIGHLIGHT_MOST) return Decoration.none;
  try {
    return Decoration.set(ranges(marks(text), names, text.length));
  } catch {
    // A lexer that broke off has no marks to give; the text stays as it is.
    return Decoration.none;
  }
}

function ranges(flat: ArrayLike<number>, kindNames: readonly string[], length: number) {
  const made = [];
  for (let at = 0; at + 2 < flat.length; at += 3) {
    const [from = 0, to = 0, kind = 0] = [flat[at], flat[at + 1], flat[at + 2]];
    const name = kindNames[kind];
    if (name && from < to && to <= length) made.push(Decoration.mark({ class: `kind-${name}` }).range(from, to));
  }
  return made;
}

const setProblems = StateEffect.define<DecorationSet>();

const problems = StateField.define<DecorationSet>({
  create: () => Decoration.none,
  update(marked, transaction) {
    let next = marked.map(transaction.changes);
    for (const effect of transaction.effects) if (effect.is(setProblems)) next = effect.value;
    return next;
  },
  provide: (field) => EditorView.decorations.from(field),
});

/** Underlines `findings`, whose lines count from `firstLine` for the editor's own first line. */
export function underline(view: EditorView, findings: readonly Finding[], firstLine: number): void {
  const text = view.state.doc.toString();
  const made = findings.flatMap((finding) => {
    const line = finding.line - firstLine + 1;
    if (line < 1 || line > view.state.doc.lines) return [];
    const from = offsetOf(text, line, finding.column);
    const to = Math.min(text.length, Math.max(advance(text, from, finding.length), from + 1));
    return from < to ? [Decoration.mark({ class: `problem ${finding.severity}` }).range(from, to)] : [];
  });
  view.dispatch({ effects: setProblems.of(Decoration.set(made, true)) });
}
