/** Reports: the sheets kept in this browser, each with its revisions, and the ways in and out for all of them. */
import { bringIn, keepRevision, packed, remove, revisionsOf, sheets, titleOf, type Revision } from "./archive.js";
import { comparison } from "./comparison.js";
import { el, type Child } from "./dom.js";
import type { Engine } from "./engine.js";
import { pageWith } from "./page-copy.js";
import type { Slip } from "./slip.js";
import { newId, type Draft } from "./store.js";
import { laterWords as words } from "./strings-later.js";
import { words as common } from "./strings.js";

export interface ReportServices {
  engine: Pick<Engine, "ask">;
  /** The sheet that is open. */
  now(): Draft;
  /** Significant figures shown. */
  digits(): number;
  /** Opens another sheet. */
  begin(draft: Draft): void;
  /** The titles of the starting sheets. */
  titles: [name: string, title: string][];
  say(text: string): void;
}

export class ReportsSlip {
  #slip: Slip;
  #services: ReportServices;

  constructor(slip: Slip, services: ReportServices) {
    this.#slip = slip;
    this.#services = services;
  }

  /** Lists the sheets. */
  show(): void {
    this.#slip.show("reports", words.reports, [this.#ways(), this.#list()]);
    this.#slip.focus();
  }

  #ways(): HTMLElement {
    const field = el("input", { type: "file", accept: "application/json,.json", hidden: true, tabindex: -1, "aria-hidden": "true", class: "brings-in" });
    field.addEventListener("change", () => void this.#bringIn(field.files?.[0]));
    return el("p", { class: "ways" },
      plain(words.keepRevision, () => this.#keep()),
      plain(words.pageCopy, () => this.#copy()),
      plain(words.exportAll, () => download(packed(), "pitchwright-sheets.json", "application/json")),
      plain(words.importAll, () => field.click()), field);
  }

  #list(): HTMLElement {
    const now = this.#services.now();
    const lines = sheets().map((sheet) => el("tr", { class: sheet.id === now.id ? "now" : null },
      el("th", { scope: "row" }, titleOf(sheet) || common.untitled),
      el("td", {}, sheet.name ?? ""),
      el("td", { class: "revisions" }, this.#revisions(sheet)),
      el("td", {}, sheet.id === now.id ? words.thisSheet : [plain(words.openIt, () => this.#services.begin(sheet)), " ", this.#remover(sheet)])));
    const heads = [words.report, words.file, words.revisions, words.doing].map((text) => el("th", { scope: "col" }, text));
    return el("div", { class: "scrolls", tabindex: 0, role: "region", "aria-label": words.reports }, el("table", { class: "gathered kept" },
      el("thead", {}, el("tr", {}, heads)), el("tbody", {}, lines)));
  }

  #revisions(sheet: Draft): Child {
    const kept = revisionsOf(sheet.id);
    if (kept.length === 0) return el("span", { class: "faint" }, words.noRevisions);
    return kept.map((each) => el("span", { class: "line" }, words.revisionName(each.revision, each.at), " ",
      plain(words.openIt, () => this.#services.begin({ id: newId(), name: null, text: each.text })), " ",
      plain(words.compare, () => void this.#compare(each))));
  }

  /** Deleting asks once more, in place. */
  #remover(sheet: Draft): HTMLButtonElement {
    const button = plain(words.remove, () => {
      if (button.textContent === words.removeSure) {
        remove(sheet.id);
        this.show();
      } else {
        button.textContent = words.removeSure;
      }
    });
    return button;
  }

  #keep(): void {
    const { id, text } = this.#services.now();
    try {
      keepRevision(id, text);
      this.#services.say(words.revisionKept);
    } catch {
      this.#services.say(common.notKept);
    }
    this.show();
  }

  #copy(): void {
    const { text, name } = this.#services.now();
    const title = titleOf({ id: "", text, name }).replace(/[^\p{L}\p{N}]+/gu, "-").replace(/^-+|-+$/g, "").toLowerCase();
    // A name of its own in the store keeps the copy's drafts apart from this page's.
    download(pageWith({ id: newId(), name, text, titles: this.#services.titles }), `${title.slice(0, 60) || "sheet"}.html`, "text/html");
  }

  async #bringIn(file: File | undefined): Promise<void> {
    if (!file) return;
    const count = bringIn(await file.text(), newId);
    this.#services.say(count === null ? words.refusedFile(file.name) : words.broughtIn(count));
    this.show();
  }

  async #compare(revision: Revision): Promise<void> {
    const differences = await this.#services.engine.ask({ kind: "difference", old: revision.text, next: this.#services.now().text });
    const name = words.revisionName(revision.revision, revision.at);
    this.#slip.show("comparison", words.comparedWith(name), [plain(words.reports, () => this.show()), comparison(differences, this.#services.digits())]);
    this.#slip.focus();
  }
}

function plain(text: string, act: () => void): HTMLButtonElement {
  return el("button", { type: "button", class: "plain", onclick: act }, text);
}

function download(text: string, name: string, type: string): void {
  const address = URL.createObjectURL(new Blob([text], { type }));
  el("a", { href: address, download: name }).click();
  window.setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
