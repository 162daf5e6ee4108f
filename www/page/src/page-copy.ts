/** A copy of the page with a sheet inside, to be mailed to a checker who just opens it. */

/** The file's own text, with `sheet` in the place of the sheet that it opens with. */
export function pageWith(sheet: object): string {
  const style = document.querySelector<HTMLStyleElement>("style[nonce]");
  const scripts = Array.from(document.scripts);
  const noscript = document.querySelector("noscript");
  const metas = Array.from(document.head.querySelectorAll("meta"), (meta) => meta.outerHTML);
  const [boot, ...rest] = scripts;
  const body = rest.map((script) => (script.id === "sheet" ? `<script type="application/json" id="sheet">${json(sheet)}</script>` : script.outerHTML));
  return [
    "<!doctype html>", '<html lang="en">', "<head>", ...metas, "<title>Pitchwright</title>",
    // A page does not give its nonce away when it is written out.
    `<style nonce="${style?.nonce ?? ""}">${style?.textContent ?? ""}</style>`, boot?.outerHTML ?? "",
    "</head>", "<body>", noscript?.outerHTML ?? "", ...body, "</body>", "</html>", "",
  ].join("\n");
}

/** JSON in which nothing can end the script block. */
function json(value: object): string {
  return JSON.stringify(value).replaceAll("<", "\\u003c");
}
