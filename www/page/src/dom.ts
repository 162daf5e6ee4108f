/** A small helper that makes elements. Text always goes in as text, never as markup. */

export type Child = Node | string | null | undefined | false | Child[];
type Listener = (event: never) => void;
export type Properties = Record<string, string | number | boolean | null | undefined | Listener>;

/** Makes a `tag` with attributes, listeners (`onclick: …`) and children. */
export function el<K extends keyof HTMLElementTagNameMap>(
  tag: K, properties: Properties = {}, ...children: Child[]
): HTMLElementTagNameMap[K] {
  const element = document.createElement(tag);
  for (const [name, value] of Object.entries(properties)) set(element, name, value);
  append(element, children);
  return element;
}

function set(element: HTMLElement, name: string, value: Properties[string]): void {
  if (typeof value === "function") element.addEventListener(name.slice(2), value as EventListener);
  else if (value === true) element.setAttribute(name, "");
  else if (value !== false && value !== null && value !== undefined) element.setAttribute(name, String(value));
}

function append(element: Element, children: Child[]): void {
  for (const child of children) {
    if (Array.isArray(child)) append(element, child);
    else if (child !== null && child !== undefined && child !== false) element.append(child);
  }
}

/** Gives `element` these children in place of what it held. */
export function fill(element: Element, ...children: Child[]): void {
  element.replaceChildren();
  append(element, children);
}

/** Sets a text only where it differs, so that nothing is laid out again for nothing. */
export function setText(element: Element, text: string): void {
  if (element.textContent !== text) element.textContent = text;
}

/** A symbol as it is written by hand: what follows the first `_` stands low. The `_` stays in what is copied. */
export function symbolText(symbol: string): Child[] {
  const at = symbol.indexOf("_");
  if (at <= 0 || at === symbol.length - 1) return symbol.split(/(?<=\.)/).flatMap((part, index) => (index > 0 ? [el("wbr"), part] : [part]));
  return [symbol.slice(0, at), el("span", { class: "underscore" }, "_"), el("sub", {}, symbol.slice(at + 1))];
}
