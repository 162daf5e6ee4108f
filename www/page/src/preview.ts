/** The report as a checker gets it on paper, looked at before it is printed. */
import { el } from "./dom.js";
import { laterWords as words } from "./strings-later.js";

export interface PreviewEvents {
  /** The preview was put away. */
  closed(): void;
}

/** Lays the printed report, a whole HTML document, over the page. */
export function preview(html: string, name: string, nonce: string, events: PreviewEvents): void {
  const frame = el("iframe", { class: "sheet-of-paper", title: words.preview });
  // The document's own style sheets are let in by the nonce; the policy keeps every script out of it.
  frame.srcdoc = html.replaceAll("<style>", `<style nonce="${nonce}">`);
  const back = () => {
    whole.remove();
    document.documentElement.classList.remove("previewing");
    events.closed();
  };
  const button = (text: string, act: () => void) => el("button", { type: "button", class: "plain", onclick: act }, text);
  const print = button(words.printThis, () => frame.contentWindow?.print());
  const whole = el("section", { class: "preview", "aria-labelledby": "preview-heading" },
    el("div", { class: "preview-head" }, el("h2", { id: "preview-heading" }, words.preview), print,
      button(words.keepHtml, () => keep(html, name)), button(words.backToForm, back)),
    frame);
  whole.addEventListener("keydown", (event) => {
    if (event.key === "Escape") back();
  });
  document.body.append(whole);
  document.documentElement.classList.add("previewing");
  print.focus();
}

function keep(html: string, name: string): void {
  const address = URL.createObjectURL(new Blob([html], { type: "text/html" }));
  el("a", { href: address, download: name }).click();
  window.setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
