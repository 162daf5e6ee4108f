/** The title block, as on a drawing: boxes with small captions, filled from the sheet's first lines. */
import { findingsAt, type Shown } from "./conditions.js";
import { el, fill } from "./dom.js";
import type { FormRow } from "./report.js";
import { queryMark } from "./rows.js";
import type { SheetText } from "./sheet-text.js";
import { words } from "./strings.js";

/** The boxes, in the order in which their lines stand in a sheet. */
const BOXES = ["title", "revision", "date", "prepared", "checked", "basis", "digits", "units", "sources"] as const;

/** How many characters of the digest tell two texts apart at a glance. */
const DIGEST_SHOWN = 12;

export class TitleBlock {
  readonly element = el("section", { class: "title-block", "aria-label": words.titleBlock });
  #boxes = new Map<string, HTMLElement>();
  #digest = el("span", { class: "content" });
  #engine = el("span", { class: "content" });
  #pound = el("p", { class: "pound", hidden: true }, words.poundForce);
  #sheet: SheetText;
  #rows: FormRow[] = [];

  constructor(sheet: SheetText) {
    this.#sheet = sheet;
    for (const word of BOXES) this.#boxes.set(word, el("div", { class: `box ${word}` }));
    const fixed = (name: string, caption: string, content: HTMLElement) =>
      el("div", { class: `box ${name}` }, el("span", { class: "caption" }, caption), content);
    const grid = el("div", { class: "boxes" }, [...this.#boxes.values()],
      fixed("digest", words.digest, this.#digest), fixed("engine", words.engine, this.#engine));
    fill(this.element, grid, this.#pound);
  }

  /** Fills the boxes from the report's title lines. */
  show(shown: Shown, text: string): void {
    const { report } = shown;
    this.#rows = report.form.rows.filter(({ kind }) => kind === "title");
    for (const [word, box] of this.#boxes) this.#fillBox(box, word, shown);
    this.#digest.textContent = report.digest.slice(0, DIGEST_SHOWN);
    this.#engine.textContent = report.engine;
    this.#pound.hidden = !usesPounds(text);
    const title = this.#row("title")?.how;
    document.title = title ? `${title} \u2013 ${words.program}` : words.program;
  }

  #row(word: string): FormRow | undefined {
    return this.#rows.find((row) => row.word === word);
  }

  #fillBox(box: HTMLElement, word: string, shown: Shown): void {
    if (box.querySelector("input")) return;
    const row = this.#row(word);
    const text = row?.how ?? "";
    const found = row ? findingsAt(shown, row.line, row.lines) : [];
    const key = JSON.stringify([text, found]);
    if (box.dataset["key"] === key) return;
    box.dataset["key"] = key;
    const caption = words.boxes[word] ?? word;
    const button = el("button", { type: "button", "aria-label": words.edit(caption, text), onclick: () => this.#open(box, word) },
      el("span", { class: "caption" }, caption), el("span", { class: "content" }, text));
    fill(box, button, found.map(({ number, finding }) => queryMark(number, finding.severity)));
  }

  #open(box: HTMLElement, word: string): void {
    const caption = words.boxes[word] ?? word;
    const before = this.#row(word)?.how ?? "";
    const input = el("input", { type: "text", value: before, "aria-label": caption });
    let done = false;
    const finish = (take: boolean, refocus: boolean) => {
      if (done) return;
      done = true;
      delete box.dataset["key"];
      input.remove();
      fill(box, el("button", { type: "button", "aria-label": words.edit(caption, before), onclick: () => this.#open(box, word) },
        el("span", { class: "caption" }, caption), el("span", { class: "content" }, take ? input.value : before)));
      if (take && input.value.trim() !== before) this.#write(word, input.value.trim());
      if (refocus) box.querySelector("button")?.focus();
    };
    input.addEventListener("keydown", (event) => {
      if (event.key !== "Enter" && event.key !== "Escape") return;
      // The same key would press the button that takes the field's place.
      event.preventDefault();
      finish(event.key === "Enter", true);
    });
    input.addEventListener("blur", () => finish(true, false));
    fill(box, el("span", { class: "caption" }, caption), input);
    input.focus();
    input.select();
  }

  /** Writes the line of `word`: in place, or where it belongs among the others; an empty text takes it away. */
  #write(word: string, text: string): void {
    const row = this.#row(word);
    const lines = text ? [`${word} ${text}`] : [];
    if (row) {
      this.#sheet.replaceLines(row.line, row.lines, lines);
      return;
    }
    const before = BOXES.slice(0, BOXES.indexOf(word as (typeof BOXES)[number]));
    const behind = this.#rows.filter((each) => before.includes(each.word as (typeof BOXES)[number]));
    const line = Math.max(0, ...behind.map((each) => each.line + each.lines - 1)) + 1;
    this.#sheet.replaceLines(line, 0, lines);
  }
}

/** Whether pounds stand in the sheet, which are pounds-force. */
function usesPounds(text: string): boolean {
  return /(?<![\p{L}\d_'])lbs?(?![\p{L}\d_'])/u.test(text);
}
