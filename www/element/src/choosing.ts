/** Which conditions are shown: one axis across, a label for each of the others. */
import type { Axis, Condition, Extreme, Governing, Quantity, Result } from "./types.js";

/** More labels than this make an axis too wide to run across. */
const WIDEST = 24;

/** Both extremes. */
type Ends = Pick<Governing, "largest" | "smallest">;

/** What is shown. */
export interface Shown {
  readonly result: Result;
  readonly digits: number;
  readonly across: Axis | null;
  /** A label for each axis. */
  readonly at: Condition;
  readonly quantities: ReadonlyMap<string, Quantity>;
}

/** What `result` shows when `chosen` was chosen; the labels of the first governing condition where nothing was. */
export function shownBy(result: Result, digits: number, chosen: ReadonlyMap<string, string>): Shown {
  const used = usedAxes(result);
  const first = result.governing[0];
  const quantities = new Map(result.quantities.map((quantity) => [quantity.symbol, quantity]));
  const over = first ? quantities.get(first.symbol)?.axes : undefined;
  const narrow = used.filter(({ labels }) => labels.length <= WIDEST);
  const across = narrow.find(({ name }) => over?.includes(name)) ?? narrow[0] ?? null;
  const governing = first ? governs(first)?.condition : undefined;
  const at = Object.create(null) as Record<string, string>;
  for (const { name, labels } of used) {
    const label = chosen.get(name) ?? governing?.[name];
    at[name] = label !== undefined && labels.includes(label) ? label : (labels[0] ?? "");
  }
  return { result, digits, across, at, quantities };
}

/** The axes that something varies over, and that are not across. */
export function othersOf({ result, across }: Shown): Axis[] {
  return usedAxes(result).filter(({ name, labels }) => name !== across?.name && labels.length > 1);
}

/** The extreme of larger magnitude. */
export function governs(of: Ends): Extreme | null {
  const { largest, smallest } = of;
  if (!largest || !smallest) return largest ?? smallest;
  return Math.abs(smallest.value) > Math.abs(largest.value) ? smallest : largest;
}

/** Whether `condition` is where a quantity governs. */
export function isGoverning(shown: Shown, quantity: Quantity, condition: Condition): boolean {
  const entries = shown.result.governing.filter(({ symbol }) => symbol === quantity.symbol);
  const groups = entries.flatMap((entry): readonly Ends[] => (entry.groups.length > 0 ? entry.groups : [entry]));
  return groups.some((group) => {
    const extreme = governs(group);
    return extreme !== null && quantity.axes.every((axis) => (extreme.condition[axis] ?? condition[axis]) === condition[axis]);
  });
}

/** The place of a condition among the values of a quantity, which are row-major over its axes. */
export function positionOf(shown: Shown, quantity: Quantity, condition: Condition): number {
  let position = 0;
  for (const name of quantity.axes) {
    const labels = shown.result.axes.find((axis) => axis.name === name)?.labels ?? [];
    position = position * labels.length + Math.max(0, labels.indexOf(condition[name] ?? ""));
  }
  return position;
}

/** A condition in words. */
export function inWords(condition: Condition): string {
  return Object.entries(condition).map(([axis, label]) => `${axis} ${label}`).join(", ");
}

function usedAxes(result: Result): Axis[] {
  const names = new Set(result.quantities.flatMap(({ axes }) => axes));
  return result.axes.filter(({ name, labels }) => names.has(name) && labels.length > 0);
}
