/** The page and the command line give the same numbers. */
import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { commandLineReport, launch, openPage, settled, sheetText, startingSheet, typeRows, valuesOf } from "./support.mjs";

let browser;
before(async () => {
  browser = await launch();
});
after(() => browser.close());

/** All the digits that the form can show, so that what is read off it tells two neighbours apart. */
const text = startingSheet.replace("sources required", "digits 15\nsources required");

test("a sheet typed row by row shows the numbers that the command line gives", async () => {
  const { page, context, offences } = await openPage(browser);
  await page.getByRole("button", { name: "New sheet" }).click();
  await typeRows(page, text.trimEnd().split("\n"));
  await page.keyboard.press("Escape");
  await settled(page);
  assert.equal(await sheetText(page), text);
  const report = commandLineReport(await sheetText(page));
  await page.getByLabel("Across").selectOption("point");
  for (const loading of ["light", "gross"]) {
    for (const cg of ["fwd", "aft"]) await compare(page, report, { loading, cg });
  }
  assert.deepEqual(offences, []);
  await context.close();
});

async function compare(page, report, at) {
  for (const [axis, label] of Object.entries(at)) await page.getByLabel(axis, { exact: true }).selectOption(label);
  for (const symbol of ["S", "x_cg", "W", "q", "M", "P_t", "L_w", "CL"]) {
    const quantity = report.quantities.find((each) => each.symbol === symbol);
    const expected = expectedValues(report, quantity, at);
    const shown = (await valuesOf(page, symbol)).map(Number);
    assert.equal(shown.length, expected.length, symbol);
    // Fifteen figures are shown of the seventeen that tell two doubles apart.
    shown.forEach((value, index) => assert.ok(Math.abs(value - expected[index]) <= 1e-14 * Math.abs(expected[index]), `${symbol}: ${value} and ${expected[index]}`));
  }
}

/** The values along `point` at the labels `at`, from the row-major list of the report. */
function expectedValues(report, quantity, at) {
  const labels = (name) => report.axes.find((axis) => axis.name === name).labels;
  const points = quantity.axes.includes("point") ? labels("point") : [null];
  return points.map((point) => {
    const condition = { ...at, point };
    const position = quantity.axes.reduce((sum, name) => sum * labels(name).length + labels(name).indexOf(condition[name]), 0);
    return quantity.values[position];
  });
}
