/** Working on rows: opening and taking them, adding, moving, deleting, cutting and pasting, by key and by click. */
import type { Assistance } from "./assisting.js";
import type { Shown } from "./conditions.js";
import type { Form, Place } from "./form.js";
import { typed } from "./numbers.js";
import type { Fix, FormRow } from "./report.js";
import type { Next, RowEditor } from "./row-editor.js";
import { nameOf } from "./rows.js";
import { linesOf, normalised, type SheetText } from "./sheet-text.js";
import { words } from "./strings.js";
import { later, laterNow } from "./unpacking.js";

export interface DeskEvents {
  /** The row at `line` was taken; its value and findings are to be spoken. */
  taken(line: number): void;
  fix(fix: Fix): void;
  say(text: string): void;
  /** The trail of the value in the row that the keyboard is at. */
  trail(): void;
  /** What was pasted became something else; `said` tells what was changed. */
  converted(said: string): void;
  assistance: Assistance;
}

export class RowDesk {
  #form: Form;
  #sheet: SheetText;
  #events: DeskEvents;
  #editor: RowEditor | null = null;

  constructor(form: Form, sheet: SheetText, events: DeskEvents) {
    this.#form = form;
    this.#sheet = sheet;
    this.#events = events;
  }

  /** Shows the findings in the open row. */
  show(shown: Shown): void {
    this.#editor?.show(shown);
  }

  /** Opens `row` at `place`; without a row, a fresh one at the foot. */
  open(row: FormRow | null, place: Place): void {
    if (row) this.#openAt(row.line, row.lines, nameOf(row), place);
    else this.openFresh(this.#sheet.lines.length + 1);
  }

  /** Opens a fresh row before `line`. */
  openFresh(line: number): void {
    this.#openAt(line, 0, words.newRow.toLowerCase(), "how");
  }

  /** Opens the row that covers `line`. */
  openLine(line: number): void {
    const row = this.#form.rows[this.#form.positionAt(line)];
    if (row) this.open(row, "how");
  }

  /** Closes the open row; its text is in the sheet already. */
  close(): void {
    const editor = this.#editor;
    if (!editor) return;
    this.#editor = null;
    editor.close();
    this.#form.place(null);
  }

  /** Carries out a change of the sheet from outside, with an open row following it where it can. */
  undo(): void {
    this.#step(() => this.#sheet.undo());
  }

  redo(): void {
    this.#step(() => this.#sheet.redo());
  }

  /** A key on a closed row. */
  key(event: KeyboardEvent): void {
    const act = this.#actionFor(event);
    if (!act) return;
    event.preventDefault();
    act();
  }

  /** The chosen rows as text, each on its lines. */
  copied(): string {
    const range = this.#chosenLines();
    return this.#sheet.lines.slice(range.line - 1, range.line - 1 + range.count).map((line) => line + "\n").join("");
  }

  /** Takes the chosen rows out. */
  remove(): void {
    const { line, count } = this.#chosenLines();
    if (count === 0) return;
    const { from } = this.#form.chosen;
    this.#sheet.replaceLines(line, count, []);
    this.#form.shift(line, count, 0);
    this.#form.choose(from);
  }

  /** Puts `text` in at the cursor of the open row; where none is open, of a fresh one beneath the chosen rows. */
  insert(text: string): void {
    if (!this.#editor) {
      const { line, count } = this.#chosenLines();
      this.openFresh(line + count);
    }
    this.#editor?.type(text);
    this.#editor?.refocus();
  }

  /** Puts the lines of `text` behind the chosen rows. */
  paste(text: string): void {
    const table = laterNow()?.converted(text) ?? null;
    const lines = table?.lines ?? linesOf(normalised(text));
    if (lines.length === 0) return;
    const { line, count } = this.#chosenLines();
    this.#sheet.replaceLines(line + count, 0, lines);
    this.#form.shift(line + count, 0, lines.length);
    this.#events.taken(line + count);
    if (table) this.#events.converted(table.said);
  }

  #openAt(line: number, count: number, label: string, place: Place): void {
    this.close();
    if (laterNow()) this.#edit(line, count, label, place);
    else void this.#editLater(line, count, label, place);
  }

  /** The editor is still being unpacked: what is typed meanwhile is kept for it. */
  async #editLater(line: number, count: number, label: string, place: Place): Promise<void> {
    let typedAhead = "";
    const hold = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.metaKey || event.key.length !== 1) return;
      event.preventDefault();
      typedAhead += event.key;
    };
    document.addEventListener("keydown", hold, true);
    await later();
    document.removeEventListener("keydown", hold, true);
    this.#edit(line, count, label, place);
    if (typedAhead) this.#editor?.type(typedAhead);
  }

  #edit(line: number, count: number, label: string, place: Place): void {
    const made = laterNow();
    if (!made) return;
    const editor: RowEditor = new made.RowEditor(this.#sheet, line, count, this.#form.columns, label, {
      changed: (at, removed, inserted) => this.#form.shift(at, removed, inserted),
      taken: (next) => this.#taken(editor, next),
      givenBack: () => this.#closeAt(editor, editor.line),
      fix: (fix) => this.#events.fix(fix),
      assistance: this.#events.assistance,
      converted: (said) => this.#events.converted(said),
      undoBefore: () => {
        this.#closeAt(editor, editor.line);
        this.undo();
      },
    });
    this.#editor = editor;
    this.#form.place(editor);
    editor.focus(place);
  }

  #closeAt(editor: RowEditor, line: number): void {
    if (this.#editor !== editor) return;
    this.close();
    this.#form.choose(this.#form.positionAt(line));
  }

  /** Fresh rows follow each other, empty ones too, until Escape; other rows lead to the one that follows. */
  #taken(editor: RowEditor, next: Next): void {
    if (this.#editor !== editor) return;
    const { line, count, fresh } = editor;
    const behind = line + count;
    if (next === "stay") {
      this.close();
    } else if (count === 0) {
      this.#sheet.replaceLines(line, 0, [""]);
      this.#form.shift(line, 0, 1);
      this.openFresh(line + 1);
    } else if (next === "beneath" || fresh || behind > this.#sheet.lines.length) {
      this.openFresh(behind);
    } else {
      this.close();
      this.openLine(behind);
    }
    if (count > 0) this.#events.taken(line);
  }

  #chosenLines(): { line: number; count: number } {
    const { from, to } = this.#form.chosen;
    const rows = this.#form.rows;
    const first = rows[from];
    const last = rows[Math.min(to, rows.length - 1)];
    if (!first || !last) return { line: this.#sheet.lines.length + 1, count: 0 };
    return { line: first.line, count: last.line + last.lines - first.line };
  }

  #actionFor(event: KeyboardEvent): (() => void) | null {
    const position = this.#form.current;
    const control = event.ctrlKey || event.metaKey;
    const row = this.#form.rows[position] ?? null;
    switch (`${control ? "Ctrl " : ""}${event.altKey ? "Alt " : ""}${event.key}`) {
      case "ArrowUp": return () => this.#choose(position - 1, event.shiftKey);
      case "ArrowDown": return () => this.#choose(position + 1, event.shiftKey);
      case "Home": return () => this.#choose(0, event.shiftKey);
      case "End": return () => this.#choose(this.#form.rows.length, event.shiftKey);
      case "Enter": return () => this.open(row, "how");
      case "Insert": return () => this.openFresh(row?.line ?? this.#sheet.lines.length + 1);
      case "Ctrl Enter": return () => this.openFresh(row ? row.line + row.lines : this.#sheet.lines.length + 1);
      case "t": return () => this.#events.trail();
      case "Delete": return () => this.remove();
      case "Alt ArrowUp": return () => this.#move(-1);
      case "Alt ArrowDown": return () => this.#move(1);
      default: return null;
    }
  }

  #choose(position: number, extend: boolean): void {
    this.#form.choose(position, extend);
    const { from, to } = this.#form.chosen;
    if (to > from) this.#events.say(words.rowsChosen(to - from + 1));
  }

  /** Moves the chosen rows past their neighbour. */
  #move(by: 1 | -1): void {
    const { from, to } = this.#form.chosen;
    const rows = this.#form.rows;
    const neighbour = rows[by < 0 ? from - 1 : to + 1];
    const { line, count } = this.#chosenLines();
    if (!neighbour || count === 0) return;
    const first = Math.min(line, neighbour.line);
    const block = this.#sheet.lines.slice(line - 1, line - 1 + count);
    const other = this.#sheet.lines.slice(neighbour.line - 1, neighbour.line - 1 + neighbour.lines);
    this.#sheet.replaceLines(first, count + neighbour.lines, by < 0 ? [...block, ...other] : [...other, ...block]);
    this.#form.moved(from, to, by);
  }

  #step(step: () => number | null): void {
    this.close();
    const before = this.#sheet.lines.length;
    const line = step();
    if (line === null) return;
    const more = this.#sheet.lines.length - before;
    this.#form.shift(line, Math.max(0, -more), Math.max(0, more));
    this.#form.choose(this.#form.positionAt(line));
  }
}

/** The values of `table`'s chosen rows, separated by tabs. */
export function tabbed(rows: readonly HTMLTableRowElement[]): string {
  return rows.map((row) => Array.from(row.cells, (cell) => typed(plain(cell))).join("\t") + "\n").join("");
}

/** A cell's text without what only a screen reader gets. */
function plain(cell: HTMLTableCellElement): string {
  const copy = cell.cloneNode(true) as HTMLTableCellElement;
  for (const unseen of copy.querySelectorAll(".unseen, .query")) unseen.remove();
  return (copy.textContent ?? "").replace(/\s+/g, " ").trim();
}
