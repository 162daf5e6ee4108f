/** How long the page takes from the disk to its first value, and from a key to the values. */
import assert from "node:assert/strict";
import { test } from "node:test";
import { launch, openPage, rowOf, settled } from "./support.mjs";

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
