/** What stands on every printed page: title and revision, digest and engine version, page n of m. */
import type { Report } from "./report.js";

/** How many characters of the digest a print carries. */
const DIGEST_PRINTED = 16;

const sheet = new CSSStyleSheet();

/** Puts the running lines of the pages in place for `report`. */
export function preparePrint(report: Report): void {
  if (!document.adoptedStyleSheets.includes(sheet)) document.adoptedStyleSheets = [...document.adoptedStyleSheets, sheet];
  const words = report.sheet;
  const revision = words["revision"] ? `, revision ${String(words["revision"])}` : "";
  const title = `${String(words["title"] ?? "")}${revision}`;
  const origin = `digest ${report.digest.slice(0, DIGEST_PRINTED)}, Pitchwright ${report.engine}`;
  sheet.replaceSync(`@page { @top-left { content: ${quoted(title)}; font: 9pt sans-serif } @top-right { content: ${quoted(origin)}; font: 9pt sans-serif } }`);
}

/** A CSS string: whatever could end it or start something else goes in as a number. */
function quoted(text: string): string {
  const safe = Array.from(text, (c) => (/[\p{L}\p{N} .,:-]/u.test(c) ? c : `\\${(c.codePointAt(0) ?? 32).toString(16)} `));
  return `"${safe.join("")}"`;
}
