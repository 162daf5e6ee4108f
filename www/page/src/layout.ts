/** Where the parts of the page stand. */
import { el, setText } from "./dom.js";
import { words } from "./strings.js";

export interface Acts {
  newSheet(): void;
  open(): void;
  save(): void;
  sheetText(): void;
  catalogue(): void;
  reports(): void;
  print(): void;
  /** Begins with a starting sheet. */
  start(name: string): void;
  stop(): void;
}

export interface Parts {
  notices: HTMLElement;
  titleBlock: HTMLElement;
  selectors: HTMLElement;
  form: HTMLElement;
  governing: HTMLElement;
  /** Where what is unpacked later stands: the sensitivity. */
  sensitivity: HTMLElement;
  drawings: HTMLElement;
  findings: HTMLElement;
}

export interface Controls {
  element: HTMLElement;
  /** What the sheet text takes the place of. */
  formPlace: HTMLElement;
  textMode(on: boolean): void;
  busy(busy: boolean): void;
}

/** Puts the parts in their places. */
export function frame(acts: Acts, parts: Parts, starting: [name: string, title: string][]): Controls {
  const button = (text: string, act: () => void) => el("button", { type: "button", onclick: act }, text);
  const sheetText = button(words.sheetText, () => acts.sheetText());
  const working = el("span", { class: "working", role: "status", hidden: true }, words.working, " ", button(words.stop, () => acts.stop()));
  const catalogue = el("button", { type: "button", class: "beside", onclick: () => acts.catalogue() }, words.catalogue);
  const controls = el("nav", { class: "controls", "aria-label": "Sheet" },
    button(words.newSheet, () => acts.newSheet()), chooser(starting, acts), button(words.open, () => acts.open()), button(words.save, () => acts.save()),
    sheetText, catalogue, button(words.reports, () => acts.reports()), button(words.print, () => acts.print()));
  const masthead = el("header", { class: "masthead" }, el("h1", {}, words.program), working, controls);
  const formPlace = el("div", { class: "form-place" }, parts.selectors, parts.form, keyList());
  const element = el("div", { class: "paper" }, masthead, parts.notices,
    el("main", {}, parts.titleBlock, formPlace, el("div", { class: "gathering" }, parts.governing, parts.sensitivity, parts.drawings, parts.findings)),
    el("footer", {}, words.cautions.map((caution) => el("p", {}, caution))));
  return {
    element,
    formPlace,
    textMode(on) {
      formPlace.hidden = on;
      setText(sheetText, on ? words.form : words.sheetText);
    },
    busy(busy) {
      working.hidden = !busy;
    },
  };
}

/** The starting sheets by their titles. */
function chooser(starting: [name: string, title: string][], acts: Acts): HTMLSelectElement {
  const first = el("option", { value: "" }, words.startingSheets);
  const select = el("select", { class: "starting", "aria-label": words.startingSheets, onchange: () => {
    const name = select.value;
    select.value = "";
    if (name) acts.start(name);
  } }, first, starting.map(([name, title]) => el("option", { value: name }, title)));
  return select;
}

function keyList(): HTMLElement {
  return el("p", { class: "keys" }, words.keys.map(([key, does]) => el("span", {}, el("kbd", {}, key), ` ${does}`)));
}
