/** Nothing typed is lost: drafts, files, a broken store, a broken engine. */
import assert from "node:assert/strict";
import { mkdtempSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { after, before, test } from "node:test";
import { launch, openPage, rowOf, settled, sheetText, startingSheet, valuesOf } from "./support.mjs";

let browser;
const folder = mkdtempSync(join(tmpdir(), "pitchwright-"));
before(async () => {
  browser = await launch();
});
after(() => browser.close());

const withoutPicker = () => Reflect.deleteProperty(window, "showSaveFilePicker");

test("a reload in the middle of a row keeps what was typed", async () => {
  const { page, context, offences } = await openPage(browser);
  await rowOf(page, "S").locator("td.how").click();
  await page.keyboard.type("9");
  await page.reload();
  await settled(page);
  assert.deepEqual(await valuesOf(page, "S"), ["1429"]);
  assert.deepEqual(offences, []);
  await context.close();
});

test("a sheet saved as a file and opened again is the same, byte for byte", async () => {
  const { page, context, offences } = await openPage(browser, { prepare: withoutPicker, acceptDownloads: true });
  const [download] = await Promise.all([page.waitForEvent("download"), page.getByRole("button", { name: "Save", exact: true }).click()]);
  assert.equal(download.suggestedFilename(), "osier-single-seater-horizontal-tail-balancing-loads.pitchwright");
  const file = join(folder, "saved.pitchwright");
  await download.saveAs(file);
  assert.equal(readFileSync(file, "utf8"), startingSheet);
  writeFileSync(file, startingSheet.replace("= 142 ", "= 155 "));
  await page.locator("input[type=file]").setInputFiles(file);
  await page.waitForFunction(() => document.querySelector("table.form").textContent.includes("155.0"));
  assert.equal(await sheetText(page), startingSheet.replace("= 142 ", "= 155 "));
  const [again] = await Promise.all([page.waitForEvent("download"), page.getByRole("button", { name: "Save", exact: true }).click()]);
  assert.equal(again.suggestedFilename(), "saved.pitchwright");
  assert.deepEqual(offences, []);
  await context.close();
});

test("opening another sheet leaves a way back to the one before", async () => {
  const { page, context } = await openPage(browser);
  await rowOf(page, "S").locator("td.how").click();
  await page.keyboard.type("1");
  await page.getByRole("button", { name: "New sheet" }).click();
  await settled(page);
  assert.equal(await sheetText(page), "");
  await page.getByRole("button", { name: "Back to it" }).click();
  await settled(page);
  assert.deepEqual(await valuesOf(page, "S"), ["1421"]);
  await context.close();
});

test("a file that is no text is refused, and the sheet stays", async () => {
  const { page, context } = await openPage(browser);
  const file = join(folder, "picture.pitchwright");
  writeFileSync(file, Buffer.from([0xff, 0xfe, 0x00, 0x80]));
  await page.locator("input[type=file]").setInputFiles(file);
  await page.locator('[data-notice="file"]').waitFor();
  assert.equal(await sheetText(page), startingSheet);
  await context.close();
});

test("a full or forbidden store is said plainly, with a way to save", async () => {
  const { page, context, offences } = await openPage(browser, {
    prepare: () => {
      Storage.prototype.setItem = () => {
        throw new DOMException("full", "QuotaExceededError");
      };
    },
  });
  const notice = page.locator('[data-notice="store"]');
  assert.match(await notice.textContent(), /keeps no draft/);
  assert.equal(await notice.getByRole("button", { name: "Save", exact: true }).count(), 1);
  assert.deepEqual(offences, []);
  await context.close();
});

test("an engine that breaks off is started anew, and the sheet is untouched", async () => {
  const { page, context } = await openPage(browser, {
    // The worker that is started first answers one text and then breaks off; those after it are whole.
    prepare: () => {
      const Whole = Worker;
      let made = 0;
      window.Worker = class extends Whole {
        constructor(address) {
          super(address);
          this.breaks = made++ === 0;
          this.texts = 0;
        }
        postMessage(message) {
          if (this.breaks && message.text !== undefined && ++this.texts === 2) {
            this.onmessage({ data: { serial: message.serial, failure: "made to break off" } });
          } else {
            super.postMessage(message);
          }
        }
      };
    },
  });
  await rowOf(page, "S").locator("td.how").click();
  await page.keyboard.type("1");
  await page.locator('[data-notice="engine"]').waitFor();
  assert.match(await page.locator('[data-notice="engine"]').textContent(), /made to break off.*untouched/);
  assert.match(await sheetText(page), /= 1421 /);
  await page.keyboard.type("0");
  await settled(page);
  assert.deepEqual(await valuesOf(page, "S"), ["14210"]);
  assert.equal(await page.locator('[data-notice="engine"]').count(), 0);
  await context.close();
});
