/** Reports: print and its preview, revisions and their comparison, the copy of the page, tables as they arrive. */
import assert from "node:assert/strict";
import { mkdtempSync, readFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import { pathToFileURL } from "node:url";
import { pages, rowOf, settled, sheetText, startingSheet, valuesOf } from "./support.mjs";

const folder = mkdtempSync(join(tmpdir(), "pitchwright-"));
const onPage = pages({ acceptDownloads: true });
const withPage = (run, options) => onPage((page, context) => run(page, page.locator("aside.slip"), context), options);

async function downloaded(page, button) {
  const [download] = await Promise.all([page.waitForEvent("download"), button.click()]);
  const file = join(folder, download.suggestedFilename());
  await download.saveAs(file);
  return file;
}

test("the print is looked at first, with boxes to sign and what governs, and goes into a file", () => withPage(async (page) => {
  await page.getByRole("button", { name: "Print", exact: true }).click();
  const paper = page.frameLocator("iframe.sheet-of-paper");
  await paper.locator("h1").waitFor();
  assert.equal(await paper.locator("h1").textContent(), "Osier single-seater, horizontal tail: balancing loads");
  const text = await paper.locator("body").textContent();
  for (const part of ["Inputs", "Assumptions to be confirmed", "782a6965d022", "prepared", "checked", "approved", "CL <= CL_max"]) assert.ok(text.includes(part), part);
  // The document's own style is let in.
  assert.equal(await paper.locator("header").evaluate((header) => getComputedStyle(header).borderTopStyle), "solid");
  const file = await downloaded(page, page.getByRole("button", { name: "Save as HTML" }));
  assert.match(readFileSync(file, "utf8"), /^<!DOCTYPE html>/);
  await page.getByRole("button", { name: "Back to the form" }).click();
  assert.equal(await page.locator(".preview").count(), 0);
}));

test("a revision is kept, compared with the sheet as it is now, and opened", () => withPage(async (page, slip) => {
  await page.getByRole("button", { name: "Reports" }).click();
  await slip.getByRole("button", { name: "Keep a revision" }).click();
  await slip.getByRole("button", { name: "Put away" }).click();
  await rowOf(page, "c").locator("td.how").click();
  await page.keyboard.type("5");
  await page.keyboard.press("Enter");
  await page.keyboard.press("Escape");
  await settled(page);
  await page.getByRole("button", { name: "Reports" }).click();
  await slip.getByRole("button", { name: "Compare with the form" }).click();
  await slip.getByText("Compared with revision C").waitFor();
  const row = slip.locator("tbody tr").filter({ has: page.locator("th", { hasText: /^c$/ }) });
  assert.deepEqual(await row.locator("td").allTextContents(), ["", "ft", "4.600", "4.650", "+0.05000"]);
  assert.match(await slip.locator("tbody").textContent(), /P_tgoverns, largest.*Requirement: CL <= CL_max.*metmet/);
  await slip.getByRole("button", { name: "Reports" }).click();
  await slip.locator(".revisions").getByRole("button", { name: "Open" }).click();
  await settled(page);
  assert.equal(await sheetText(page), startingSheet);
}));

test("all sheets go into one file and come in from it, and a sheet is deleted after asking", () => withPage(async (page, slip) => {
  await page.getByRole("button", { name: "Reports" }).click();
  const file = await downloaded(page, slip.getByRole("button", { name: "Save all as one file" }));
  await slip.locator("input.brings-in").setInputFiles(file);
  await slip.locator("table.kept tbody tr").nth(1).waitFor();
  await slip.getByRole("button", { name: "Delete" }).click();
  await slip.getByRole("button", { name: "Delete for good" }).click();
  assert.equal(await slip.locator("table.kept tbody tr").count(), 1);
  assert.equal(await sheetText(page), startingSheet);
}));

test("a copy of the page carries the sheet, opens with it under the same policy, and copies itself again", () => withPage(async (page, slip, context) => {
  await rowOf(page, "S").locator("td.how").click();
  await page.keyboard.press("End");
  await page.keyboard.insertText(" </script><!-- $&");
  await settled(page);
  const text = await sheetText(page);
  await page.getByRole("button", { name: "Reports" }).click();
  const first = await downloaded(page, slip.getByRole("button", { name: /^Save a copy of the page/ }));
  const copy = await context.newPage();
  const offences = [];
  copy.on("console", (message) => message.type() === "error" && offences.push(message.text()));
  copy.on("pageerror", (error) => offences.push(String(error)));
  await copy.goto(pathToFileURL(first).href);
  await settled(copy);
  assert.equal(await sheetText(copy), text);
  assert.equal((await valuesOf(copy, "P_t")).length, 6);
  await copy.getByRole("button", { name: "Reports" }).click();
  const again = await downloaded(copy, copy.locator("aside.slip").getByRole("button", { name: /^Save a copy of the page/ }));
  const sheetless = (file) => readFileSync(file, "utf8").replace(/<script type="application\/json" id="sheet">.*<\/script>/, "");
  assert.equal(sheetless(again), sheetless(first));
  assert.deepEqual(offences, []);
}));

test("a polar with a decimal comma becomes a table, and what was changed is said", () => withPage(async (page) => {
  await page.evaluate(() => navigator.clipboard.writeText("Run 7\nalpha (deg)\tc_l\tc_d\n-4\t-0,21\t0,0121\n0\t0,22\t0,0102\n4\t0,65\t0,0111\n"));
  await page.locator(".foot button.opens").focus();
  await page.keyboard.press("Control+v");
  await settled(page);
  assert.ok((await sheetText(page)).endsWith("table alpha [deg] | c_l | c_d\n-4 | -0.21 | 0.0121\n0 | 0.22 | 0.0102\n4 | 0.65 | 0.0111\nend\n"));
  assert.match(await page.locator('[data-notice="converted"]').textContent(), /3 rows of 3 columns.*Decimal commas became points.*Run 7/);
  await page.getByRole("button", { name: "Take it back" }).click();
  await settled(page);
  assert.equal(await sheetText(page), startingSheet);
}, { permissions: ["clipboard-read", "clipboard-write"] }));

test("section coordinates of either layout go round from the trailing edge", () => withPage(async (page) => {
  const x = [0, 0.1, 0.2, 0.4, 0.6, 0.8, 1];
  const side = (sign) => x.map((at) => `${at.toFixed(3)} ${(sign * 0.2 * at * (1 - at)).toFixed(4)}`);
  const paste = async (text) => {
    await page.evaluate((written) => navigator.clipboard.writeText(written), text);
    await page.getByRole("button", { name: "New sheet" }).click();
    await page.keyboard.press("Control+v");
    await settled(page);
    return sheetText(page);
  };
  const sides = await paste(["Section T", "7. 7.", "", ...side(1), "", ...side(-1)].join("\n"));
  const about = await paste(["Section T", ...side(1).reverse(), ...side(-1).slice(1)].join("\n"));
  assert.equal(sides, about);
  assert.equal(sides.split("\n")[0], "table node | x | y ; Section T");
  assert.equal(sides.split("\n")[1], "1 | 1.000 | 0.0000");
  assert.equal(sides.split("\n").length, 16);
}, { permissions: ["clipboard-read", "clipboard-write"] }));
