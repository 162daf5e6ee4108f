/** Which rows of a long form stand in the document: those in sight and a good way about them, spacers for the others. */
import { el } from "./dom.js";

/** A form with no more rows than this stands in the document whole. */
const WHOLE_MOST = 300;
/** This far about the window rows are drawn, in pixels. */
const ABOUT = 900;
/** A row's height before it has been drawn. */
const HEIGHT_GUESSED = 27;

/** A row as the window sees it. */
export interface Tall {
  body: HTMLElement;
  /** Its height when it was last drawn. */
  height?: number;
}

export class RowWindow {
  #table: HTMLTableElement;
  #spacers: HTMLTableSectionElement[] = [];
  #from = 0;
  #to = Infinity;
  #asked = false;
  #whole = false;

  /** `moved` is called when other rows have come into the window. */
  constructor(table: HTMLTableElement, moved: () => void) {
    this.#table = table;
    const look = () => {
      if (this.#asked || this.#to === Infinity) return;
      this.#asked = true;
      requestAnimationFrame(() => {
        this.#asked = false;
        moved();
      });
    };
    window.addEventListener("scroll", look, { passive: true });
    window.addEventListener("resize", look, { passive: true });
  }

  /** Whether the row at `position` is to stand in the document. */
  holds(position: number): boolean {
    return position >= this.#from && position < this.#to;
  }

  /** Has all rows stand in the document, as paper wants them, or only those about the window. */
  set whole(whole: boolean) {
    this.#whole = whole;
  }

  /** Looks where the window stands over `rows`; gives whether other rows are in it than before. */
  look(rows: readonly Tall[]): boolean {
    const before = [this.#from, this.#to];
    if (this.#whole || rows.length <= WHOLE_MOST) {
      this.#from = 0;
      this.#to = Infinity;
    } else {
      this.#measure(rows);
      const above = -this.#table.getBoundingClientRect().top;
      // A little scrolling shows nothing new, so nothing is drawn.
      const loose = this.#to !== Infinity && inside(rows, this.#from, this.#to, above);
      if (!loose) [this.#from, this.#to] = range(rows, above - ABOUT, above + window.innerHeight + ABOUT);
    }
    return before[0] !== this.#from || before[1] !== this.#to;
  }

  /** How far below the table's top the row at `position` begins. */
  offset(rows: readonly Tall[], position: number): number {
    return rows.slice(0, position).reduce((sum, row) => sum + heightOf(row), 0);
  }

  /** The bodies, with spacers in the place of rows that are only told. */
  spaced(bodies: readonly (HTMLElement | Tall)[]): HTMLElement[] {
    const made: HTMLElement[] = [];
    let left = 0;
    let used = 0;
    const space = () => {
      if (left === 0) return;
      const spacer = (this.#spacers[used++] ??= el("tbody", { class: "spacer", "aria-hidden": "true" }, el("tr", {}, el("td", {}))));
      const height = `${left}px`;
      const cell = spacer.rows[0]?.cells[0];
      if (cell && cell.style.height !== height) cell.style.height = height;
      made.push(spacer);
      left = 0;
    };
    for (const each of bodies) {
      if (each instanceof HTMLElement) {
        space();
        made.push(each);
      } else {
        left += heightOf(each);
      }
    }
    space();
    return made;
  }

  #measure(rows: readonly Tall[]): void {
    for (const row of rows.slice(this.#from, Math.min(this.#to, rows.length))) if (row.body.isConnected) row.height = row.body.offsetHeight;
  }
}

function heightOf(row: Tall): number {
  return row.height ?? HEIGHT_GUESSED;
}

/** Whether the rows from `from` to `to` still reach well beyond the window. */
function inside(rows: readonly Tall[], from: number, to: number, above: number): boolean {
  const [first, last] = range(rows, above - ABOUT / 3, above + window.innerHeight + ABOUT / 3);
  return from <= first && Math.min(to, rows.length) >= last;
}

/** The rows between two heights below the table's top. */
function range(rows: readonly Tall[], top: number, bottom: number): [from: number, to: number] {
  let at = 0;
  let from = 0;
  while (from < rows.length && at + heightOf(rows[from] as Tall) < top) at += heightOf(rows[from++] as Tall);
  let to = from;
  while (to < rows.length && at < bottom) at += heightOf(rows[to++] as Tall);
  return [from, to];
}
