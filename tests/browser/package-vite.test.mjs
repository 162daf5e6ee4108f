/** The package in a program bundled by Vite, built and served for development, without any configuration. */
import assert from "node:assert/strict";
import { cpSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { after, before, test } from "node:test";
import { build, createServer } from "vite";
import { packageFolder, pitchwright, serve, startingSheetOf } from "./package-support.mjs";
import { launch } from "./support.mjs";

const text = startingSheetOf("osier-balancing-loads");

const program = `
import { openSheet } from "pitchwright";
import "pitchwright/element";
const text = ${JSON.stringify(text)};
const near = await openSheet(text);
const far = await openSheet(text, { worker: true });
const element = document.createElement("pitch-sheet");
element.text = text;
const shown = new Promise((done) => element.addEventListener("pitch-result", (event) => done(event.detail)));
document.body.append(element);
window.found = [near.result, far.result, await shown].map((result) => JSON.stringify(result));
`;

let folder;
let browser;
let expected;
before(async () => {
  folder = mkdtempSync(join(tmpdir(), "pitchwright-vite-"));
  mkdirSync(join(folder, "node_modules"));
  cpSync(packageFolder, join(folder, "node_modules/pitchwright"), { recursive: true });
  writeFileSync(join(folder, "package.json"), '{"type":"module","dependencies":{"pitchwright":"*"}}');
  writeFileSync(join(folder, "index.html"), '<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Vite</title></head><body><script type="module" src="/main.js"></script></body></html>');
  writeFileSync(join(folder, "main.js"), program);
  browser = await launch();
  const sheet = await pitchwright.openSheet(text);
  expected = JSON.stringify(sheet.result);
  sheet.free();
});
after(async () => {
  await browser.close();
  rmSync(folder, { recursive: true });
});

async function foundAt(address) {
  const context = await browser.newContext();
  const page = await context.newPage();
  const offences = [];
  page.on("pageerror", (error) => offences.push(String(error)));
  await page.goto(address);
  await page.waitForFunction(() => window.found, null, { timeout: 20_000 }).catch((error) => offences.push(String(error)));
  const found = await page.evaluate(() => window.found);
  await context.close();
  return { found, offences };
}

test("built", async () => {
  await build({ root: folder, configFile: false, logLevel: "error", build: { target: "es2022" } });
  const server = await serve({}, {}, join(folder, "dist"));
  assert.deepEqual(await foundAt(`${server.address}/index.html`), { found: [expected, expected, expected], offences: [] });
  await server.stop();
});

test("served for development", async () => {
  const server = await createServer({ root: folder, configFile: false, logLevel: "error", server: { host: "127.0.0.1", port: 0, ws: false } });
  await server.listen();
  assert.deepEqual(await foundAt(server.resolvedUrls.local[0]), { found: [expected, expected, expected], offences: [] });
  await server.close();
});
