/** A sheet as nodes: title, conditions, form, findings, figures. */
import { othersOf, shownBy, type Shown } from "./choosing.js";
import { el } from "../../page/src/dom.js";
import { rowOf, type Numbered, type Surroundings } from "./rows.js";
import type { Form, Result } from "./types.js";

/** What is to be shown, and what follows from touching it. */
export interface ViewOf {
  readonly result: Result;
  readonly form: Form;
  readonly digits: number;
  readonly readonly: boolean;
  /** Labels that were chosen, by axes. */
  readonly chosen: ReadonlyMap<string, string>;
  choose(axis: string, label: string): void;
  set(symbol: string, expression: string): void;
}

/** The nodes of a sheet. */
export function view(of: ViewOf): HTMLElement {
  const shown = shownBy(of.result, of.digits, of.chosen);
  const findings = of.result.findings.map((finding, index) => ({ number: index + 1, finding }));
  const { title, revision } = of.result.sheet;
  return el("section", { part: "sheet", "aria-label": title ?? "Calculation sheet" },
    title !== undefined && el("h2", { part: "title" }, revision === undefined ? title : `${title}, revision ${revision}`),
    conditions(shown, of),
    form(shown, of, findings),
    list(findings),
    ...drawings(of.result));
}

function conditions(shown: Shown, of: ViewOf): HTMLElement | null {
  const others = othersOf(shown);
  if (others.length === 0) return null;
  return el("div", { class: "conditions", part: "conditions" }, ...others.map(({ name, labels }) => {
    const select = el("select", { "data-axis": name }, ...labels.map((label) => el("option", { value: label, selected: label === shown.at[name] }, label)));
    select.addEventListener("change", () => of.choose(name, select.value));
    return el("label", {}, `${name} `, select);
  }));
}

function form(shown: Shown, of: ViewOf, findings: readonly Numbered[]): HTMLTableElement {
  const labels = shown.across?.labels ?? [];
  const around: Surroundings = { shown, findings, readonly: of.readonly, columns: Math.max(1, labels.length), set: of.set };
  const heads = labels.length > 0 ? labels.map((label) => el("th", { scope: "col", class: "label" }, label)) : [el("th", { scope: "col", class: "label" }, "value")];
  const head = (text: string) => el("th", { scope: "col" }, text);
  return el("table", { class: "form", part: "form" },
    shown.across ? el("caption", {}, `Values across: ${shown.across.name}`) : null,
    el("thead", {}, el("tr", {}, head("item"), head("symbol"), head("unit"), head("how obtained"), ...heads, head("remark"))),
    el("tbody", {}, ...of.form.rows.map((row) => rowOf(row, around))));
}

function list(findings: readonly Numbered[]): HTMLElement | null {
  if (findings.length === 0) return null;
  return el("div", { part: "findings" }, el("h3", {}, "Findings"),
    el("ol", {}, ...findings.map(({ finding }) => el("li", {}, `${finding.severity}, line ${finding.line}: ${finding.message}`))));
}

/** Drawings are shown as pictures: nothing in them can run. */
function drawings({ figures, freebodies }: Result): HTMLElement[] {
  return [...figures, ...freebodies].flatMap(({ name, svg }) => {
    if (!svg) return [];
    const picture = el("img", { src: `data:image/svg+xml,${encodeURIComponent(svg)}`, alt: name });
    return [el("figure", { part: "figure" }, picture, el("figcaption", {}, name))];
  });
}
