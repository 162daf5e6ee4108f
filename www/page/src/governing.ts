/** The governing conditions, gathered under the form. */
import { conditionText, type Shown } from "./conditions.js";
import { el, fill, symbolText } from "./dom.js";
import { count, shown as numberText } from "./numbers.js";
import type { Extreme, Governing, Group } from "./report.js";
import { words } from "./strings.js";

export class GoverningConditions {
  readonly element: HTMLElement;
  #body = el("tbody");
  #key = "";

  constructor() {
    const heads = [words.quantity, words.unit, words.largest, words.condition, words.smallest, words.condition, words.over, words.counted];
    const table = el("table", { class: "gathered", "aria-labelledby": "governing-heading" },
      el("thead", {}, el("tr", {}, heads.map((text) => el("th", { scope: "col" }, text)))), this.#body);
    this.element = el("section", { class: "governing", "aria-labelledby": "governing-heading" },
      el("h2", { id: "governing-heading" }, words.governing), el("div", { class: "scrolls", tabindex: 0, role: "region", "aria-label": words.governing }, table));
  }

  /** Lists the governing conditions of the report. */
  show(shown: Shown): void {
    const { governing } = shown.report;
    this.element.hidden = governing.length === 0;
    const key = JSON.stringify([governing, shown.digits]);
    if (key === this.#key) return;
    this.#key = key;
    fill(this.#body, governing.map((entry) => groupsOf(entry).map((group, index) => line(entry, group, index === 0, shown))));
  }
}

function groupsOf(entry: Governing): Group[] {
  return entry.groups.length > 0 ? entry.groups : [{ condition: {}, largest: entry.largest, smallest: entry.smallest }];
}

function line(entry: Governing, group: Group, first: boolean, shown: Shown): HTMLTableRowElement {
  const where = conditionText(shown.report, group.condition);
  const extreme = (each: Extreme | null) => [
    el("td", { class: "number" }, each ? numberText(each.value, shown.digits) : words.noValue),
    el("td", {}, each ? conditionText(shown.report, each.condition) : ""),
  ];
  return el("tr", {},
    el("th", { scope: "row" }, symbolText(entry.symbol), where && el("span", { class: "where" }, where)),
    el("td", {}, entry.unit ?? ""), extreme(group.largest), extreme(group.smallest),
    el("td", {}, entry.over.join(", ")), el("td", { class: "number" }, first ? countText(entry) : ""));
}

function countText(entry: Governing): string {
  const all = count(entry.conditions);
  return entry.without_value > 0 ? `${all}, ${words.withoutValue(count(entry.without_value))}` : all;
}
