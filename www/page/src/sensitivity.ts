/** Which inputs with tolerances move the governing values, and whether another condition could govern. */
import { conditionText, type Shown } from "./conditions.js";
import { el, fill, symbolText, type Child } from "./dom.js";
import { shown as numberText } from "./numbers.js";
import type { Condition, Corner, End, Governing } from "./report.js";
import { laterWords as words } from "./strings-later.js";

export class SensitivitySection {
  readonly element: HTMLElement;
  #body = el("tbody");
  #key = "";

  constructor() {
    const heads = [words.symbol, words.movedBy, words.effect, words.share, words.worst, words.couldGovern];
    this.element = el("section", { class: "sensitivity", hidden: true, "aria-labelledby": "sensitivity-heading" },
      el("h2", { id: "sensitivity-heading" }, words.sensitivity),
      el("div", { class: "scrolls", tabindex: 0, role: "region", "aria-label": words.sensitivity },
        el("table", { class: "gathered", "aria-labelledby": "sensitivity-heading" },
          el("thead", {}, el("tr", {}, heads.map((text) => el("th", { scope: "col" }, text)))), this.#body)));
  }

  /** Lists what the tolerances do. */
  show(shown: Shown): void {
    const moved = shown.report.governing.filter(({ sensitivity }) => sensitivity.length > 0);
    this.element.hidden = moved.length === 0;
    const key = JSON.stringify([moved, shown.digits]);
    if (key === this.#key) return;
    this.#key = key;
    fill(this.#body, moved.map((entry) => (["largest", "smallest"] as const).map((end) => lines(entry, end, shown))));
  }
}

function lines(entry: Governing, end: End, shown: Shown): Child {
  const moved = entry.sensitivity.filter(({ of }) => of === end);
  return moved.map((each, index) => el("tr", {},
    el("th", { scope: "row" }, index === 0 && [symbolText(entry.symbol), el("span", { class: "where" }, words.extremes[end] ?? "")]),
    el("td", {}, el("i", {}, symbolText(each.symbol)), where(each.condition, shown)),
    el("td", { class: "number" }, withUnit(each.effect, entry, shown)),
    el("td", { class: "number" }, `${numberText(each.share * 100, 3)} %`),
    el("td", {}, index === 0 && worst(entry.corners.find(({ of }) => of === end), entry, shown)),
    el("td", {}, index === 0 && others(entry, end, shown))));
}

function worst(corner: Corner | undefined, entry: Governing, shown: Shown): Child {
  if (!corner) return null;
  const inputs = corner.inputs.map(({ symbol, end }) => `${symbol} ${end === "+" ? "+" : "\u2212"}`).join(", ");
  return [withUnit(corner.value, entry, shown), where(corner.condition, shown), el("span", { class: "where" }, inputs)];
}

function others(entry: Governing, end: End, shown: Shown): string {
  const conditions = entry.others.filter(({ of }) => of === end).flatMap((each) => each.conditions);
  return conditions.length > 0 ? conditions.map((each) => conditionText(shown.report, each)).join("; ") : words.none;
}

function where(condition: Condition, shown: Shown): Child {
  const text = conditionText(shown.report, condition);
  return text !== "" && el("span", { class: "where" }, text);
}

function withUnit(value: number, { unit }: Governing, shown: Shown): string {
  return numberText(value, shown.digits) + (unit ? ` ${unit}` : "");
}
