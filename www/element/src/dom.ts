/** Nodes made in one expression. */

type Child = Node | string | null | false;

/** An element with attributes and children; attributes that are null or false are left out, true ones have no value. */
export function el<K extends keyof HTMLElementTagNameMap>(
  name: K,
  attributes: Readonly<Record<string, string | number | boolean | null>> = {},
  ...children: readonly Child[]
): HTMLElementTagNameMap[K] {
  const node = document.createElement(name);
  for (const [key, value] of Object.entries(attributes)) {
    if (value !== null && value !== false) node.setAttribute(key, value === true ? "" : String(value));
  }
  node.append(...children.filter((child): child is Node | string => child !== null && child !== false));
  return node;
}
