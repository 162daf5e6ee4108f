/** What the tests of the package share: the package as built, a server for it, and sheets. */
import { readFile, readFileSync } from "node:fs";
import { createServer } from "node:http";
import { extname, join, normalize } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";

export const root = fileURLToPath(new URL("../../", import.meta.url));
export const packageFolder = join(root, "www/package");

/** The package as Node gets it. */
export const pitchwright = await import(pathToFileURL(join(packageFolder, "node.js")).href);

/** The text of a starting sheet. */
export function startingSheetOf(name) {
  return readFileSync(join(root, `www/sheets/${name}.pitchwright`), "utf8");
}

/** A small sheet with an axis, a governing condition and a requirement. */
export const smallSheet = [
  "title Lift at two stations",
  "S [m^2] = 11.4 ; drawing",
  "q [Pa] = 600",
  "vary cg: fwd | aft",
  "x [m] by cg = 1 | 2 ; weighing",
  "L [N] = q*S",
  "M [N.m] = L*x",
  "governing M over cg",
  "require M < 20000 N.m ; fitting",
  "",
].join("\n");

const TYPES = { ".html": "text/html; charset=utf-8", ".js": "text/javascript", ".wasm": "application/wasm" };

/** Serves folders by the first part of the path, single texts, and a folder for the rest; gives the address and how to stop. */
export function serve(folders, texts = {}, top = null) {
  const server = createServer((request, response) => {
    const path = normalize(decodeURIComponent(new URL(request.url, "http://localhost").pathname));
    const send = (body) => response.writeHead(200, { "content-type": TYPES[extname(path)] ?? "text/plain; charset=utf-8" }).end(body);
    const none = () => response.writeHead(404).end();
    if (path in texts) return send(texts[path]);
    const [, first, ...rest] = path.split("/");
    const file = first in folders ? join(folders[first], ...rest) : join(top ?? "", path);
    if (path.includes("..") || (!(first in folders) && top === null)) return none();
    readFile(file, (error, body) => (error ? none() : send(body)));
  });
  return new Promise((resolve) => {
    server.listen(0, "127.0.0.1", () => {
      resolve({ address: `http://127.0.0.1:${server.address().port}`, stop: () => new Promise((done) => { server.closeAllConnections(); server.close(done); }) });
    });
  });
}
