/** Findings show at their row and in the list, and their fixes work. */
import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { launch, openPage, rowOf, settled, sheetText, startingSheet, valuesOf } from "./support.mjs";

let browser;
before(async () => {
  browser = await launch();
});
after(() => browser.close());

async function misspell(page) {
  await rowOf(page, "L_w").locator("td.how").click();
  await page.locator(".typing .cm-content").press("Control+a");
  await page.keyboard.insertText("L_w [lb] = n*W - P_tt");
  await settled(page);
}

test("an error shows at its row, in the list and in the open row; what depends on it goes without values", async () => {
  const { page, context, offences } = await openPage(browser);
  const before = await valuesOf(page, "q");
  await misspell(page);
  const mark = rowOf(page, "L_w").locator("a.query.error").first();
  const number = await mark.textContent();
  assert.match(await page.locator(`#finding-${number}`).textContent(), /P_tt/);
  assert.match(await page.locator(".row-findings").textContent(), /P_tt/);
  assert.equal(await page.locator(".typing .problem.error").first().textContent(), "P_tt");
  assert.deepEqual(new Set(await valuesOf(page, "L_w")), new Set(["\u2013"]));
  assert.deepEqual(await valuesOf(page, "q"), before);
  assert.deepEqual(offences, []);
  await context.close();
});

test("a fix in the list mends the row, and undo takes the fix back", async () => {
  const { page, context, offences } = await openPage(browser);
  const before = await valuesOf(page, "L_w");
  await misspell(page);
  await page.locator(".queries .fix").filter({ hasText: "P_t" }).first().click();
  await settled(page);
  assert.match(await sheetText(page), /^L_w \[lb\] = n\*W - P_t$/m);
  assert.deepEqual(await valuesOf(page, "L_w"), before);
  assert.equal(await page.locator("a.query.error").count(), 0);
  await page.keyboard.press("Control+z");
  await settled(page);
  assert.match(await sheetText(page), /P_tt$/m);
  await page.keyboard.press("Control+z");
  await settled(page);
  assert.equal(await sheetText(page), startingSheet);
  assert.deepEqual(offences, []);
  await context.close();
});

test("a finding leads to its row", async () => {
  const { page, context } = await openPage(browser);
  await misspell(page);
  await page.keyboard.press("Enter");
  await page.locator(".queries li", { hasText: "P_tt" }).first().getByRole("button", { name: /^Go to item/ }).click();
  assert.match(await page.locator(".typing .cm-content").textContent(), /P_tt/);
  await context.close();
});
