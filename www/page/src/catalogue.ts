/** The catalogue: every function, unit, statement and sign, found by words and put into the row being typed. */
import type { Catalogue, CatalogueFunction } from "./answers.js";
import { el, fill, type Child } from "./dom.js";
import type { Slip } from "./slip.js";
import { laterWords as words } from "./strings-later.js";

/** An entry as it is listed. */
interface Entry {
  heading: string;
  name: string;
  what: string;
  /** Everything it is found by, in small letters. */
  found: string;
  /** What goes into the row. */
  insert: string;
  details: () => Child;
}

/** More than this many are not listed at once. */
const LISTED_MOST = 60;

export class CatalogueSlip {
  #slip: Slip;
  #insert: (text: string) => void;
  #read: () => Promise<Catalogue>;
  #entries: Entry[] | null = null;
  #search = el("input", { type: "search", id: "catalogue-search", placeholder: words.searchHint, autocomplete: "off", spellcheck: "false" });
  #counted = el("span", { class: "faint", role: "status" });
  #list = el("div", { class: "entries" });

  constructor(slip: Slip, read: () => Promise<Catalogue>, insert: (text: string) => void) {
    this.#slip = slip;
    this.#read = read;
    this.#insert = insert;
    this.#search.addEventListener("input", () => this.#draw());
  }

  /** Opens the catalogue with the keyboard in its search. */
  async show(): Promise<void> {
    this.#entries ??= entriesOf(await this.#read());
    const field = el("div", { class: "searching" }, el("label", { for: this.#search.id }, words.search), this.#search, this.#counted);
    this.#slip.show("catalogue", words.catalogue, [field, this.#list]);
    this.#draw();
    this.#search.focus();
    this.#search.select();
  }

  #draw(): void {
    const wanted = this.#search.value.toLowerCase().split(/\s+/).filter(Boolean);
    const all = (this.#entries ?? []).filter(({ found }) => wanted.every((word) => found.includes(word)));
    // What is called so comes before what only speaks of it.
    const rank = ({ name }: Entry) => (wanted.length > 0 && wanted.every((word) => name.toLowerCase().includes(word)) ? 0 : 1);
    const ordered = wanted.length > 0 ? [...all].sort((a, b) => rank(a) - rank(b)) : all;
    const listed = ordered.slice(0, LISTED_MOST);
    this.#counted.textContent = all.length > 0 ? words.found(listed.length, all.length) : words.nothingFound;
    let heading = "";
    fill(this.#list, listed.map((entry) => {
      const first = entry.heading !== heading;
      heading = entry.heading;
      return [first && el("h3", {}, heading), this.#drawn(entry, all.length === 1)];
    }));
  }

  #drawn(entry: Entry, open: boolean): HTMLElement {
    const insert = el("button", { type: "button", class: "fix", "aria-label": words.insertNamed(entry.name), onclick: () => this.#insert(entry.insert) }, words.insert);
    return el("div", { class: "entry" }, insert,
      el("details", { open }, el("summary", {}, el("b", {}, entry.name), " ", el("span", { class: "faint" }, entry.what)), entry.details()));
  }
}

function entriesOf(catalogue: Catalogue): Entry[] {
  const functions = catalogue.functions.map((each) => ({
    heading: each.group, name: each.name, what: each.what, insert: each.signature, details: () => functionDetails(each),
    found: lower(each.name, each.group, each.what, each.method, each.source, each.signature, ...each.arguments, ...each.gives),
  }));
  const units = catalogue.units.map((each) => ({
    heading: words.units, name: each.symbols.join(", "), what: `${each.name}, ${each.dimension}`, insert: each.symbols[0] ?? "",
    details: () => list([[words.dimension, each.dimension], [words.source, each.line]]), found: lower(each.line, each.dimension, "unit"),
  }));
  const wordings = [...catalogue.statements, ...catalogue.expressions].map((each) => ({
    heading: words.language, name: each.word, what: each.form, insert: each.form, found: lower(each.word, each.form, each.meaning),
    details: () => [el("p", {}, each.meaning), list([[words.example, el("pre", {}, each.example.trimEnd())]])],
  }));
  return [...functions, ...units, ...wordings];
}

function functionDetails(each: CatalogueFunction): Child {
  const lines = (texts: string[]) => texts.map((text) => el("span", { class: "line" }, text));
  return list([
    [words.signature, el("code", {}, each.signature)],
    [words.takes, lines(each.arguments)],
    [words.gives, lines(each.gives)],
    [words.method, each.method],
    [words.holds, each.holds],
    [words.source, each.source],
    [words.example, el("pre", {}, each.example.trimEnd())],
  ]);
}

function list(entries: [name: string, content: Child][]): HTMLElement {
  return el("dl", { class: "derivation" }, entries.map(([name, content]) => el("div", {}, el("dt", {}, name), el("dd", {}, content))));
}

function lower(...texts: string[]): string {
  return texts.join("\n").toLowerCase();
}
