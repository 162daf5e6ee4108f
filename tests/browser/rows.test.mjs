/** Working on rows by keyboard and mouse. */
import assert from "node:assert/strict";
import { test } from "node:test";
import { pages, rowOf, settled, sheetText, startingSheet, typeRows, valuesOf } from "./support.mjs";

const withPage = pages();

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

test("numbers are shown with the sheet's figures", () => withPage(async (page) => {
  // Significant figures with their zeros, exponent form from 10^7 and below 10^-4, ties away from zero.
  const cases = [["142", "142.0"], ["123456", "123500"], ["9999499", "9999000"], ["9999500", "1.000e7"], ["1e-4", "0.0001000"],
    ["0.00009999", "9.999e-5"], ["-0.055", "-0.05500"], ["0.125", "0.1250"], ["2.00025", "2.000"], ["1234.5", "1235"], ["0", "0"]];
  await page.getByRole("button", { name: "New sheet" }).click();
  await typeRows(page, cases.map(([typed], index) => `a_${index} = ${typed}`));
  await page.keyboard.press("Escape");
  await settled(page);
  for (const [index, [, shown]] of cases.entries()) assert.deepEqual(await valuesOf(page, `a_${index}`), [shown]);
}));

test("the values of chosen rows are copied, separated by tabs", () => withPage(async (page) => {
  await rowOf(page, "S").locator("button.opens").focus();
  await page.keyboard.press("Shift+ArrowDown");
  await page.keyboard.press("Alt+c");
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  assert.equal(copied.split("\n")[0], "1\tS\tft^2\t142\t142.0\tdrawing OS-010");
  assert.match(copied.split("\n")[1], /^2\tc\tft\t4\.6\t4\.600\t/);
}, { permissions: ["clipboard-read", "clipboard-write"] }));

test("a table whose key does not run across is drawn by itself", () => withPage(async (page) => {
  await page.getByRole("button", { name: "New sheet" }).click();
  await typeRows(page, ["vary cg: fwd | aft", "x [ft] by cg = 1 | 2", "table flap, alpha [deg] | CL", "up, -4 | -0.1", "up, 0 | 0.3", "down, 0 | 0.8", "end"]);
  await page.keyboard.press("Escape");
  await settled(page);
  await page.getByLabel("Across").selectOption("cg");
  assert.deepEqual(await page.locator("table.own thead th").allTextContents(), ["flap", "alphadeg", "CL"]);
  assert.deepEqual(await page.locator("table.own tbody tr").first().locator("th, td").allTextContents(), ["up", "\u22124", "\u22120.1"]);
}));
