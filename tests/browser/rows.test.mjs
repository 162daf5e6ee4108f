/** Working on rows by keyboard and mouse. */
import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { launch, openPage, rowOf, settled, sheetText, startingSheet, typeRows, valuesOf } from "./support.mjs";

let browser;
before(async () => {
  browser = await launch();
});
after(() => browser.close());

async function withPage(run, options) {
  const { page, context, offences } = await openPage(browser, options);
  await run(page, context);
  assert.deepEqual(offences, []);
  await context.close();
}

async function openRow(page, symbol) {
  await rowOf(page, symbol).locator("td.how").first().click();
  await page.locator(".typing .cm-content").waitFor();
}

test("the first start shows the starting sheet", () => withPage(async (page) => {
  assert.equal(await sheetText(page), startingSheet);
  assert.equal(await page.locator(".box.title .content").textContent(), "Osier single-seater, horizontal tail: balancing loads");
  assert.deepEqual(await valuesOf(page, "S"), ["142.0"]);
  assert.equal((await valuesOf(page, "P_t")).length, 6);
}));

test("a click opens a row, Enter takes it and opens the next", () => withPage(async (page) => {
  await openRow(page, "S");
  await page.keyboard.press("Home");
  await page.keyboard.press("Control+ArrowRight");
  await page.locator(".typing .cm-content").press("Control+a");
  await page.keyboard.insertText("S [ft^2] = 150 ; drawing OS-010");
  await settled(page);
  assert.deepEqual(await valuesOf(page, "S"), ["150.0"]);
  await page.keyboard.press("Enter");
  assert.match(await page.locator(".typing .cm-content").textContent(), /^c {6}\[ft\]/);
}));

test("Escape gives back the old row, and redo brings the new one again", () => withPage(async (page) => {
  await openRow(page, "S");
  await page.keyboard.insertText("7");
  await settled(page);
  assert.notEqual(await sheetText(page), startingSheet);
  await page.keyboard.press("Escape");
  await settled(page);
  assert.equal(await sheetText(page), startingSheet);
  assert.equal(await page.locator(".typing").count(), 0);
  await page.keyboard.press("Control+y");
  await settled(page);
  assert.match(await sheetText(page), /= 1427 /);
}));

test("arrows move between rows, Insert and Ctrl Enter add, Delete removes, undo takes it all back", () => withPage(async (page) => {
  await openRow(page, "c");
  await page.keyboard.press("Escape");
  await page.keyboard.press("ArrowUp");
  await page.keyboard.press("Insert");
  await typeRows(page, ["a_1 = 1", "a_2 = 2"]);
  await page.keyboard.press("Escape");
  await settled(page);
  const lines = (await sheetText(page)).split("\n");
  const at = lines.findIndex((line) => line.startsWith("S "));
  assert.deepEqual(lines.slice(at - 2, at), ["a_1 = 1", "a_2 = 2"]);
  await rowOf(page, "a_2").locator("button.opens").focus();
  await page.keyboard.press("Delete");
  await settled(page);
  assert.equal(await rowOf(page, "a_2").count(), 0);
  for (let step = 0; step < 3; step++) await page.keyboard.press("Control+z");
  await settled(page);
  assert.equal(await sheetText(page), startingSheet);
}));

test("Alt and an arrow move a row", () => withPage(async (page) => {
  await rowOf(page, "S").locator("button.opens").focus();
  await page.keyboard.press("Alt+ArrowDown");
  await page.keyboard.press("Alt+ArrowDown");
  await settled(page);
  const order = (await sheetText(page)).split("\n").map((line) => line.split(/\s/)[0]);
  assert.deepEqual(order.slice(7, 10), ["c", "x_ac", "S"]);
  await page.keyboard.press("Alt+ArrowUp");
  await settled(page);
  const next = (await sheetText(page)).split("\n").map((line) => line.split(/\s/)[0]);
  assert.deepEqual(next.slice(7, 10), ["c", "S", "x_ac"]);
}));

test("rows are cut, and pasted as text", () => withPage(async (page) => {
  await rowOf(page, "S").locator("button.opens").focus();
  await page.keyboard.press("Shift+ArrowDown");
  await page.keyboard.press("Control+x");
  await settled(page);
  assert.equal(await rowOf(page, "c").count(), 0);
  await rowOf(page, "x_ac").locator("button.opens").focus();
  await page.keyboard.press("Control+v");
  await settled(page);
  const order = (await sheetText(page)).split("\n").map((line) => line.split(/\s/)[0]);
  assert.deepEqual(order.slice(7, 10), ["x_ac", "S", "c"]);
}, { permissions: ["clipboard-read", "clipboard-write"] }));

test("a table opens as its lines, and Enter stays in it until its end", () => withPage(async (page) => {
  await rowOf(page, "V").locator("td.how").click();
  await page.locator(".typing .cm-content").press("Control+Home");
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("End");
  await page.keyboard.press("Enter");
  await page.keyboard.insertText("B | 60 | 2 | -0.050");
  await settled(page);
  assert.deepEqual(await page.locator("thead .label").allTextContents(), ["A", "B", "C", "D", "E", "F", "G"]);
  assert.equal((await valuesOf(page, "P_t")).length, 7);
}));

test("the whole sheet can be typed as text, with one undo for both ways", () => withPage(async (page) => {
  await page.getByRole("button", { name: "Sheet text" }).click();
  await page.locator(".whole-text .cm-content").press("Control+End");
  await page.keyboard.insertText("b_t [ft] = 9");
  await settled(page);
  await page.getByRole("button", { name: "Computation form" }).click();
  assert.deepEqual(await valuesOf(page, "b_t"), ["9.000"]);
  await rowOf(page, "S").locator("button.opens").focus();
  await page.keyboard.press("Control+z");
  await settled(page);
  assert.equal(await sheetText(page), startingSheet);
}));

test("the title block is filled in place", () => withPage(async (page) => {
  await page.getByRole("button", { name: /^Checked/ }).click();
  await page.keyboard.insertText("A. Checker");
  await page.keyboard.press("Enter");
  await settled(page);
  assert.equal((await sheetText(page)).split("\n")[3], "checked A. Checker");
  assert.equal(await page.locator(".box.checked .content").textContent(), "A. Checker");
}));

test("what is across, and at which labels, is chosen in the head", () => withPage(async (page) => {
  await page.getByLabel("Across").selectOption("cg");
  assert.deepEqual(await page.locator("thead .label").allTextContents(), ["fwd", "aft"]);
  assert.deepEqual(await valuesOf(page, "x_cg"), ["5.950", "6.450"]);
  assert.equal(await page.locator("table.own tbody tr").count(), 6);
  await page.getByLabel("loading", { exact: true }).selectOption("light");
  assert.deepEqual(await valuesOf(page, "W"), ["430.0"]);
  assert.equal(await page.getByLabel("Other axes").inputValue(), "");
}));

test("the value that governs is ringed", () => withPage(async (page) => {
  await page.getByLabel("Other axes").selectOption("P_t");
  const ringed = rowOf(page, "P_t").locator(".ring.governs");
  assert.equal(await ringed.count(), 1);
  const value = (await ringed.textContent()).replace(" (governs)", "");
  const gathered = page.locator("table.gathered tbody tr").first();
  assert.ok((await gathered.textContent()).includes(value));
}));

test("a row that is taken is spoken with its value and findings", () => withPage(async (page) => {
  await openRow(page, "S");
  await page.keyboard.press("Control+Enter");
  await settled(page);
  await page.waitForFunction(() => /S 142\.0 ft\^2.*no findings/.test(document.querySelector("body > [aria-live]").textContent));
}));
