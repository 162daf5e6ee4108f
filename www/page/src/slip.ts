/** A slip of paper over the foot of the window: what is looked up while the form stays in sight above it. */
import { el, fill, type Child } from "./dom.js";
import { laterWords as words } from "./strings-later.js";

export class Slip {
  readonly element: HTMLElement;
  #heading = el("h2", { id: "slip-heading", tabindex: -1 });
  #body = el("div", { class: "slip-body" });
  #closed: () => void;
  #name = "";

  /** `closed` is called when the slip is put away by hand. */
  constructor(closed: () => void) {
    this.#closed = closed;
    const away = el("button", { type: "button", class: "plain", onclick: () => this.#away() }, words.putAway);
    this.element = el("aside", { class: "slip", hidden: true, "aria-labelledby": "slip-heading" },
      el("div", { class: "slip-head" }, this.#heading, away), this.#body);
    this.element.addEventListener("keydown", (event) => {
      if (event.key !== "Escape") return;
      event.preventDefault();
      this.#away();
    });
    document.body.append(this.element);
  }

  /** What lies on the slip; empty where it is put away. */
  get name(): string {
    return this.element.hidden ? "" : this.#name;
  }

  /** Lays `content` on the slip. */
  show(name: string, heading: Child, content: Child): void {
    this.#name = name;
    fill(this.#heading, heading);
    fill(this.#body, content);
    this.#body.scrollTop = 0;
    this.#keepRoom(true);
  }

  /** Brings the keyboard to the slip. */
  focus(): void {
    this.#heading.focus();
  }

  /** Puts the slip away. */
  close(): void {
    this.#keepRoom(false);
  }

  #away(): void {
    this.close();
    this.#closed();
  }

  /** The paper can be scrolled up past the slip, so that nothing is covered for good. */
  #keepRoom(open: boolean): void {
    this.element.hidden = !open;
    document.body.classList.toggle("under-slip", open);
  }
}
