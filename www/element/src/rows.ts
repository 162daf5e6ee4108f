/** The rows of the computation form in the element. */
import { signed, shown as numberText } from "../../page/src/numbers.js";
import { governs, inWords, isGoverning, positionOf, type Shown } from "./choosing.js";
import { el } from "../../page/src/dom.js";
import type { Condition, Extreme, Finding, FormRow, FormTable, Quantity, Requirement } from "./types.js";

/** A finding with its number in the list at the foot. */
export interface Numbered {
  readonly number: number;
  readonly finding: Finding;
}

/** What rows are made from. */
export interface Surroundings {
  readonly shown: Shown;
  readonly findings: readonly Numbered[];
  readonly readonly: boolean;
  /** How many columns of values there are. */
  readonly columns: number;
  /** An input was typed over. */
  set(symbol: string, expression: string): void;
}

/** The row of a statement; null where it takes none. */
export function rowOf(row: FormRow, around: Surroundings): HTMLTableRowElement | null {
  switch (row.kind) {
    case "blank":
    case "aside":
    case "title":
      return null;
    case "part":
    case "sub":
      return el("tr", { class: row.kind }, el("th", { colspan: 5 + around.columns, part: "heading", scope: "colgroup" }, row.how));
    case "note":
    case "prose":
    case "unreadable":
      return el("tr", { class: row.kind }, el("td", { colspan: 5 + around.columns }, row.kind === "unreadable" ? row.text : row.how, marks(row, around)));
    default:
      return item(row, around);
  }
}

function item(row: FormRow, around: Surroundings): HTMLTableRowElement {
  const symbol = row.symbol ?? row.quantities.join(", ");
  const values = row.table ? [] : valueCells(row, around);
  const wide = row.table ? el("td", { colspan: 1 + around.columns }, tableOf(row.table)) : el("td", { class: "how" }, how(row, around));
  return el("tr", { class: row.kind },
    el("td", { class: "item" }, row.item === null ? "" : String(row.item)),
    head(row.table ? (row.word ?? "") : symbol),
    el("td", { class: "unit" }, unitOf(row, around)),
    wide,
    ...values,
    el("td", { class: "remark" }, marks(row, around), row.remark ?? ""));
}

/** What names the row; a row without a name has no head. */
function head(symbol: string): HTMLTableCellElement {
  return symbol === "" ? el("td", {}) : el("th", { class: "symbol", scope: "row" }, symbol);
}

function unitOf(row: FormRow, { shown }: Surroundings): string {
  const [only, second] = row.quantities;
  if (only === undefined || second !== undefined || row.kind === "governing") return row.unit ?? "";
  return shown.quantities.get(only)?.unit ?? row.unit ?? "";
}

/** The formula, or a field for an input. */
function how(row: FormRow, around: Surroundings): Node {
  const { symbol } = row;
  const input = symbol !== null && row.kind === "definition" && around.shown.quantities.get(symbol)?.input;
  if (!input || around.readonly) return document.createTextNode(row.word ? `${row.word} ${row.how}` : row.how);
  const [, axis = "", value = row.how] = /^(by\s[^=]*=\s*)?(.*)$/s.exec(row.how) ?? [];
  const field = el("input", { part: "input", type: "text", value, "data-symbol": symbol, "aria-label": `${symbol}, how obtained`, spellcheck: "false" });
  field.size = Math.max(6, value.length + 1);
  field.addEventListener("change", () => around.set(symbol, field.value));
  return el("span", {}, axis, field);
}

function marks(row: FormRow, { findings }: Surroundings): HTMLElement | null {
  const own = findings.filter(({ finding }) => finding.line >= row.line && finding.line < row.line + row.lines);
  if (own.length === 0) return null;
  return el("span", { class: "marks" }, ...own.map(({ number, finding }) =>
    el("span", { class: `mark ${finding.severity}`, part: "finding", title: finding.message }, `${finding.severity} ${number}`)));
}

function valueCells(row: FormRow, around: Surroundings): HTMLTableCellElement[] {
  if (row.kind === "governing") return [el("td", { class: "wide", colspan: around.columns }, governingText(row, around))];
  if (row.kind === "require") return [el("td", { class: "wide", colspan: around.columns }, ...requirementText(row, around))];
  const [symbol, second] = row.quantities;
  const quantity = symbol !== undefined && second === undefined ? around.shown.quantities.get(symbol) : undefined;
  if (quantity && row.kind !== "figure" && row.kind !== "freebody") return cellsOf(quantity, around);
  return [el("td", { class: "wide", colspan: around.columns }, ...several(row, around))];
}

/** The fields of a record, one after the other. */
function several(row: FormRow, around: Surroundings): Node[] {
  if (row.kind === "figure" || row.kind === "freebody" || row.quantities.length < 2) return [];
  return row.quantities.flatMap((symbol) => {
    const quantity = around.shown.quantities.get(symbol);
    if (!quantity) return [];
    const text = textAt(quantity, around.shown, around.shown.at);
    return [el("div", {}, `${symbol} = ${text}${quantity.unit ? ` ${quantity.unit}` : ""}`)];
  });
}

function cellsOf(quantity: Quantity, around: Surroundings): HTMLTableCellElement[] {
  const { shown, columns } = around;
  const { across } = shown;
  if (!quantity.values) return [el("td", { class: "wide value", part: "value", colspan: columns }, rangeText(quantity, shown))];
  if (!across || !quantity.axes.includes(across.name)) {
    return [cell(quantity, shown, shown.at, columns)];
  }
  return across.labels.map((label) => cell(quantity, shown, within(shown.at, across.name, label), 1));
}

function within(at: Condition, axis: string, label: string): Condition {
  return Object.assign(Object.create(null) as Record<string, string>, at, { [axis]: label });
}

function cell(quantity: Quantity, shown: Shown, condition: Condition, columns: number): HTMLTableCellElement {
  const governing = isGoverning(shown, quantity, condition);
  const text = textAt(quantity, shown, condition);
  return el("td", { class: "value", part: governing ? "value governs" : "value", colspan: columns > 1 ? columns : null, "data-symbol": quantity.symbol },
    governing ? el("strong", { title: "governs" }, text) : text);
}

function textAt(quantity: Quantity, shown: Shown, condition: Condition): string {
  const value = quantity.values?.[positionOf(shown, quantity, condition)];
  if (typeof value === "number") return numberText(value, shown.digits);
  if (typeof value === "boolean") return value ? "yes" : "no";
  return value ?? "none";
}

function rangeText({ smallest, largest, conditions }: Quantity, { digits }: Shown): string {
  if (!smallest || !largest) return "none";
  return `${numberText(smallest.value, digits)} to ${numberText(largest.value, digits)} (${conditions} conditions)`;
}

function governingText(row: FormRow, { shown }: Surroundings): string {
  const entries = shown.result.governing.filter(({ line, symbol }) => line === row.line && row.quantities.includes(symbol));
  const say = (word: string, extreme: Extreme | null, unit: string | null) => {
    if (!extreme) return `${word} none`;
    const where = inWords(extreme.condition);
    return `${word} ${numberText(extreme.value, shown.digits)}${unit ? ` ${unit}` : ""}${where ? ` at ${where}` : ""}`;
  };
  return entries.map((entry) => {
    const symbol = entries.length > 1 ? `${entry.symbol}: ` : "";
    const first = governs(entry) === entry.smallest && entry.largest !== entry.smallest ? ["smallest", "largest"] as const : ["largest", "smallest"] as const;
    return symbol + first.map((end) => say(end, entry[end], entry.unit)).join("; ");
  }).join(". ");
}

function requirementText(row: FormRow, { shown }: Surroundings): (Node | string)[] {
  const found: Requirement | undefined = shown.result.requirements.find(({ line }) => line === row.line);
  if (!found) return [];
  const word = found.met === null ? "not shown" : found.met ? "met" : "not met";
  const { worst } = found;
  const reserve = worst ? ` reserve ${numberText(worst.reserve, shown.digits)}${worst.unit ? ` ${worst.unit}` : ""}${inWords(worst.condition) ? ` at ${inWords(worst.condition)}` : ""}` : "";
  return [el("span", { class: `verdict ${word.replace(" ", "-")}`, part: "verdict" }, word), reserve];
}

function tableOf(table: FormTable): HTMLTableElement {
  const heads = [...table.keys, ...table.columns];
  return el("table", { class: "own" },
    el("thead", {}, el("tr", {}, ...heads.map(({ symbol, unit }) => el("th", { scope: "col" }, unit ? `${symbol} ${unit}` : symbol)))),
    el("tbody", {}, ...table.rows.map((row) => el("tr", {}, ...row.cells.map((text, at) =>
      at < table.keys.length ? el("th", { scope: "row" }, text) : el("td", {}, signed(text)))))));
}
