/** Which value a cell of the form shows, so that its trail can be asked for. */
import { governs, type Shown } from "./conditions.js";
import type { Condition, FormRow, Quantity } from "./report.js";
import { quantitiesOf } from "./rows.js";

/** A value under a condition. */
export interface Asked {
  symbol: string;
  condition: Condition;
}

/** The value that stands in `cell`, in line `index` of the row; null where the cell holds none of the engine's. */
export function askedIn(cell: Element | null, row: FormRow, index: number, shown: Shown): Asked | null {
  if (!cell?.classList.contains("value") || cell.classList.contains("given")) return null;
  return askedOf(row, index, shown, cell.getAttribute("data-caption") ?? undefined);
}

/** The value of line `index` of `row` at a label across, or where the form stands. */
export function askedOf(row: FormRow, index: number, shown: Shown, label?: string): Asked | null {
  if (row.kind === "governing") return governingIn(row, index, shown);
  const quantity = quantitiesOf(row, shown)[index];
  if (!quantity || row.kind === "vary") return null;
  const at = shown.across && label !== undefined ? { ...shown.at, [shown.across.name]: label } : shown.at;
  return { symbol: quantity.symbol, condition: own(quantity, at) };
}

function governingIn(row: FormRow, index: number, shown: Shown): Asked | null {
  const entry = shown.report.governing.find(({ symbol }) => symbol === row.quantities[index]);
  const extreme = entry && governs(entry);
  return extreme ? { symbol: entry.symbol, condition: extreme.condition } : null;
}

function own(quantity: Quantity, at: Condition): Condition {
  return Object.fromEntries(quantity.axes.flatMap((axis) => (at[axis] === undefined ? [] : [[axis, at[axis]]])));
}
