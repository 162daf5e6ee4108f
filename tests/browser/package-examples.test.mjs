/** The examples for those who embed the engine: each runs as its first lines say. */
import assert from "node:assert/strict";
import { spawnSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { test } from "node:test";
import { pitchwright, root, serve } from "./package-support.mjs";
import { launch } from "./support.mjs";

const example = join(root, "www/example");
const sheetText = readFileSync(join(example, "tail.pitchwright"), "utf8");

/** What a program prints, when it ends well. */
function printed(program, ...words) {
  const { stdout, stderr, status } = spawnSync(program, words, { cwd: root, encoding: "utf8" });
  assert.equal(status, 0, stderr);
  return stdout;
}

test("three sliders drive a sheet in a foreign page", async () => {
  const server = await serve({ example, package: join(root, "www/package") });
  const browser = await launch();
  const page = await browser.newPage();
  const offences = [];
  page.on("pageerror", (error) => offences.push(String(error)));
  await page.goto(`${server.address}/example/index.html`);
  await page.locator("#verdict.good").waitFor();
  const before = await page.locator("#picture").innerHTML();
  // A small tail on a short boom is not stable enough at the aft centre of gravity.
  await page.locator("#S_t").fill("10");
  await page.locator("#verdict.bad").waitFor();
  assert.notEqual(await page.locator("#picture").innerHTML(), before);
  const sheet = await pitchwright.openSheet(sheetText);
  assert.deepEqual(sheet.set("S_t", 10), []);
  await page.waitForFunction(() => document.getElementById("sheet").result?.requirements[0].met === false);
  const shown = await page.evaluate(() => JSON.stringify(document.getElementById("sheet").result.governing));
  assert.equal(shown, JSON.stringify(sheet.result.governing));
  sheet.free();
  assert.deepEqual(offences, []);
  await browser.close();
  await server.stop();
});

test("a Node script runs a sheet over a list of weights", async () => {
  const list = printed("node", join(example, "weights.mjs"), join(example, "tail.pitchwright"), join(example, "weights.csv"));
  const [head, ...lines] = list.trim().split("\n");
  assert.equal(head, "W,n,P_t smallest,P_t largest,requirements");
  assert.equal(lines.length, 4);
  const sheet = await pitchwright.openSheet(sheetText);
  for (const line of lines) {
    const [weight, n, smallest, largest, met] = line.split(",");
    assert.deepEqual([...sheet.set("W", `${weight} lb`), ...sheet.set("n", n)], []);
    const values = [...sheet.values("P_t")];
    assert.deepEqual([Number(smallest), Number(largest), met], [Math.min(...values), Math.max(...values), "met"]);
  }
  sheet.free();
});

test("a Rust program uses the engine alone", () => {
  const list = printed("cargo", "run", "--quiet", "--package", "engine", "--example", "tail_load");
  assert.equal(list.split("\n").length, 6);
  // The condition of the engine's tour: 560 lb at 90 KEAS and 3.8 g.
  assert.match(list, /^90,-32\.66,2160\.66$/m);
});

test("a Rust program runs a sheet", async () => {
  const said = printed("cargo", "run", "--quiet", "--package", "formulas", "--example", "governing", "--", join(example, "tail.pitchwright"), "l_t", "10 ft");
  const sheet = await pitchwright.openSheet(sheetText);
  const [before] = sheet.values("P_t");
  assert.deepEqual(sheet.set("l_t", "10 ft"), []);
  const [after] = sheet.values("P_t");
  assert.notEqual(before, after);
  for (const load of [before, after]) assert.ok(said.includes(`P_t = ${load} lb at cg fwd`), said);
  sheet.free();
});
