/** Figures, free bodies and starting sheets. */
import assert from "node:assert/strict";
import { test } from "node:test";
import { pages, settled, sheetText, startingSheet, valuesOf } from "./support.mjs";

const withPage = pages();

test("figures and free bodies are drawn, and one is saved as a file", () => withPage(async (page) => {
  const drawings = page.locator(".drawings figure");
  assert.equal(await drawings.count(), 2);
  assert.match(await drawings.first().locator("svg title").textContent(), /Tail load at the corners/);
  assert.match(await drawings.last().locator("svg").textContent(), /sum of forces/);
  const download = page.waitForEvent("download");
  await drawings.first().getByRole("button").click();
  assert.equal((await download).suggestedFilename(), "Tail load at the corners.svg");
}));

test("a drawing's name stays text", () => withPage(async (page) => {
  const text = "vary a: p | q\nF by a = 1 | 2\nfigure \"<script>window.ran = 1</script><b>x</b>\": F against a\n";
  await page.locator("input[type=file]").setInputFiles({ name: "x.pitchwright", mimeType: "text/plain", buffer: Buffer.from(text) });
  await page.waitForFunction(() => document.querySelectorAll(".drawings figure").length === 1);
  await settled(page);
  const figure = page.locator(".drawings figure");
  assert.equal(await figure.count(), 1);
  assert.match(await figure.locator("svg title").textContent(), /<script>/);
  assert.equal(await page.evaluate(() => window.ran), undefined);
}));

test("a starting sheet is chosen by its title, and the way back to the one before is kept", () => withPage(async (page) => {
  const chooser = page.getByLabel("Starting sheets");
  const names = await chooser.locator("option").evaluateAll((options) => options.map(({ value }) => value).filter(Boolean));
  assert.ok(names.length >= 5, names.join(", "));
  await chooser.selectOption("osier-boom");
  await settled(page);
  assert.notEqual(await sheetText(page), startingSheet);
  assert.match(await page.locator(".box.title .content").textContent(), /boom/i);
}));

test("a starting sheet that uses others has their values", () => withPage(async (page) => {
  await page.getByLabel("Starting sheets").selectOption("osier-tail-summary");
  await page.waitForFunction(() => document.querySelector("table.form").textContent.includes("Greatest limit loads by cause"));
  await page.waitForFunction(() => !document.querySelector("table.form").textContent.includes("There is no sheet"));
  await settled(page);
  assert.match((await valuesOf(page, "P_limit_down")).join(" "), /^-\d+/);
}));
