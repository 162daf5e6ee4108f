/** What the engine offers while a row or the sheet text is typed: what could stand there, what stands there, and fixes. */
import { acceptCompletion, autocompletion, closeCompletion, completionKeymap, completionStatus, moveCompletionSelection, selectedCompletion, snippet, type Completion as Offer, type CompletionContext, type CompletionResult } from "@codemirror/autocomplete";
import { Prec, type Extension } from "@codemirror/state";
import { EditorView, hoverTooltip, keymap, type Tooltip } from "@codemirror/view";
import type { Completion, Completions, Hover } from "./answers.js";
import { el, type Child } from "./dom.js";
import { fixButtons } from "./findings.js";
import type { Finding, Fix } from "./report.js";

/** What an editor asks of the page; lines and columns count from 1, columns in UTF-16 units. */
export interface Assistance {
  complete(line: number, column: number): Promise<Completions | null>;
  hover(line: number, column: number): Promise<Hover | null>;
  /** The findings at `line`. */
  findings(line: number): Finding[];
  fix(fix: Fix): void;
}

/** Completion and telling, for an editor whose first line is `firstLine()` of the sheet. */
export function assisting(assistance: Assistance, firstLine: () => number): Extension {
  return [
    autocompletion({
      override: [(context) => offered(context, assistance, firstLine())],
      // Nothing is chosen unasked: Enter takes the row, whatever is offered.
      selectOnOpen: false,
      icons: false,
      interactionDelay: 0,
      defaultKeymap: false,
    }),
    Prec.highest(keymap.of([
      { key: "Tab", run: takeOffer },
      // While offers are only being looked for, Escape is the row's.
      { key: "Escape", run: (view) => completionStatus(view.state) === "active" && closeCompletion(view) },
      ...completionKeymap.filter(({ key }) => key !== "Escape"),
    ])),
    hoverTooltip((view, at) => told(view, at, assistance, firstLine()), { hoverTime: 350 }),
  ];
}

/** Tab takes the offer that is chosen, or the first; without an offer it leaves the editor as ever. */
function takeOffer(view: EditorView): boolean {
  if (completionStatus(view.state) !== "active") return false;
  if (!selectedCompletion(view.state)) moveCompletionSelection(true)(view);
  return acceptCompletion(view);
}

/** A word, the field of a record, or a unit in its bracket has been begun. */
const BEGUN = /[\p{L}_][\p{L}\p{N}_.']*$|\[[^\][;]*$/u;

async function offered(context: CompletionContext, assistance: Assistance, firstLine: number): Promise<CompletionResult | null> {
  const { state, pos, explicit } = context;
  const line = state.doc.lineAt(pos);
  if (!explicit && !BEGUN.test(line.text.slice(0, pos - line.from))) return null;
  const found = await assistance.complete(firstLine + line.number - 1, pos - line.from + 1).catch(() => null);
  if (!found || found.items.length === 0 || context.aborted) return null;
  const from = line.from + found.replaces.column16 - 1;
  const to = from + found.replaces.length16;
  const typed = state.sliceDoc(from, to);
  // What stands there whole already is no offer.
  const items = found.items.filter(({ insert }) => explicit || insert !== typed);
  return items.length > 0 ? { from, to, options: items.map(offer), filter: false } : null;
}

function offer(item: Completion): Offer {
  return { label: item.label, detail: item.detail, type: item.kind, apply: item.holes.length > 0 ? snippet(template(item)) : item.insert };
}

/** The text with its holes as fields, one after the other. */
function template({ insert, holes }: Completion): string {
  const characters = Array.from(insert);
  const plain = (from: number, to: number) => characters.slice(from, to).join("").replace(/[{}\\#$]/g, "\\$&");
  let at = 0;
  let made = "";
  for (const [from, length] of holes) {
    made += `${plain(at, from)}\${${characters.slice(from, from + length).join("").replace(/[{}]/g, "")}}`;
    at = from + length;
  }
  return made + plain(at, characters.length);
}

async function told(view: EditorView, at: number, assistance: Assistance, firstLine: number): Promise<Tooltip | null> {
  const line = view.state.doc.lineAt(at);
  const number = firstLine + line.number - 1;
  const column = at - line.from + 1;
  const findings = assistance.findings(number).filter((each) => column >= each.column && column <= each.column + Math.max(1, each.length));
  const found = await assistance.hover(number, column).catch(() => null);
  if (!found && findings.length === 0) return null;
  const here = found && found.at.line === number ? found : null;
  const pos = here ? Math.min(line.to, line.from + here.at.column16 - 1) : at;
  const end = here ? Math.min(line.to, pos + here.at.length16) : at;
  return { pos, end, above: true, create: () => ({ dom: drawn(found, findings, assistance) }) };
}

function drawn(found: Hover | null, findings: Finding[], assistance: Assistance): HTMLElement {
  const facts = found?.facts.map(({ name, text }) => el("div", {}, el("dt", {}, name), el("dd", {}, text.includes("\n") ? el("pre", {}, text.trimEnd()) : text)));
  const queries: Child = findings.map((finding) => el("p", { class: `finding ${finding.severity}` }, finding.message,
    fixButtons(finding, (fix) => assistance.fix(fix))));
  return el("div", { class: "told" }, queries,
    found && [el("p", {}, el("b", {}, found.title)), el("p", {}, found.text), el("dl", { class: "derivation" }, facts)]);
}
