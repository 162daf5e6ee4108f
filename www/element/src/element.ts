/** The element `<pitch-sheet>`: a sheet in any page. */
import "./browser.js";
import { el } from "../../page/src/dom.js";
import { SheetError } from "./errors.js";
import { openSheet } from "./open.js";
import type { Setting, Sheet } from "./sheet.js";
import { dedented, fetched, settings, textOf } from "./sources.js";
import { STYLE } from "./style.js";
import type { Finding, Result } from "./types.js";
import { view } from "./view.js";

/** Inputs by their symbols. */
export type Inputs = Readonly<Record<string, Setting>>;

/** Where there is no page, the module can be loaded all the same. */
const Base = (globalThis.HTMLElement ?? class {}) as typeof HTMLElement;

/** Shows a sheet as computation form with findings and figures; sends `pitch-result` after each evaluation. */
export class PitchSheetElement extends Base {
  static readonly observedAttributes = ["src", "inputs", "readonly"];

  #sheet: Sheet | null = null;
  #text: string | null = null;
  #sheets: Readonly<Record<string, string>> = {};
  #inputs: Inputs = {};
  #chosen = new Map<string, string>();
  /** Counts openings: one that was overtaken is given up. */
  #turn = 0;
  #due = false;
  #body = el0("div");
  #told = el0("p");
  #spoken = el0("p");
  #watch: MutationObserver | null = null;

  /** The open sheet; null until it is open. */
  get sheet(): Sheet | null {
    return this.#sheet;
  }

  /** The report after the last evaluation; null until there is one. */
  get result(): Result | null {
    return this.#sheet?.result ?? null;
  }

  /** The address of the sheet. */
  get src(): string {
    return this.getAttribute("src") ?? "";
  }

  set src(address: string) {
    this.setAttribute("src", address);
  }

  /** Whether inputs are shown without fields. */
  get readonly(): boolean {
    return this.hasAttribute("readonly");
  }

  set readonly(readonly: boolean) {
    this.toggleAttribute("readonly", readonly);
  }

  /** The sheet's text; when set, it takes the place of `src` and of the text inside. */
  get text(): string {
    return this.#sheet?.text ?? this.#text ?? "";
  }

  set text(text: string) {
    this.#text = String(text);
    this.#open();
  }

  /** The texts of other sheets by the names by which they are used. */
  get sheets(): Readonly<Record<string, string>> {
    return this.#sheets;
  }

  set sheets(sheets: Readonly<Record<string, string>>) {
    this.#sheets = { ...sheets };
    this.#open();
  }

  /** Inputs that are set, beside those of the attribute. */
  get inputs(): Inputs {
    return this.#inputs;
  }

  set inputs(inputs: Inputs) {
    this.#inputs = { ...inputs };
    this.#apply();
  }

  /** Sets one input and shows what follows. Gives no finding when that is done; else nothing has changed. */
  set(symbol: string, value: Setting): Finding[] {
    if (!this.#sheet) return [];
    const findings = this.#sheet.set(symbol, value);
    this.#tell(findings);
    if (findings.length === 0) this.#settled();
    return findings;
  }

  connectedCallback(): void {
    if (!this.shadowRoot) this.#build();
    this.#watch = new MutationObserver(() => this.#open());
    this.#watch.observe(this, { childList: true, characterData: true, subtree: true });
    this.#open();
  }

  disconnectedCallback(): void {
    this.#watch?.disconnect();
    this.#watch = null;
    this.#turn += 1;
    this.#sheet?.free();
    this.#sheet = null;
  }

  attributeChangedCallback(name: string): void {
    if (!this.isConnected) return;
    if (name === "src") this.#open();
    else if (name === "inputs") this.#apply();
    else this.#show();
  }

  #build(): void {
    const root = this.attachShadow({ mode: "open" });
    const style = new CSSStyleSheet();
    style.replaceSync(STYLE);
    root.adoptedStyleSheets = [style];
    this.#body = el("div");
    this.#told = el("p", { class: "told", role: "alert" });
    this.#spoken = el("p", { class: "unseen", role: "status" });
    root.append(this.#told, this.#body, this.#spoken);
  }

  /** Opens the sheet once for all that is changed in one go. */
  #open(): void {
    if (!this.isConnected || this.#due) return;
    this.#due = true;
    queueMicrotask(() => {
      this.#due = false;
      void this.#opened(++this.#turn);
    });
  }

  async #opened(turn: number): Promise<void> {
    try {
      const own = this.#text ?? dedented(textOf(this));
      const from = this.#text === null && this.src ? await fetched(this.src, this.baseURI) : { text: own, sheets: {} };
      if (turn !== this.#turn || (from.text.trim() === "" && !this.#sheet)) return;
      const sheet = await openSheet(from.text, { sheets: { ...from.sheets, ...this.#sheets } });
      if (turn !== this.#turn) return sheet.free();
      this.#sheet?.free();
      this.#sheet = sheet;
      this.#tell([]);
      this.#apply();
    } catch (error) {
      if (turn === this.#turn) this.#told.textContent = error instanceof Error ? error.message : String(error);
    }
  }

  /** Sets what attribute and property ask for. */
  #apply(): void {
    const sheet = this.#sheet;
    if (!sheet) return;
    const asked = [...settings(this.getAttribute("inputs") ?? ""), ...Object.entries(this.#inputs)];
    this.#tell(asked.flatMap(([symbol, value]) => sheet.set(symbol, value)));
    this.#settled();
  }

  #settled(): void {
    this.#show();
    const result = this.result;
    if (!result) return;
    const count = result.findings.length;
    this.#spoken.textContent = `Worked out. ${count === 0 ? "No findings" : count === 1 ? "One finding" : `${count} findings`}.`;
    this.dispatchEvent(new CustomEvent<Result>("pitch-result", { detail: result, bubbles: true, composed: true }));
  }

  #tell(findings: readonly Finding[]): void {
    const text = findings.map(({ message }) => message).join(" ");
    if (this.#told.textContent !== text) this.#told.textContent = text;
  }

  #show(): void {
    const sheet = this.#sheet;
    if (!sheet) return;
    const root = this.shadowRoot;
    const focused = root?.activeElement instanceof HTMLElement ? root.activeElement.dataset : null;
    this.#body.replaceChildren(view({
      result: sheet.result,
      form: sheet.form(),
      digits: sheet.digits,
      readonly: this.readonly,
      chosen: this.#chosen,
      choose: (axis, label) => {
        this.#chosen.set(axis, label);
        this.#show();
      },
      set: (symbol, expression) => this.#typed(symbol, expression),
    }));
    if (focused) this.#focus(focused.symbol, focused.axis);
  }

  #typed(symbol: string, expression: string): void {
    try {
      const findings = this.set(symbol, expression);
      const fields = this.#body.querySelectorAll("input");
      for (const field of fields) if (field.dataset.symbol === symbol) field.ariaInvalid = String(findings.length > 0);
    } catch (error) {
      this.#told.textContent = error instanceof SheetError ? error.message : String(error);
    }
  }

  /** The new nodes stand where the old ones stood, so the focus goes where it was. */
  #focus(symbol: string | undefined, axis: string | undefined): void {
    const fields = [...this.#body.querySelectorAll<HTMLElement>("input, select")];
    const same = ({ dataset }: HTMLElement) => (axis === undefined ? dataset.symbol === symbol : dataset.axis === axis);
    fields.find(same)?.focus();
  }
}

/** A node, or nothing where there is no page. */
function el0<K extends "div" | "p">(name: K): HTMLElementTagNameMap[K] {
  return (globalThis.document ? document.createElement(name) : null) as HTMLElementTagNameMap[K];
}

declare global {
  interface HTMLElementTagNameMap {
    "pitch-sheet": PitchSheetElement;
  }
  interface HTMLElementEventMap {
    "pitch-result": CustomEvent<Result>;
  }
}

if (globalThis.customElements && !customElements.get("pitch-sheet")) customElements.define("pitch-sheet", PitchSheetElement);
