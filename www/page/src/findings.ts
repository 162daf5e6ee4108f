/** The findings, as a checker's queries: a numbered list at the foot of the form, each with the fix to take. */
import { el, fill } from "./dom.js";
import type { Finding, Fix, FormRow, Report } from "./report.js";
import { words } from "./strings.js";

export interface FindingEvents {
  fix(fix: Fix): void;
  goTo(line: number): void;
}

export class Findings {
  readonly element: HTMLElement;
  #list = el("ol", { class: "queries" });
  #none = el("p", {}, words.noFindingsAtAll);
  #events: FindingEvents;
  #key = "";

  constructor(events: FindingEvents) {
    this.#events = events;
    const heading = el("h2", { id: "findings-heading" }, words.findings);
    this.element = el("section", { class: "findings", "aria-labelledby": "findings-heading" }, heading, this.#none, this.#list);
  }

  /** Lists the findings of `report`. */
  show(report: Report): void {
    const entries = report.findings.map((finding) => ({ finding, where: whereOf(finding, report.form.rows) }));
    const key = JSON.stringify(entries);
    if (key === this.#key) return;
    this.#key = key;
    this.#none.hidden = entries.length > 0;
    this.#list.hidden = entries.length === 0;
    fill(this.#list, entries.map(({ finding, where }, index) => this.#entry(finding, where, index + 1)));
  }

  #entry(finding: Finding, where: string, number: number): HTMLLIElement {
    const goTo = el("button", { type: "button", class: "plain", "aria-label": words.goTo(where), onclick: () => this.#events.goTo(finding.line) }, where);
    return el("li", { id: `finding-${number}`, class: finding.severity, tabindex: -1 },
      el("span", { class: `query ${finding.severity}`, "aria-hidden": "true" }, String(number)),
      el("span", { class: "what" },
        el("b", {}, words.severity[finding.severity]), ", ", goTo, ". ", finding.message,
        fixButtons(finding, (fix) => this.#events.fix(fix))));
  }
}

/** A button for each fix. */
export function fixButtons(finding: Finding, take: (fix: Fix) => void): HTMLElement | null {
  if (finding.fixes.length === 0) return null;
  return el("span", { class: "fixes" },
    finding.fixes.map((fix) => el("button", { type: "button", class: "fix", onclick: () => take(fix) }, fix.title)));
}

function whereOf(finding: Finding, rows: readonly FormRow[]): string {
  const row = rows.find(({ line, lines }) => finding.line >= line && finding.line < line + lines);
  return row && row.item !== null ? words.itemNumber(row.item) : words.line(finding.line);
}
