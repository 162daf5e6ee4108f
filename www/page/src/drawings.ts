/** Figures and free bodies under the form: the engine's drawings, as they are in print. */
import { el, fill } from "./dom.js";
import type { Drawings as Drawn } from "./report.js";
import { words } from "./strings.js";

export class Drawings {
  readonly element: HTMLElement;
  #body = el("div", { class: "drawings" });
  #key = "";

  constructor() {
    this.element = el("section", { class: "figures", hidden: true, "aria-labelledby": "figures-heading" },
      el("h2", { id: "figures-heading" }, words.figures), this.#body);
  }

  /** Shows the drawings of the report. */
  show({ figures, freebodies }: Drawn): void {
    const drawn = [...figures, ...freebodies];
    this.element.hidden = drawn.length === 0;
    const key = JSON.stringify(drawn);
    if (key === this.#key) return;
    this.#key = key;
    fill(this.#body, drawn.map(({ name, svg }) => drawing(name, svg)));
  }
}

/** One drawing with a way to keep it. It is read as a document of its own, so that nothing in it can run. */
function drawing(name: string, svg: string): HTMLElement | null {
  // The page's own style sheet says what the drawing's says, and the policy keeps any other out.
  const plain = svg.replace(/<style>[^<]*<\/style>/g, "");
  const parsed = new DOMParser().parseFromString(plain, "image/svg+xml").documentElement;
  if (parsed.nodeName !== "svg") return null;
  for (const unwanted of parsed.querySelectorAll("style, script, foreignObject")) unwanted.remove();
  const save = el("button", { type: "button", class: "plain", "aria-label": words.saveDrawing(name), onclick: () => keep(name, svg) }, words.saveAsSvg);
  return el("figure", {}, document.importNode(parsed, true), el("figcaption", {}, name, " ", save));
}

function keep(name: string, svg: string): void {
  const address = URL.createObjectURL(new Blob([svg], { type: "image/svg+xml" }));
  const link = el("a", { href: address, download: `${name.replace(/[^\p{L}\p{N} _-]/gu, "").trim() || "figure"}.svg` });
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 1000);
}
