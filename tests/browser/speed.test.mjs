/** How long the page takes from the disk to its first value, and from a key to the values. */
import assert from "node:assert/strict";
import { test } from "node:test";
import { launch, openPage, rowOf, settled, valuesOf } from "./support.mjs";

const median = (numbers) => [...numbers].sort((a, b) => a - b)[Math.floor(numbers.length / 2)];
const ms = (number) => `${number.toFixed(1)} ms`;

test("the first value stands soon after the file is opened", async (t) => {
  const times = [];
  for (let run = 0; run < 5; run++) {
    // A browser of its own each time: nothing is warm but the disk.
    const browser = await launch();
    const { page } = await openPage(browser);
    times.push(await page.evaluate(() => performance.getEntriesByName("first values")[0].startTime));
    await browser.close();
  }
  t.diagnostic(`cold start to first value: median ${ms(median(times))} of ${times.map(ms).join(", ")}`);
  assert.ok(median(times) < 1500);
});

test("values follow a key within a frame or few", async (t) => {
  const browser = await launch();
  const { page } = await openPage(browser);
  await rowOf(page, "S").locator("td.how").click();
  const times = [];
  for (let key = 0; key < 20; key++) {
    await page.keyboard.press(key % 2 ? "Backspace" : "1");
    await settled(page);
    times.push(await page.evaluate(() => performance.getEntriesByName("key to values")[0].duration));
  }
  t.diagnostic(`key to values: median ${ms(median(times))}, longest ${ms(Math.max(...times))}`);
  assert.ok(median(times) < 100);
  await browser.close();
});

/** Runs in the page before its scripts: the last draft is a sheet of 2,000 rows under 200 conditions. */
function longSheet() {
  if (localStorage.getItem("pitchwright:last")) return;
  const lines = ["title Long", "vary k [1]: 1 to 200 step 1", "x_0 [ft] = 1 ft"];
  for (let row = 1; row < 2000; row++) lines.push(`x_${row} [ft] = ${row % 7 ? "" : "k*"}${row} ft + 0*x_${row - 1} ; remark ${row}`);
  localStorage.setItem("pitchwright:sheet:long", JSON.stringify({ name: null, text: `${lines.join("\n")}\n` }));
  localStorage.setItem("pitchwright:last", "long");
}

test("a form of 2,000 rows under 200 conditions opens soon, scrolls, and takes keys at once", async (t) => {
  const browser = await launch();
  const { page, offences } = await openPage(browser, { prepare: longSheet });
  const opened = await page.evaluate(() => performance.getEntriesByName("first values")[0].startTime);
  t.diagnostic(`2,000 rows under 200 conditions: first values after ${ms(opened)}`);
  assert.ok(opened < 6000);
  // Only what is in sight and about it stands in the document.
  assert.ok(await page.locator("table.form > tbody").count() < 200);
  await page.evaluate(() => window.scrollTo(0, document.documentElement.scrollHeight / 2));
  await page.locator("td.symbol", { hasText: /^x_?1000$/ }).waitFor();
  assert.deepEqual(await valuesOf(page, "x_1000"), ["1000"]);
  await rowOf(page, "x_1000").locator("button.opens").focus();
  await page.keyboard.press("End");
  await page.keyboard.press("ArrowUp");
  assert.match(await page.evaluate(() => document.activeElement.getAttribute("aria-label")), /x_1999/);
  await page.keyboard.press("Home");
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  await page.locator(".typing .cm-content").waitFor();
  await page.evaluate(() => {
    window.taken = [];
    document.addEventListener("keydown", () => (window.pressed = performance.now()), true);
    document.addEventListener("input", () => window.taken.push(performance.now() - window.pressed));
  });
  for (let key = 0; key < 10; key++) {
    await page.keyboard.press("0");
    await settled(page);
  }
  const taken = await page.evaluate(() => window.taken);
  t.diagnostic(`a key in it keeps the page busy for a median of ${ms(median(taken))}`);
  assert.equal(taken.length, 10);
  assert.ok(median(taken) < 100);
  // Paper gets all of it.
  await page.evaluate(() => window.dispatchEvent(new Event("beforeprint")));
  assert.ok(await page.locator("table.form > tbody").count() >= 2000);
  await page.evaluate(() => window.dispatchEvent(new Event("afterprint")));
  assert.ok(await page.locator("table.form > tbody").count() < 200);
  assert.deepEqual(offences, []);
  await browser.close();
});
