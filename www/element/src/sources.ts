/** Where an element's sheet comes from: the text inside, a file and the sheets beside it; and inputs as an attribute. */

/** The text inside the element, or in a script in it, where `<` needs no care. */
export function textOf(element: Element): string {
  return element.textContent ?? "";
}

/** The text without the indentation that it has within a page. */
export function dedented(text: string): string {
  const lines = text.split(/\r\n|\r|\n/);
  while (lines[0]?.trim() === "") lines.shift();
  while (lines.at(-1)?.trim() === "") lines.pop();
  const indentation = /^[ \t]*/.exec(lines[0] ?? "")?.[0] ?? "";
  const own = lines.map((line) => (line.startsWith(indentation) ? line.slice(indentation.length) : line));
  return own.length === 0 ? "" : `${own.join("\n")}\n`;
}

/** Inputs as written in an attribute: `x_cg = 6.2 ft; n = 3.8`. */
export function settings(attribute: string): [string, string][] {
  const parts = attribute.split(/[;\n]/).filter((part) => part.trim() !== "");
  return parts.map((part) => {
    const at = part.indexOf("=");
    return at < 0 ? [part.trim(), ""] : [part.slice(0, at).trim(), part.slice(at + 1).trim()];
  });
}

/** A sheet with the sheets that it uses. */
export interface Fetched {
  readonly text: string;
  readonly sheets: Record<string, string>;
}

/** Most sheets that are fetched for one. */
const SHEETS_MOST = 32;

/** Fetches a sheet, and from beside it the sheets that it uses, as far as they are there. */
export async function fetched(src: string, base: string): Promise<Fetched> {
  const address = new URL(src, base);
  const text = await textAt(address);
  if (text === null) throw new Error(`There is no sheet at ${address.href}.`);
  const sheets = Object.create(null) as Record<string, string>;
  const waiting = usedBy(text);
  for (let name = waiting.shift(); name !== undefined; name = waiting.shift()) {
    if (name in sheets || Object.keys(sheets).length >= SHEETS_MOST) continue;
    const beside = await textAt(new URL(`${encodeURIComponent(name)}.pitchwright`, address));
    if (beside === null) continue;
    sheets[name] = beside;
    waiting.push(...usedBy(beside));
  }
  return { text, sheets };
}

async function textAt(address: URL): Promise<string | null> {
  const response = await fetch(address);
  return response.ok ? response.text() : null;
}

function usedBy(text: string): string[] {
  return [...text.matchAll(/^use\s+"([^"\n]+)"/gm)].map(([, name = ""]) => name);
}
