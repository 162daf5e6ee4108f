/** The open row: one statement as text, in place in the form, worked out while it is typed. */
import { standardKeymap } from "@codemirror/commands";
import { EditorState, type Extension } from "@codemirror/state";
import { EditorView, keymap, type KeyBinding } from "@codemirror/view";
import { assisting, type Assistance } from "./assisting.js";
import { findingsAt, type Shown } from "./conditions.js";
import { el, fill } from "./dom.js";
import { foundation, underline } from "./editing.js";
import { fixButtons } from "./findings.js";
import type { Place } from "./form.js";
import { converted } from "./pasting.js";
import type { Fix } from "./report.js";
import { difference, type SheetText } from "./sheet-text.js";
import { words } from "./strings.js";

/** Where to go on after a row is taken. */
export type Next = "following" | "beneath" | "stay";

export interface EditorEvents {
  /** The text in the sheet changed in the editor's lines. */
  changed(line: number, removed: number, inserted: number): void;
  taken(next: Next): void;
  givenBack(): void;
  fix(fix: Fix): void;
  assistance: Assistance;
  /** What was pasted became a table; `said` tells what was changed. */
  converted(said: string): void;
  /** Undo reached what lies before this row was opened. */
  undoBefore(): void;
}

let opened = 0;

export class RowEditor {
  readonly body: HTMLTableSectionElement;
  readonly line: number;
  /** The row stands in no line yet. */
  readonly fresh: boolean;
  /** How many lines of the sheet the editor holds; none while a fresh row is empty. */
  count: number;
  #sheet: SheetText;
  #events: EditorEvents;
  #view: EditorView;
  #notes = el("div", { class: "row-findings" });
  #mark: number;
  #undone = 0;
  #group = `row ${++opened}`;
  #closed = false;
  #syncing = false;

  /** Opens `count` lines from `line`; with a count of 0 a fresh row before that line. */
  constructor(sheet: SheetText, line: number, count: number, columns: number, label: string, events: EditorEvents) {
    this.#sheet = sheet;
    this.#events = events;
    this.line = line;
    this.count = count;
    this.fresh = count === 0;
    this.#mark = sheet.mark();
    sheet.closeStep();
    this.#view = new EditorView({ doc: this.#text(), extensions: this.#extensions(words.typing(label)) });
    const cell = el("td", { class: "typing", role: "cell", colspan: columns }, this.#view.dom, this.#notes);
    const item = el("th", { class: "item", role: "rowheader", scope: "row", "aria-label": words.typing(label) });
    this.body = el("tbody", { class: "editor", role: "rowgroup" }, el("tr", { role: "row" }, item, cell));
    this.body.addEventListener("focusout", (event) => this.#left(event));
  }

  /** Puts the cursor where the row was clicked. */
  focus(place: Place): void {
    this.#view.focus();
    this.#view.dispatch({ selection: { anchor: cursorFor(this.#view.state.doc.toString(), place) }, scrollIntoView: true });
  }

  /** Gives the keyboard back to the row. */
  refocus(): void {
    this.#view.focus();
  }

  /** Puts `text` in at the cursor, as if it were typed. */
  type(text: string): void {
    this.#view.dispatch(this.#view.state.replaceSelection(text));
  }

  /** Shows the findings of the open lines, with their fixes. */
  show(shown: Shown): void {
    if (this.#closed) return;
    const notes = findingsAt(shown, this.line, this.count);
    underline(this.#view, notes.map(({ finding }) => finding), this.line);
    fill(this.#notes, notes.map(({ number, finding }) => el("p", { class: `finding ${finding.severity}` },
      el("b", {}, `${number} `), finding.message, fixButtons(finding, (fix) => this.#events.fix(fix)))));
  }

  /** Brings the editor's text up to the sheet's, after `change` altered the lines it holds. */
  follow(change: () => void): void {
    const before = this.#sheet.lines.length;
    change();
    const count = Math.max(0, this.count + this.#sheet.lines.length - before);
    this.#events.changed(this.line, this.count, count);
    this.count = count;
    const splice = difference(this.#view.state.doc.toString(), this.#text());
    if (!splice) return;
    this.#syncing = true;
    this.#view.dispatch({ changes: { from: splice.from, to: splice.from + splice.removed.length, insert: splice.inserted } });
    this.#syncing = false;
  }

  /** Closes the editor; the sheet has its text already. */
  close(): void {
    if (this.#closed) return;
    this.#closed = true;
    this.#sheet.closeStep();
    this.#view.destroy();
  }

  #text(): string {
    return this.#sheet.lines.slice(this.line - 1, this.line - 1 + this.count).join("\n");
  }

  #extensions(label: string): Extension[] {
    return [
      assisting(this.#events.assistance, () => this.line),
      keymap.of([...this.#keys(), ...standardKeymap]),
      EditorState.allowMultipleSelections.of(false),
      foundation(label),
      EditorView.updateListener.of((update) => {
        if (update.docChanged && !this.#syncing) this.#typed(update.state.doc.toString());
      }),
      EditorView.domEventHandlers({ paste: (event) => this.#pasted(event) }),
    ];
  }

  #keys(): KeyBinding[] {
    return [
      { key: "Enter", run: () => (this.#unfinishedTable() ? false : this.#take("following")) },
      { key: "Mod-Enter", run: () => this.#take("beneath") },
      { key: "Escape", run: () => this.#giveBack() },
      { key: "Mod-z", run: () => this.#undo(), preventDefault: true },
      { key: "Mod-y", mac: "Mod-Shift-z", run: () => this.#redo(), preventDefault: true },
      { key: "Mod-Shift-z", run: () => this.#redo(), preventDefault: true },
    ];
  }

  #typed(text: string): void {
    const lines = text === "" && this.fresh ? [] : text.split("\n");
    this.#sheet.replaceLines(this.line, this.count, lines, this.#group);
    this.#events.changed(this.line, this.count, lines.length);
    this.count = lines.length;
    this.#undone = 0;
  }

  /** In a table, Enter gives its next line until the cursor stands behind `end`. */
  #unfinishedTable(): boolean {
    const { doc, selection } = this.#view.state;
    const text = doc.toString();
    if (!/^\s*table\b/.test(text)) return false;
    return !(/\n\s*end\s*$/.test(text) && selection.main.head >= text.trimEnd().length);
  }

  /** A pasted block of lines becomes rows: where it is the whole of the row, it is taken at once. */
  #pasted(event: ClipboardEvent): boolean {
    const text = (event.clipboardData?.getData("text/plain") ?? "").replace(/\r\n?/g, "\n").replace(/\n$/, "");
    if (!text.includes("\n") || this.#view.state.doc.length > 0) return false;
    event.preventDefault();
    const table = converted(text);
    this.#view.dispatch(this.#view.state.replaceSelection(table?.lines.join("\n") ?? text));
    if (table) this.#events.converted(table.said);
    return this.#take("stay");
  }

  #take(next: Next): boolean {
    this.#events.taken(next);
    return true;
  }

  #giveBack(): boolean {
    this.follow(() => this.#sheet.undoTo(this.#mark));
    this.#events.givenBack();
    return true;
  }

  #undo(): boolean {
    if (this.#sheet.mark() <= this.#mark) {
      this.#events.undoBefore();
      return true;
    }
    this.#undone++;
    this.follow(() => this.#sheet.undo());
    return true;
  }

  /** Only what was undone in this row comes back here. */
  #redo(): boolean {
    if (this.#undone > 0) {
      this.#undone--;
      this.follow(() => this.#sheet.redo());
    }
    return true;
  }

  #left(event: FocusEvent): void {
    const to = event.relatedTarget;
    // What is looked up on the slip beside the form goes into the row that is still open.
    const beside = to instanceof Element && to.closest(".slip, .beside") !== null;
    if (this.#closed || !(to instanceof Node) || this.body.contains(to) || beside) return;
    this.#events.taken("stay");
  }
}

/** The offset in a statement where a column of the form begins; the end where the statement has no such part. */
function cursorFor(text: string, place: Place): number {
  const first = text.split("\n", 1)[0] ?? "";
  const bracket = first.indexOf("[");
  const equals = first.indexOf("=");
  const remark = first.indexOf(";");
  if (place === "symbol") return first.search(/\S|$/);
  if (place === "unit" && bracket >= 0) return bracket + 1;
  if (place === "remark" && remark >= 0) return first.length;
  if (place === "how" && equals >= 0) return endOfCode(first, remark);
  return first.length;
}

function endOfCode(line: string, remark: number): number {
  const code = remark >= 0 ? line.slice(0, remark) : line;
  return code.trimEnd().length;
}
