/** The whole sheet as plain text, for those who prefer to type it through. */
import { standardKeymap } from "@codemirror/commands";
import { EditorView, keymap } from "@codemirror/view";
import { assisting, type Assistance } from "./assisting.js";
import { el } from "./dom.js";
import { foundation, underline } from "./editing.js";
import type { Report } from "./report.js";
import { difference, offsetOf, type SheetText } from "./sheet-text.js";
import { words } from "./strings.js";

export class WholeText {
  readonly element = el("section", { class: "whole-text", "aria-label": words.sheetText });
  #view: EditorView;
  #sheet: SheetText;
  #following = false;

  constructor(sheet: SheetText, assistance: Assistance) {
    this.#sheet = sheet;
    const keys = [
      { key: "Mod-z", run: () => this.#step(() => sheet.undo()), preventDefault: true },
      { key: "Mod-y", mac: "Mod-Shift-z", run: () => this.#step(() => sheet.redo()), preventDefault: true },
      { key: "Mod-Shift-z", run: () => this.#step(() => sheet.redo()), preventDefault: true },
    ];
    this.#view = new EditorView({
      doc: sheet.text,
      parent: this.element,
      extensions: [
        assisting(assistance, () => 1),
        keymap.of([...keys, ...standardKeymap]),
        foundation(words.sheetText),
        EditorView.updateListener.of((update) => {
          if (update.docChanged && !this.#following) sheet.replaceAll(update.state.doc.toString(), "text");
        }),
      ],
    });
  }

  /** Brings the editor up to the sheet. */
  follow(): void {
    const splice = difference(this.#view.state.doc.toString(), this.#sheet.text);
    if (!splice) return;
    this.#following = true;
    this.#view.dispatch({ changes: { from: splice.from, to: splice.from + splice.removed.length, insert: splice.inserted } });
    this.#following = false;
  }

  /** Underlines the findings. */
  show(report: Report): void {
    underline(this.#view, report.findings, 1);
  }

  /** Puts `text` in at the cursor. */
  type(text: string): void {
    this.#view.dispatch(this.#view.state.replaceSelection(text));
    this.#view.focus();
  }

  /** Puts the cursor at the beginning of `line`. */
  goTo(line: number): void {
    const anchor = offsetOf(this.#view.state.doc.toString(), line, 1);
    this.#view.dispatch({ selection: { anchor }, effects: EditorView.scrollIntoView(anchor, { y: "center" }) });
    this.#view.focus();
  }

  #step(step: () => number | null): boolean {
    const line = step();
    this.follow();
    if (line !== null) this.goTo(line);
    return true;
  }
}
