/** The head of the form: what stands over the columns, and the choice of the conditions shown. */
import { usedAxes, type Choice, type Shown } from "./conditions.js";
import { el, fill } from "./dom.js";
import { words } from "./strings.js";

/** Draws columns and their heads, where they differ from what is there. */
export function drawHead(head: HTMLTableSectionElement, columns: Element, shown: Shown): void {
  const key = JSON.stringify([shown.across, shown.governedBy && shown.at]);
  if (head.dataset["key"] === key) return;
  head.dataset["key"] = key;
  const labels = shown.across?.labels ?? [""];
  const fixed = (name: string) => el("col", { class: `column-${name}` });
  fill(columns, fixed("item"), fixed("symbol"), fixed("unit"), fixed("how"), labels.map(() => fixed("value")), fixed("remark"));
  fill(head, ...headRows(shown));
}

function headRows(shown: Shown): HTMLTableRowElement[] {
  const { across } = shown;
  const rows = across ? 2 : 1;
  const tall = (name: string, text: string) =>
    el("th", { scope: "col", role: "columnheader", class: name, rowspan: rows }, text);
  const values = across
    ? el("th", { scope: "colgroup", role: "columnheader", class: "axis", colspan: across.labels.length }, el("span", {}, across.name))
    : tall("axis", words.value);
  const first = el("tr", { role: "row" },
    tall("item", words.item), tall("symbol", words.symbol), tall("unit", words.unit), tall("how", words.how), values,
    tall("remark", words.remark));
  if (!across) return [first];
  const governing = shown.governedBy === null ? null : shown.at[across.name];
  const labels = across.labels.map((label) =>
    el("th", { scope: "col", role: "columnheader", class: label === governing ? "label governs" : "label" }, label));
  return [first, el("tr", { role: "row" }, labels)];
}

/** The choice of the conditions shown: a line of selections over the form. */
export class Selectors {
  readonly element = el("div", { class: "selectors", role: "group", "aria-label": "Conditions shown" });
  #choice: Choice;
  #changed: (choice: Choice) => void;
  #key = "";

  constructor(choice: Choice, changed: (choice: Choice) => void) {
    this.#choice = choice;
    this.#changed = changed;
  }

  /** Shows what is chosen, with what can be chosen instead. */
  show(shown: Shown): void {
    const axes = usedAxes(shown.report).filter(({ labels }) => labels.length > 1);
    const governing = [...new Set(shown.report.governing.map(({ symbol }) => symbol))];
    const key = JSON.stringify([axes.map(({ name, labels }) => [name, labels]), governing, shown.across?.name, shown.governedBy, shown.at]);
    this.element.hidden = axes.length === 0;
    if (key === this.#key) return;
    this.#key = key;
    const focused = this.element.contains(document.activeElement) ? document.activeElement?.id : undefined;
    fill(this.element, this.#fields(shown, axes.map(({ name, labels }) => ({ name, labels })), governing));
    if (focused) document.getElementById(focused)?.focus();
  }

  #fields(shown: Shown, axes: { name: string; labels: string[] }[], governing: string[]): HTMLElement[] {
    const across = shown.across?.name ?? "";
    const fields = [field("across", words.across, axes.map(({ name }) => [name, name]), across, (axis) => this.#set({ across: axis }))];
    const others = axes.filter(({ name }) => name !== across);
    if (governing.length > 0 && others.length > 0) {
      const options: [string, string][] = [["", words.asSet], ...governing.map((symbol): [string, string] => [symbol, words.whereGoverns(symbol)])];
      fields.push(field("governed", words.others, options, shown.governedBy ?? "", (symbol) => this.#govern(shown, symbol)));
    }
    for (const { name, labels } of others) {
      const at = shown.at[name] ?? "";
      fields.push(field(`at-${name}`, name, labels.map((label) => [label, label]), at, (label) =>
        this.#set({ governedBy: null, at: { ...shown.at, [name]: label } })));
    }
    return fields;
  }

  /** Labels set one by one start from those that were shown. */
  #govern(shown: Shown, symbol: string): void {
    this.#set(symbol ? { governedBy: symbol } : { governedBy: null, at: { ...shown.at } });
  }

  #set(change: Partial<Choice>): void {
    this.#choice = { ...this.#choice, ...change };
    this.#changed(this.#choice);
  }
}

function field(id: string, caption: string, options: [string, string][], chosen: string, change: (value: string) => void): HTMLElement {
  const select = el("select", { id: `choose-${id}`, onchange: (event: Event) => change((event.target as HTMLSelectElement).value) },
    options.map(([value, text]) => el("option", { value, selected: value === chosen }, text)));
  return el("div", {}, el("label", { class: "caption", for: select.id }, caption), select);
}
