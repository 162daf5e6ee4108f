/** The trail: how a value came about, each thing it rests on a step further. */
import type { Step, Trail } from "./answers.js";
import type { Asked } from "./asking.js";
import { el, symbolText, type Child } from "./dom.js";
import type { Engine } from "./engine.js";
import { signed } from "./numbers.js";
import type { Slip } from "./slip.js";
import { laterWords as words } from "./strings-later.js";

export interface TrailServices {
  engine: Pick<Engine, "ask">;
  goTo(line: number): void;
}

const NAME = "trail";

export class TrailSlip {
  #slip: Slip;
  #services: TrailServices;
  #asked: Asked | null = null;
  #trail: Trail | null = null;
  /** The steps from the value asked for to the one shown, by their places. */
  #path: number[] = [0];

  constructor(slip: Slip, services: TrailServices) {
    this.#slip = slip;
    this.#services = services;
  }

  /** Shows how the value came about. */
  async show(asked: Asked): Promise<void> {
    this.#asked = asked;
    this.#path = [0];
    if (await this.#fetch()) this.#draw();
    this.#slip.focus();
  }

  /** The values have changed: the trail is asked for again, and the way followed as far as it still leads. */
  async refresh(): Promise<void> {
    const before = this.#trail;
    if (this.#slip.name !== NAME || !before) return;
    const symbols = this.#path.map((place) => before.steps[place]?.symbol);
    if (!(await this.#fetch()) || this.#slip.name !== NAME) return;
    this.#path = followed(this.#trail, symbols);
    this.#draw();
  }

  async #fetch(): Promise<boolean> {
    const asked = this.#asked;
    if (!asked) return false;
    try {
      const trail = await this.#services.engine.ask({ kind: "trail", symbol: asked.symbol, condition: asked.condition });
      if (asked !== this.#asked) return false;
      this.#trail = trail;
      return trail.steps.length > 0;
    } catch (error) {
      if (asked === this.#asked) this.#slip.show(NAME, words.trailOf(asked.symbol), el("p", {}, words.noTrail(message(error))));
      return false;
    }
  }

  #draw(): void {
    const trail = this.#trail;
    const step = trail?.steps[this.#path.at(-1) ?? 0];
    const first = trail?.steps[0];
    if (!trail || !step || !first) return;
    this.#slip.show(NAME, words.trailOf(first.symbol), [this.#way(trail), this.#derivation(step), this.#rest(trail, step)]);
  }

  /** The way from the value asked for, each station to go back to. */
  #way(trail: Trail): HTMLElement {
    const stations = this.#path.map((place, index) => {
      const name = symbolText(trail.steps[place]?.symbol ?? "");
      const last = index === this.#path.length - 1;
      return el("li", {}, last
        ? el("span", { "aria-current": "step" }, name)
        : el("button", { type: "button", class: "plain", onclick: () => this.#go(this.#path.slice(0, index + 1)) }, name));
    });
    return el("nav", { "aria-label": words.trailPath }, el("ol", { class: "way" }, stations));
  }

  #go(path: number[]): void {
    this.#path = path;
    this.#draw();
    this.#slip.focus();
  }

  #derivation(step: Step): HTMLElement {
    const where = Object.values(step.condition).join(", ");
    const here = step.sheet === null
      ? el("button", { type: "button", class: "plain", onclick: () => this.#services.goTo(step.line) }, words.goToRow)
      : words.inSheet(step.sheet);
    const left = (): Child => [el("i", {}, symbolText(step.symbol)), " = "];
    return el("dl", { class: "derivation" },
      entry(words.howObtained, [el("span", { class: "formula" }, left(), step.formula), " ", here]),
      step.numbers !== null && entry(words.withNumbers, el("span", { class: "formula" }, left(), signed(step.numbers))),
      entry(words.result, el("strong", {}, left(), signed(step.shown))),
      entry(words.where, where || words.everywhere),
      step.remark !== null && entry(words.remark, step.remark),
      step.notes.length > 0 && entry(words.also, step.notes.map((note) => el("span", { class: "line" }, note))),
      step.methods.map((each) => entry(words.method, [
        el("span", { class: "line" }, el("b", {}, each.function), ". ", each.what, " ", each.method),
        el("span", { class: "line" }, `${words.holds}: ${each.holds}`),
        el("span", { class: "line" }, `${words.source}: ${each.source}`),
      ])));
  }

  #rest(trail: Trail, step: Step): Child {
    if (step.rests_on.length === 0) return el("p", { class: "faint" }, words.restsOnNothing);
    const head = (text: string, className = "") => el("th", { scope: "col", class: className }, text);
    const lines = step.rests_on.map((place) => ({ place, under: trail.steps[place] })).map(({ place, under }) => under && el("tr", {},
      el("th", { scope: "row" }, el("button", { type: "button", class: "plain", "aria-label": words.follow(under.symbol),
        onclick: () => this.#go([...this.#path, place]) }, symbolText(under.symbol))),
      el("td", { class: "number" }, signed(under.shown)),
      el("td", { class: "formula" }, under.kind === "formula" ? under.formula : `${words.kinds[under.kind] ?? ""}: ${under.formula}`),
      el("td", {}, under.remark ?? "")));
    return [
      el("h3", { id: "rests-on" }, words.restsOn),
      el("div", { class: "scrolls", tabindex: 0, role: "region", "aria-label": words.restsOn }, el("table", { class: "gathered rests", "aria-labelledby": "rests-on" },
        el("thead", {}, el("tr", {}, head(words.symbol), head(words.value, "number"), head(words.howObtained), head(words.remark))), el("tbody", {}, lines))),
      trail.cut && el("p", { class: "faint" }, words.cut),
    ];
  }
}

function entry(name: string, content: Child): Child {
  return el("div", {}, el("dt", {}, name), el("dd", {}, content));
}

function message(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}

/** The places along which the symbols still lead from the first. */
function followed(trail: Trail | null, symbols: (string | undefined)[]): number[] {
  const path = [0];
  for (const symbol of symbols.slice(1)) {
    const next = trail?.steps[path.at(-1) ?? 0]?.rests_on.find((place) => trail.steps[place]?.symbol === symbol);
    if (next === undefined) break;
    path.push(next);
  }
  return path;
}
