/** What is looked up beside the form: trails, the catalogue, and what is offered while one types. */
import assert from "node:assert/strict";
import { test } from "node:test";
import { pages, rowOf, settled, sheetText, valuesOf } from "./support.mjs";

const onPage = pages();
const withPage = (run, options) => onPage((page) => run(page, page.locator("aside.slip")), options);

test("a value shows how it came about, and each thing it rests on is followed", () => withPage(async (page, slip) => {
  await rowOf(page, "P_t").locator("td.value").nth(2).click();
  await slip.getByText("Trail of P_t").waitFor();
  const derivation = slip.locator("dl.derivation");
  assert.match(await derivation.textContent(), /P_t = \(M \+ n\*W\*\(x_cg - x_ac\)\) \/ \(x_tail - x_ac\)/);
  // The row stands at loading gross and cg fwd, which governs; D is the third label across.
  assert.match(await derivation.textContent(), /\(\u22121111 ft\.lb \+ 3\.800\*560\.0 lb\*\(5\.950 ft \u2212 6\.100 ft\)\)/);
  assert.match(await derivation.textContent(), /P_t = \u2212127\.7 lb.*D, gross, fwd/);
  await slip.getByRole("button", { name: "Follow M" }).click();
  assert.match(await derivation.textContent(), /pitching_moment\(Cm, q, S, c\).*M = \u22121111 ft\.lb.*Source: definition/);
  await slip.getByRole("button", { name: "Follow S" }).click();
  assert.match(await slip.textContent(), /S = 142\.0 ft\^2.*drawing OS-010.*given here/);
  assert.deepEqual(await slip.locator("ol.way li").allTextContents(), ["P_t", "M", "S"]);
  await slip.locator("ol.way button").first().click();
  assert.match(await derivation.textContent(), /P_t = \u2212127\.7 lb/);
}));

test("the trail follows a change of the sheet, and Escape puts it away", () => withPage(async (page, slip) => {
  await rowOf(page, "M").locator("button.opens").focus();
  await page.keyboard.press("t");
  await slip.getByText("Trail of M").waitFor();
  await slip.getByRole("button", { name: "Follow c", exact: true }).click();
  await slip.getByRole("button", { name: "Go to its row" }).click();
  await page.keyboard.type("5");
  await settled(page);
  await slip.getByText("4.650 ft").waitFor();
  assert.deepEqual(await slip.locator("ol.way li").allTextContents(), ["M", "c"]);
  await slip.locator("h2").focus();
  await page.keyboard.press("Escape");
  assert.equal(await slip.isVisible(), false);
}));

test("the catalogue is searched by words, and an entry goes into the row being typed", () => withPage(async (page, slip) => {
  await rowOf(page, "q").locator("td.how").first().click();
  await page.locator(".typing .cm-content").press("Control+a");
  await page.keyboard.insertText("q [lb/ft^2] = 0*");
  await page.getByRole("button", { name: "Catalogue" }).click();
  await slip.locator(".entry").first().waitFor();
  await page.keyboard.insertText("equivalent airspeed pressure");
  const entry = slip.locator(".entry").filter({ hasText: "dynamic_pressure_of_eas" }).first();
  await entry.locator("summary").click();
  for (const caption of ["Written", "Takes", "Gives", "Method", "Holds", "Source", "Example"]) assert.ok((await entry.textContent()).includes(caption), caption);
  await entry.getByRole("button").click();
  await settled(page);
  assert.match(await sheetText(page), /q \[lb\/ft\^2\] = 0\*dynamic_pressure_of_eas\(\w+\)/);
  assert.ok(await page.locator(".typing .cm-editor.cm-focused").isVisible());
}));

test("what could stand there is offered; Tab takes it, Enter takes the row as it is typed", () => withPage(async (page) => {
  await rowOf(page, "q").locator("td.how").first().click();
  await page.locator(".typing .cm-content").press("Control+a");
  await page.keyboard.type("q [lb/ft^2] = dynamic_pressure_of_e");
  await page.locator(".cm-tooltip-autocomplete li", { hasText: "dynamic_pressure_of_eas" }).waitFor();
  await page.keyboard.press("Tab");
  await page.keyboard.type("V");
  await settled(page);
  assert.match(await page.locator(".typing .cm-content").textContent(), /= dynamic_pressure_of_eas\(V\)$/);
  assert.equal((await valuesOf(page, "q")).length, 6);
  await page.keyboard.press("End");
  await page.keyboard.type(" + P");
  await page.locator(".cm-tooltip-autocomplete li", { hasText: "P_t" }).waitFor();
  await page.keyboard.press("Enter");
  await settled(page);
  assert.match(await sheetText(page), /dynamic_pressure_of_eas\(V\) \+ P\n/);
}));

test("what stands there is told under the mouse, in the sheet text too, with the fix of a finding", () => withPage(async (page) => {
  await page.getByRole("button", { name: "Sheet text" }).click();
  await page.locator(".whole-text .kind-function", { hasText: "pitching_moment" }).hover();
  await page.locator(".told", { hasText: "nose up positive" }).waitFor();
  await page.locator(".whole-text .cm-content").press("Control+End");
  await page.keyboard.insertText("x_new = x_acc + 1 ft");
  await settled(page);
  await page.locator(".whole-text .problem").first().hover();
  const fix = page.locator(".told .fix").first();
  await fix.waitFor();
  await fix.click();
  await settled(page);
  assert.match(await sheetText(page), /x_new = x_ac \+ 1 ft/);
}));
