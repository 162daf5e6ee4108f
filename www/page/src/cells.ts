/** The cells of the form as data, and the kinds that several rows share. */
import type { Shown } from "./conditions.js";
import { symbolText, type Child } from "./dom.js";
import type { FormRow } from "./report.js";

/** A cell: what tells it from another, and how to fill it. */
export interface CellSpec {
  tag: "td" | "th";
  className: string;
  columns: number;
  rows: number;
  /** Equal keys mean equal content. */
  key: string;
  /** The label of its column, for narrow screens where the head does not stand above it. */
  caption: string;
  content: () => Child[];
}

/** A plain cell. */
export function cell(className: string, key: string, content: () => Child[], more: Partial<CellSpec> = {}): CellSpec {
  return { tag: "td", className, columns: 1, rows: 1, key, caption: "", content, ...more };
}

/** How many columns the values take. */
export function valueColumns(shown: Shown): number {
  return shown.across?.labels.length ?? 1;
}

/** Names longer than this are set smaller, so that they stay whole in their column. */
const LONG = 9;

/** A symbol in the symbol column. */
export function symbolCell(symbol: string): CellSpec {
  const longest = Math.max(...symbol.split(/[._]/).map((part) => part.length));
  return cell(longest > LONG ? "symbol long" : "symbol", symbol, () => symbolText(symbol));
}

/** A unit in the unit column. */
export function unitCell(unit: string | null): CellSpec {
  return cell("unit", unit ?? "", () => [unit ?? ""]);
}

/** How the row was obtained, as typed. */
export function howCell(row: FormRow, rows: number, columns = 1): CellSpec {
  return cell("how", row.how, () => [row.how], { rows, columns });
}
