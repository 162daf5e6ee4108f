/** The computation form: a ruled table that is patched in place after each evaluation. */
import { askedIn, askedOf, type Asked } from "./asking.js";
import type { CellSpec } from "./cells.js";
import { el, fill } from "./dom.js";
import { drawHead } from "./head.js";
import type { Shown } from "./conditions.js";
import type { FormRow } from "./report.js";
import { rowSpec, type RowSpec } from "./rows.js";
import { words } from "./strings.js";
import { RowWindow, type Tall } from "./window.js";

/** The columns that a row can be opened at. */
export type Place = "symbol" | "unit" | "how" | "remark";

export interface FormEvents {
  /** A row, or the empty one at the foot (null), was clicked or activated at `place`. */
  open(row: FormRow | null, place: Place): void;
  /** A key went down on a closed row. */
  key(event: KeyboardEvent): void;
  /** A value was chosen, to see how it came about. */
  trail(asked: Asked): void;
}

/** A drawn statement. */
interface RowView extends Tall {
  body: HTMLTableSectionElement;
  row: FormRow;
  spec: RowSpec | null;
  /** The conditions that it was drawn under last. */
  drawn?: Shown;
}

/** An open editor and the line it stands at. */
interface OpenEditor {
  body: HTMLTableSectionElement;
  line: number;
  count: number;
}

/** Rows that are nothing but text, which the open editor shows already. */
const TEXT_ONLY = new Set(["part", "sub", "note", "prose", "aside", "blank", "unreadable"]);

export class Form {
  readonly table: HTMLTableElement;
  #caption = el("caption", { class: "unseen" }, words.form);
  #columns = el("colgroup");
  #head = el("thead");
  #foot: HTMLTableSectionElement;
  #views: RowView[] = [];
  #editor: OpenEditor | null = null;
  #current = 0;
  #anchor = 0;
  #width = 0;
  #shown: Shown | null = null;
  #window: RowWindow;

  constructor(events: FormEvents) {
    const add = el("button", { type: "button", class: "opens", tabindex: -1, "aria-label": words.newRow }, "+");
    const line = el("tr", {}, el("th", { class: "item", scope: "row" }, add), el("td", { class: "text" }));
    this.#foot = el("tbody", { class: "foot" }, line);
    this.table = el("table", { class: "form" }, this.#caption, this.#columns, this.#head, this.#foot);
    this.table.addEventListener("click", (event) => this.#click(event, events));
    this.table.addEventListener("keydown", (event) => {
      if (!this.#inEditor(event.target)) events.key(event);
    });
    this.table.addEventListener("focusin", (event) => this.#focused(event));
    this.#window = new RowWindow(this.table, () => {
      if (this.#window.look(this.#views)) this.#redraw();
    });
  }

  /** The drawn rows, in order. */
  get rows(): FormRow[] {
    return this.#views.map(({ row }) => row);
  }

  /** How many columns lie between item and the form's right edge. */
  get columns(): number {
    return this.#width + 4;
  }

  /** The chosen rows: first and last position; the empty row at the foot is behind the last. */
  get chosen(): { from: number; to: number } {
    return { from: Math.min(this.#current, this.#anchor), to: Math.max(this.#current, this.#anchor) };
  }

  /** The position that the keyboard is at. */
  get current(): number {
    return this.#current;
  }

  /** Draws `rows` under the conditions shown. Only what differs is touched; an open editor stays where it is. */
  show(rows: readonly FormRow[], shown: Shown): void {
    const focused = document.activeElement !== null && document.activeElement === this.#button(this.#current);
    this.#shown = shown;
    drawHead(this.#head, this.#columns, shown);
    this.#widen(shown.across?.labels.length ?? 1);
    this.#views = aligned(this.#views, rows);
    this.#window.look(this.#views);
    this.#redraw();
    // A new item number comes with a new button.
    if (focused) this.#button(this.#current)?.focus({ preventScroll: true });
  }

  /** Shows an editor at its line, or none. */
  place(editor: OpenEditor | null): void {
    if (this.#editor && this.#editor !== editor) this.#editor.body.remove();
    this.#editor = editor;
    this.#arrange();
  }

  /** Keeps the rows' lines right between a change of the text and its report. */
  shift(line: number, removed: number, inserted: number): void {
    for (const { row } of this.#views) {
      if (row.line >= line + removed) row.line += inserted - removed;
      else if (row.line === line && removed > 0) row.lines = Math.max(1, row.lines + inserted - removed);
    }
  }

  /** The position of the row that covers `line`; the number of rows where none does. */
  positionAt(line: number): number {
    const found = this.#views.findIndex(({ row }) => line < row.line + row.lines);
    return found < 0 ? this.#views.length : found;
  }

  /** Moves the keyboard to a position, extending the choice or starting it anew. */
  choose(position: number, extend = false): void {
    this.#current = Math.max(0, Math.min(position, this.#views.length));
    this.#reach(this.#current);
    if (!extend) this.#anchor = this.#current;
    this.#mark();
    this.#button(this.#current)?.focus();
  }

  /** The chosen rows went past a neighbour: they stay chosen, and their lines are right at once. */
  moved(from: number, to: number, by: 1 | -1): void {
    const views = [...this.#views];
    const [neighbour] = views.splice(by < 0 ? from - 1 : to + 1, 1);
    if (!neighbour) return;
    views.splice(by < 0 ? to : from, 0, neighbour);
    let line = Math.min(...this.#views.map(({ row }) => row.line));
    for (const { row } of views) {
      row.line = line;
      line += row.lines;
    }
    this.#views = views;
    this.#arrange();
    this.#anchor += by;
    const anchor = this.#anchor;
    this.choose(this.#current + by, true);
    this.#anchor = anchor;
  }

  /** The table rows of the chosen statements. */
  get chosenRows(): HTMLTableRowElement[] {
    const { from, to } = this.chosen;
    const views = this.#views.slice(from, to + 1);
    for (const view of views) if (this.#shown && view.drawn !== this.#shown) draw(view, this.#shown);
    return views.flatMap(({ body }) => Array.from(body.rows));
  }

  /** The first value of the row that the keyboard is at. */
  get askedNow(): Asked | null {
    const view = this.#views[this.#current];
    return view && this.#shown ? askedOf(view.row, 0, this.#shown) : null;
  }

  #askedAt(position: number, target: Element): Asked | null {
    const view = this.#views[position];
    const cell = target.closest("table.form > tbody > tr > *");
    if (!view || !cell || !this.#shown) return null;
    const index = Array.from(view.body.rows).indexOf(cell.parentElement as HTMLTableRowElement);
    return askedIn(cell, view.row, index, this.#shown);
  }

  /** The paper has to be as wide as its form, which the form's style alone could not tell it. */
  #widen(width: number): void {
    if (width === this.#width) return;
    this.#width = width;
    document.documentElement.style.setProperty("--value-columns", String(width));
    this.#foot.querySelector("td")?.setAttribute("colspan", String(this.columns));
  }

  /** Draws all rows, for paper, or again only those in the window. */
  whole(whole: boolean): void {
    this.#window.whole = whole;
    if (this.#window.look(this.#views)) this.#redraw();
  }

  /** Draws the rows that are in the window, and marks those that are chosen. */
  #redraw(): void {
    this.#arrange();
    this.#mark();
  }

  /** Brings the window over the row at `position`, so that it can have the keyboard. */
  #reach(position: number): void {
    if (position >= this.#views.length || this.#window.holds(position)) return;
    const top = this.table.getBoundingClientRect().top + window.scrollY;
    window.scrollTo({ top: top + this.#window.offset(this.#views, position) - window.innerHeight / 2, behavior: "instant" });
    if (this.#window.look(this.#views)) this.#redraw();
  }

  #bodyAt(position: number): HTMLTableSectionElement {
    return this.#views[position]?.body ?? this.#foot;
  }

  #button(position: number): HTMLButtonElement | null {
    return this.#bodyAt(position).querySelector<HTMLButtonElement>("button.opens");
  }

  #mark(): void {
    const { from, to } = this.chosen;
    this.#current = Math.min(this.#current, this.#views.length);
    for (let position = 0; position <= this.#views.length; position++) {
      if (position < this.#views.length && !this.#window.holds(position)) continue;
      const chosen = from < to && position >= from && position <= to;
      const body = this.#bodyAt(position);
      if (body.classList.contains("chosen") !== chosen) body.classList.toggle("chosen", chosen);
      const button = body.querySelector<HTMLButtonElement>("button.opens");
      const index = position === this.#current ? 0 : -1;
      if (button && button.tabIndex !== index) button.tabIndex = index;
    }
  }

  #arrange(): void {
    const editor = this.#editor;
    const bodies: (HTMLElement | Tall)[] = [];
    let placed = false;
    for (const [position, view] of this.#views.entries()) {
      const { body, row } = view;
      const covered = editor !== null && row.line >= editor.line && row.line < editor.line + editor.count;
      if (editor && !placed && row.line >= editor.line) {
        bodies.push(editor.body);
        placed = true;
      }
      if (!covered && !this.#window.holds(position)) {
        bodies.push(view);
        continue;
      }
      if (this.#shown && view.drawn !== this.#shown) draw(view, this.#shown);
      if (body.classList.contains("open") !== covered) body.classList.toggle("open", covered);
      const hidden = covered && TEXT_ONLY.has(row.kind);
      if (body.hidden !== hidden) body.hidden = hidden;
      bodies.push(body);
    }
    if (editor && !placed) bodies.push(editor.body);
    arrange(this.table, this.#head, this.#window.spaced([...bodies, this.#foot]));
  }

  #inEditor(target: EventTarget | null): boolean {
    // An editor that this very event closed is no longer in the table, so the editor's own frame counts too.
    return target instanceof Element && target.closest("tbody.editor, .cm-editor") !== null;
  }

  #focused(event: FocusEvent): void {
    if (!(event.target instanceof HTMLButtonElement) || !event.target.classList.contains("opens")) return;
    const position = this.#positionOf(event.target);
    if (position === null || position === this.#current) return;
    this.#current = this.#anchor = position;
    this.#mark();
  }

  #positionOf(target: Element): number | null {
    const body = target.closest("table.form > tbody");
    if (body === this.#foot) return this.#views.length;
    const found = this.#views.findIndex((view) => view.body === body);
    return found < 0 ? null : found;
  }

  #click(event: MouseEvent, events: FormEvents): void {
    const target = event.target as Element;
    if (this.#inEditor(target) || target.closest("a")) return;
    // A text that was just marked with the mouse is to be copied, not to be typed over.
    if (document.getSelection()?.isCollapsed === false && !target.closest("button")) return;
    const position = this.#positionOf(target);
    if (position === null) return;
    if (event.shiftKey) {
      this.choose(position, true);
      return;
    }
    this.#current = this.#anchor = position;
    const asked = this.#askedAt(position, target);
    if (asked) events.trail(asked);
    else events.open(this.#views[position]?.row ?? null, placeOf(target));
  }
}

function placeOf(target: Element): Place {
  const className = target.closest("table.form > tbody > tr > *")?.className ?? "";
  if (className.startsWith("unit")) return "unit";
  if (className.startsWith("symbol") || className.startsWith("item")) return "symbol";
  return className.startsWith("remark") ? "remark" : "how";
}

/** Puts `bodies` behind `head` in their order, moving only those that stand elsewhere. */
function arrange(table: HTMLTableElement, head: Element, bodies: readonly HTMLElement[]): void {
  const wanted = new Set<Element>(bodies);
  for (const body of Array.from(table.tBodies)) if (!wanted.has(body)) body.remove();
  let next = head.nextElementSibling;
  for (const body of bodies) {
    if (body === next) next = next.nextElementSibling;
    else table.insertBefore(body, next);
  }
}

/** Gives each row a view, the old ones where a row is the same as before. */
function aligned(old: readonly RowView[], rows: readonly FormRow[]): RowView[] {
  const same = (view: RowView | undefined, row: FormRow | undefined) =>
    view !== undefined && row !== undefined && view.row.kind === row.kind && view.row.text === row.text;
  const most = Math.min(old.length, rows.length);
  let head = 0;
  while (head < most && same(old[head], rows[head])) head++;
  let tail = 0;
  while (tail < most - head && same(old[old.length - 1 - tail], rows[rows.length - 1 - tail])) tail++;
  return rows.map((row, index) => {
    const fromEnd = rows.length - index;
    const source = fromEnd <= tail ? old[old.length - fromEnd] : index < old.length - tail ? old[index] : undefined;
    return source ? { ...source, row } : { body: el("tbody", { role: "rowgroup" }), row, spec: null };
  });
}

function draw(view: RowView, shown: Shown): void {
  const spec = rowSpec(view.row, shown);
  const before = view.spec;
  view.spec = spec;
  view.drawn = shown;
  if (view.body.dataset["kind"] !== spec.className) view.body.dataset["kind"] = spec.className;
  while (view.body.rows.length > spec.rows.length) view.body.lastElementChild?.remove();
  spec.rows.forEach((cells, index) => {
    const line = view.body.rows[index] ?? view.body.appendChild(el("tr", { role: "row" }));
    patch(line, before?.rows[index] ?? [], cells);
  });
}

function patch(line: HTMLTableRowElement, before: readonly CellSpec[], cells: readonly CellSpec[]): void {
  while (line.cells.length > cells.length) line.lastElementChild?.remove();
  cells.forEach((spec, index) => {
    const old = before[index];
    const drawn = line.cells[index];
    if (old && drawn && sameFrame(old, spec)) {
      if (old.key !== spec.key) fill(drawn, spec.content());
      return;
    }
    const made = make(spec);
    if (drawn) drawn.replaceWith(made);
    else line.append(made);
  });
}

function sameFrame(a: CellSpec, b: CellSpec): boolean {
  return a.tag === b.tag && a.className === b.className && a.columns === b.columns && a.rows === b.rows && a.caption === b.caption;
}

function make(spec: CellSpec): HTMLTableCellElement {
  const role = spec.tag === "th" ? "rowheader" : "cell";
  return el(spec.tag, {
    class: spec.className,
    role,
    scope: spec.tag === "th" ? "row" : null,
    colspan: spec.columns > 1 ? spec.columns : null,
    rowspan: spec.rows > 1 ? spec.rows : null,
    "data-caption": spec.caption || null,
  }, spec.content());
}
