/** What each statement looks like in the form: its table rows, cell by cell, as data. */
import { cell, howCell, symbolCell, unitCell, valueColumns, type CellSpec } from "./cells.js";
import { findingsAt, type Shown } from "./conditions.js";
import { el, type Child } from "./dom.js";
import type { FormRow, Quantity } from "./report.js";
import { resultCells } from "./results.js";
import { words } from "./strings.js";
import { acrossTable, ownTable } from "./tables.js";
import { valueCells, type ValueCell } from "./values.js";

/** A statement: its cells, row by row. */
export interface RowSpec {
  className: string;
  rows: CellSpec[][];
}

/** The cells of `row` under the conditions shown. */
export function rowSpec(row: FormRow, shown: Shown): RowSpec {
  const columns = valueColumns(shown);
  const marks = marksOf(row, shown);
  switch (row.kind) {
    case "part":
    case "sub":
    case "note":
    case "prose":
    case "aside":
    case "blank":
      return { className: row.kind, rows: [[itemCell(row), textCell(row, columns, marks)]] };
    case "unreadable":
      return { className: row.kind, rows: [[itemCell(row), unreadableCell(row, columns), remarkCell(row, marks)]] };
    case "table":
      return tableSpec(row, shown, marks);
    case "governing":
    case "require":
    case "freebody":
    case "figure":
      return withCells(row, resultCells(row, shown), marks);
    default:
      return definitionSpec(row, shown, marks);
  }
}

function definitionSpec(row: FormRow, shown: Shown, marks: Marks): RowSpec {
  const quantities = quantitiesOf(row, shown);
  if (quantities.length === 0) {
    const empty = [symbolCell(row.symbol ?? ""), unitCell(row.unit), howCell(row, 1), emptyCell(valueColumns(shown))];
    return withCells(row, [empty], marks);
  }
  const rows = quantities.map((quantity, index) => [
    symbolCell(quantity.symbol),
    unitCell(quantity.unit ?? row.unit),
    ...(index === 0 ? [howCell(row, quantities.length)] : []),
    ...valueSpecs(valueCells(quantity, shown), shown),
  ]);
  return withCells(row, rows, marks);
}

/** Puts item and remark, which serve the whole statement, around its rows. */
function withCells(row: FormRow, rows: CellSpec[][], marks: Marks): RowSpec {
  const [first = [], ...rest] = rows;
  const item = { ...itemCell(row), rows: rows.length };
  const remark = { ...remarkCell(row, marks), rows: rows.length };
  return { className: row.kind, rows: [[item, ...first, remark], ...rest] };
}

function tableSpec(row: FormRow, shown: Shown, marks: Marks): RowSpec {
  const rows = row.table && shown.across && row.table.keys.length === 1 && row.table.keys[0]?.symbol === shown.across.name
    ? acrossTable(row, row.table, shown)
    : [[ownTable(row, valueColumns(shown))]];
  return withCells(row, rows, marks);
}

/** The quantities that `row` gives, in its order. */
export function quantitiesOf(row: FormRow, shown: Shown): Quantity[] {
  return row.quantities.flatMap((symbol) => shown.quantities.get(symbol) ?? []);
}

/** The cells of values, each under its label. */
export function valueSpecs(cells: ValueCell[], shown: Shown): CellSpec[] {
  const wide = cells.length === 1 ? valueColumns(shown) : 1;
  return cells.map((each, index) => {
    const className = `value${wide > 1 ? " wide" : each.text.length > LONG ? " long" : ""}${each.missing ? " missing" : ""}`;
    const caption = wide > 1 ? "" : (shown.across?.labels[index] ?? "");
    const key = `${each.text}\t${each.ring}\t${each.where}`;
    return cell(className, key, () => valueContent(each, wide > 1), { columns: wide, caption });
  });
}

/** Texts longer than this are set smaller, so that they stay in their column. */
const LONG = 9;

function valueContent({ text, ring, where }: ValueCell, wide: boolean): Child[] {
  const figure = ring
    ? el("span", { class: `ring ${ring}` }, text, el("span", { class: "unseen" }, ` (${words[ring]})`))
    : text;
  const content = [figure, where && where !== text && el("span", { class: "where" }, where)];
  return wide ? [el("span", { class: "stays" }, content)] : content;
}

/** The item number, which opens the row. */
function itemCell(row: FormRow): CellSpec {
  const number = row.item === null ? "" : String(row.item);
  return cell("item", `${number} ${nameOf(row)}`, () => [
    el("button", { type: "button", class: number ? "opens" : "opens unnumbered", tabindex: -1, "aria-label": nameOf(row) }, number || "\u00b7"),
  ], { tag: "th" });
}

/** What a row is called when it is spoken. */
export function nameOf(row: FormRow): string {
  const number = row.item === null ? "" : `${row.item}: `;
  const kind = row.kind === "definition" || row.kind === "unreadable" ? "" : `${row.kind} `;
  return `${number}${kind}${row.symbol ?? shortened(row.how || row.text)}`.trim() || "blank row";
}

function shortened(text: string): string {
  return text.length > 60 ? `${text.slice(0, 60)}\u2026` : text;
}

function emptyCell(columns: number): CellSpec {
  return cell("value wide missing", "", () => [], { columns });
}

function textCell(row: FormRow, columns: number, marks: Marks): CellSpec {
  const tag = row.kind === "part" || row.kind === "sub" ? "th" : "td";
  const text = row.kind === "blank" ? "" : row.how || row.text;
  const content = (): Child[] => [el("span", { class: "words" }, text), marks.content()];
  return cell("text", `${text}\t${marks.key}`, content, { tag, columns: columns + 4 });
}

function unreadableCell(row: FormRow, columns: number): CellSpec {
  return cell("text", row.text, () => [el("span", { class: "words" }, row.text)], { columns: columns + 3 });
}

function remarkCell(row: FormRow, marks: Marks): CellSpec {
  const remark = row.remark ?? "";
  return cell("remark", `${remark}\t${marks.key}`, () => [marks.content(), remark]);
}

interface Marks {
  key: string;
  content: () => Child[];
}

/** The numbered marks of the findings that lie in `row`. */
function marksOf(row: FormRow, shown: Shown): Marks {
  const found = findingsAt(shown, row.line, row.lines);
  const key = found.map(({ number, finding }) => `${number}${finding.severity}`).join();
  return { key, content: () => found.map(({ number, finding }) => queryMark(number, finding.severity)) };
}

/** A finding's number, which leads to it in the list. */
export function queryMark(number: number, severity: keyof typeof words.severity): HTMLElement {
  const label = `${words.finding(number)}, ${words.severity[severity].toLowerCase()}`;
  return el("a", { class: `query ${severity}`, href: `#finding-${number}`, "aria-label": label }, String(number));
}
