/** How a `table` statement is drawn: across the form where its key runs across, else as a table of its own. */
import { cell, symbolCell, unitCell, type CellSpec } from "./cells.js";
import type { Shown } from "./conditions.js";
import { el } from "./dom.js";
import type { FormHead, FormRow, FormTable } from "./report.js";
import { words } from "./strings.js";
import { signed } from "./numbers.js";

/** A row of the form for each column of the table, its cells under the labels across, as typed. */
export function acrossTable(row: FormRow, table: FormTable, shown: Shown): CellSpec[][] {
  const labels = shown.across?.labels ?? [];
  const byLabel = new Map(table.rows.map((each) => [each.cells[0] ?? "", each]));
  // Labels of an axis of numbers are written by the engine, so there the order of the rows tells which is which.
  const rowAt = (index: number) => byLabel.get(labels[index] ?? "") ?? table.rows[index];
  return table.columns.map(({ symbol, unit }, column) => [
    symbolCell(symbol),
    unitCell(unit ?? shown.quantities.get(symbol)?.unit ?? null),
    ...(column === 0 ? [headCell(row, table.columns.length)] : []),
    ...labels.map((label, index) => typedCell(rowAt(index)?.cells[column + table.keys.length] ?? "", label)),
  ]);
}

function headCell(row: FormRow, rows: number): CellSpec {
  const text = row.table ? tableName(row.table) : "";
  return cell("how", text, () => [text], { rows });
}

function typedCell(text: string, caption: string): CellSpec {
  const none = text.trim() === "" || text.trim() === "-";
  const key = none ? words.noValue : signed(text.trim());
  return cell(`value given${none ? " missing" : ""}`, key, () => [key], { caption });
}

/** The table by itself, over the whole width between item and remark. */
export function ownTable(row: FormRow, valueColumns: number): CellSpec {
  return cell("holds-table", row.text, () => (row.table ? [drawn(row.table)] : [row.text]), { columns: valueColumns + 3 });
}

function drawn(table: FormTable): HTMLTableElement {
  const remarks = table.rows.some(({ remark }) => remark);
  const head = ({ symbol, unit }: FormHead, className: string) =>
    el("th", { scope: "col", class: className }, symbol, unit !== null && el("span", { class: "where" }, unit));
  const heads = [
    ...table.keys.map((key) => head(key, "key")),
    ...table.columns.map((column) => head(column, "")),
    remarks && el("th", { scope: "col" }, words.remark),
  ];
  const body = table.rows.map(({ cells, remark }) => el("tr", {},
    cells.map((text, column) =>
      column < table.keys.length ? el("th", { scope: "row", class: "key" }, signed(text)) : el("td", {}, signed(text))),
    remarks && el("td", { class: "remark" }, remark)));
  return el("table", { class: "own", "aria-label": tableName(table) }, el("thead", {}, el("tr", {}, heads)), el("tbody", {}, body));
}

function tableName(table: FormTable): string {
  return `table by ${table.keys.map(({ symbol }) => symbol).join(", ")}`;
}
