/** The values of a quantity under the conditions shown, as the cells of a row. */
import { conditionText, governs, type Shown } from "./conditions.js";
import { count, shown as numberText } from "./numbers.js";
import { findAll, type Axis, type Condition, type Extreme, type Quantity, type Value } from "./report.js";
import { words } from "./strings.js";

/** A value in the form. */
export interface ValueCell {
  text: string;
  /** Ringed because it governs, or lightly because it is the other extreme; or not. */
  ring: "" | "governs" | "extreme";
  /** The labels at which one value stands for many. */
  where: string;
  /** There is no value. */
  missing: boolean;
}

/** One cell for each label across, or a single wide one. */
export function valueCells(quantity: Quantity, shown: Shown): ValueCell[] {
  if (!quantity.values) return [rangeCell(quantity, shown)];
  const { across } = shown;
  if (!across || !quantity.axes.includes(across.name)) {
    return [{ ...cellAt(quantity, shown, shown.at), where: whereOf(quantity, shown) }];
  }
  return across.labels.map((label) => cellAt(quantity, shown, { ...shown.at, [across.name]: label }));
}

/** A value of any kind as text. */
export function valueText(value: Value | undefined, digits: number): string {
  if (typeof value === "number") return Number.isNaN(value) ? words.noValue : numberText(value, digits);
  if (typeof value === "boolean") return value ? words.yes : words.no;
  return value ?? words.noValue;
}

function cellAt(quantity: Quantity, shown: Shown, condition: Condition): ValueCell {
  const value = quantity.values?.[positionOf(quantity, shown.report.axes, condition)];
  const text = valueText(value, shown.digits);
  return { text, ring: ringOf(quantity, shown, condition), where: "", missing: text === words.noValue };
}

/** Values are row-major over the quantity's axes. */
function positionOf(quantity: Quantity, axes: readonly Axis[], condition: Condition): number {
  let position = 0;
  for (const name of quantity.axes) {
    const labels = axes.find((axis) => axis.name === name)?.labels ?? [];
    position = position * labels.length + Math.max(0, labels.indexOf(condition[name] ?? ""));
  }
  return position;
}

function whereOf(quantity: Quantity, shown: Shown): string {
  return quantity.axes.map((name) => shown.at[name] ?? "").join(", ");
}

function ringOf(quantity: Quantity, shown: Shown, condition: Condition): ValueCell["ring"] {
  const stands = (extreme: Extreme | null): boolean =>
    extreme !== null && quantity.axes.every((axis) => (extreme.condition[axis] ?? condition[axis]) === condition[axis]);
  for (const governing of findAll(shown.report.governing, quantity.symbol)) {
    const groups = governing.groups.length > 0 ? governing.groups : [governing];
    for (const group of groups) {
      if (stands(governs(group))) return "governs";
      if (stands(group.largest) || stands(group.smallest)) return "extreme";
    }
  }
  return "";
}

function rangeCell(quantity: Quantity, shown: Shown): ValueCell {
  const { largest, smallest } = quantity;
  const where = words.conditions(count(quantity.conditions));
  if (!largest || !smallest) return { text: words.noValue, ring: "", where, missing: true };
  const text = words.range(numberText(smallest.value, shown.digits), numberText(largest.value, shown.digits));
  return { text, ring: "", where, missing: false };
}

/** An extreme in words: value, unit and condition. */
export function extremeText(extreme: Extreme | null, unit: string | null, shown: Shown): string {
  if (!extreme) return words.noValue;
  const value = numberText(extreme.value, shown.digits) + (unit ? ` ${unit}` : "");
  const where = conditionText(shown.report, extreme.condition);
  return where ? words.at(value, where) : value;
}
