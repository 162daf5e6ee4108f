/** Plain notices over the sheet, each with what can be done about it. */
import { el } from "./dom.js";
import { words } from "./strings.js";

export interface Offer {
  text: string;
  act: () => void;
}

export class Notices {
  readonly element = el("div", { class: "notices", role: "status" });
  #shown = new Map<string, HTMLElement>();

  /** Shows `text` under `name`, in place of what stood there. */
  show(name: string, text: string, offers: Offer[] = []): void {
    this.clear(name);
    const buttons = [...offers, { text: words.dismiss, act: () => {} }].map(({ text: label, act }) =>
      el("button", { type: "button", onclick: () => {
        this.clear(name);
        act();
      } }, label));
    const notice = el("p", { class: "notice", "data-notice": name }, el("span", {}, text), buttons);
    this.#shown.set(name, notice);
    this.element.append(notice);
  }

  /** Takes the notice `name` away. */
  clear(name: string): void {
    this.#shown.get(name)?.remove();
    this.#shown.delete(name);
  }
}
