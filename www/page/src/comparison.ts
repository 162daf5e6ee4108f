/** What differs between two states of a sheet: governing values, requirements, then values line by line. */
import type { Differences, QuantityDifference } from "./answers.js";
import { el, symbolText, type Child } from "./dom.js";
import { shown as numberText } from "./numbers.js";
import type { Extreme, Value } from "./report.js";
import { laterWords as words } from "./strings-later.js";
import { words as common } from "./strings.js";

/** This many conditions of a quantity are listed, those that changed most first. */
const LISTED_MOST = 6;

/** The differences as tables; a sentence where there are none. */
export function comparison(differences: Differences, digits: number): Child {
  const { governing, requirements, quantities } = differences;
  if (governing.length + requirements.length + quantities.length === 0) return el("p", {}, words.same);
  const extreme = (each: Extreme | null): Child =>
    each ? [numberText(each.value, digits), el("span", { class: "where" }, Object.values(each.condition).join(", "))] : common.noValue;
  const governed = governing.map((each) => line(
    [symbolText(each.symbol), el("span", { class: "where" }, `${common.governs}, ${words.extremes[each.of] ?? ""}`)],
    Object.values(each.group).join(", "), each.unit ?? "", extreme(each.old), extreme(each.new), changed(each.change, digits)));
  const verdict = (each: { met: boolean | null } | null): string =>
    each === null ? common.noValue : each.met === null ? common.notShown : each.met ? common.met : common.notMet;
  const required = requirements.map((each) => line(`${words.requirement}: ${each.text}`, "", "", verdict(each.old), verdict(each.new), changed(each.change, digits)));
  return el("div", { class: "scrolls", tabindex: 0, role: "region", "aria-label": words.comparison }, el("table", { class: "gathered" },
    el("thead", {}, el("tr", {}, [words.symbol, words.where, common.unit, words.before, words.now, words.change].map((text) => el("th", { scope: "col" }, text)))),
    el("tbody", {}, governed, required, quantities.map((each) => quantityLines(each, digits)))));
}

function quantityLines(each: QuantityDifference, digits: number): Child {
  const unit = each.old_unit === each.new_unit || !each.in_old ? each.new_unit : each.in_new ? `${each.old_unit ?? "1"}, ${each.new_unit ?? "1"}` : each.old_unit;
  if (!each.in_old || !each.in_new) return line(symbolText(each.symbol), "", unit ?? "", each.in_old ? "" : common.noValue, each.in_new ? words.added : words.gone, "");
  const most = [...each.changes].sort((a, b) => Math.abs(b.change ?? 0) - Math.abs(a.change ?? 0)).slice(0, LISTED_MOST);
  const rows = most.map(({ condition, old, new: next, change }, index) => line(index === 0 ? symbolText(each.symbol) : "",
    Object.values(condition).join(", "), index === 0 ? (unit ?? "") : "", text(old, digits), text(next, digits), changed(change, digits)));
  const left = each.changes.length - most.length;
  return [rows, left > 0 && line("", words.more(left), "", "", "", "")];
}

function line(name: Child, where: string, unit: string, old: Child, next: Child, change: string): HTMLTableRowElement {
  return el("tr", {}, el("th", { scope: "row" }, name), el("td", {}, where), el("td", {}, unit),
    el("td", { class: "number" }, old), el("td", { class: "number" }, next), el("td", { class: "number" }, change));
}

function text(value: Value, digits: number): string {
  if (typeof value === "number") return numberText(value, digits);
  if (typeof value === "boolean") return value ? common.yes : common.no;
  return value ?? common.noValue;
}

function changed(change: number | null, digits: number): string {
  if (change === null) return "";
  return (change > 0 ? "+" : "") + numberText(change, digits);
}
