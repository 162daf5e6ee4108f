/** The package and its element in a foreign page over http, in a real browser. */
import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { AxeBuilder } from "@axe-core/playwright";
import { packageFolder, pitchwright, root, serve, smallSheet, startingSheetOf } from "./package-support.mjs";
import { launch } from "./support.mjs";

const frame = (body) => `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Foreign page</title>
<script type="module">import "/package/element.js";</script></head><body><main><h1>Foreign page</h1>${body}</main></body></html>`;

const texts = {
  "/inside.html": frame(`<pitch-sheet id="one">\n${smallSheet.replaceAll("<", "&lt;").replace(/^/gm, "    ")}</pitch-sheet>`),
  "/files.html": frame('<pitch-sheet id="one" src="/loads.pitchwright" readonly inputs="q = 700 Pa"></pitch-sheet><pitch-sheet id="two" src="/loads.pitchwright"></pitch-sheet>'),
  "/osier.html": frame('<pitch-sheet id="one" src="/sheets/osier-balancing-loads.pitchwright"></pitch-sheet>'),
  "/plain.html": '<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Plain</title></head><body></body></html>',
  "/loads.pitchwright": 'use "wing" as g\nq [Pa] = 600 ; stated\nL [N] = q*g.S\n',
  "/wing.pitchwright": "S [m^2] = 10\n",
};

let server;
let browser;
before(async () => {
  server = await serve({ package: packageFolder, sheets: `${root}www/sheets` }, texts);
  browser = await launch();
});
after(async () => {
  await browser.close();
  await server.stop();
});

/** Opens a page and notes what it complains of and asks for. */
async function open(path) {
  const context = await browser.newContext({ viewport: { width: 1200, height: 900 } });
  const page = await context.newPage();
  const offences = [];
  const asked = [];
  page.on("console", (message) => { if (message.type() === "error") offences.push(`${message.text()} ${message.location().url}`); });
  page.on("pageerror", (error) => offences.push(String(error)));
  page.on("request", (request) => asked.push(new URL(request.url()).pathname));
  await page.goto(server.address + path);
  return { page, context, asked, offences: () => offences.filter((text) => !text.includes("favicon")) };
}

const shown = (page, id = "one") => page.waitForFunction((of) => document.getElementById(of)?.result, id, { timeout: 10_000 });

test("a plain page opens sheets, on its own thread and in another, with the bits that Node has", async () => {
  const { page, context, offences } = await open("/plain.html");
  const text = startingSheetOf("osier-balancing-loads");
  const found = await page.evaluate(async (given) => {
    const { openSheet } = await import("/package/index.js");
    const sheets = [await openSheet(given), await openSheet(given, { worker: true })];
    const results = sheets.map(({ result }) => JSON.stringify(result));
    const [values, far] = [sheets[0].values("P_t"), await sheets[1].values("P_t")];
    const same = values.length > 1 && values.every((value, at) => Object.is(value, far[at]));
    for (const sheet of sheets) sheet.free();
    return { results, same };
  }, text);
  const sheet = await pitchwright.openSheet(text);
  assert.deepEqual(found, { results: [JSON.stringify(sheet.result), JSON.stringify(sheet.result)], same: true });
  sheet.free();
  assert.deepEqual(offences(), []);
  await context.close();
});

test("the element shows the text inside it, and an input typed over gives another result", async () => {
  const { page, context, offences } = await open("/inside.html");
  await shown(page);
  const element = page.locator("pitch-sheet");
  await element.locator('td.value[data-symbol="L"]').waitFor();
  assert.equal(await element.locator('td.value[data-symbol="L"]').innerText(), "6840");
  assert.equal(await element.locator(".verdict").innerText(), "met");
  const results = page.evaluate(() => new Promise((done) => {
    document.addEventListener("pitch-result", (event) => done([event.target.id, event.detail.quantities.find(({ symbol }) => symbol === "L").values]), { once: true });
  }));
  const field = element.getByLabel("S, how obtained");
  await field.fill("20 m^2");
  await field.press("Enter");
  assert.deepEqual(await results, ["one", [12000]]);
  assert.equal(await element.locator(".verdict").innerText(), "not met");
  await field.fill("20 kg");
  await field.press("Enter");
  await element.getByRole("alert").filter({ hasText: "mass" }).waitFor();
  assert.equal(await field.getAttribute("aria-invalid"), "true");
  assert.equal(await element.locator('td.value[data-symbol="L"]').innerText(), "12000");
  assert.deepEqual(offences(), []);
  await context.close();
});

test("several elements share one engine, fetch their sheets and take inputs from attribute and property", async () => {
  const { page, context, asked, offences } = await open("/files.html");
  await shown(page);
  await shown(page, "two");
  const valueOf = (id) => page.evaluate((of) => document.getElementById(of).result.quantities.find(({ symbol }) => symbol === "L").values[0], id);
  assert.deepEqual([await valueOf("one"), await valueOf("two")], [7000, 6000]);
  assert.equal(asked.filter((path) => path.endsWith(".wasm")).length, 1);
  assert.equal(await page.locator("#one input").count(), 0, "a readonly sheet has no fields");
  assert.ok(await page.locator("#two input").count() > 0);
  await page.evaluate(() => { document.getElementById("two").inputs = { q: 800 }; });
  assert.equal(await valueOf("two"), 8000);
  await page.evaluate(() => { document.getElementById("one").setAttribute("inputs", "q = 900 Pa"); });
  assert.equal(await valueOf("one"), 9000);
  await page.evaluate(() => { document.getElementById("one").readonly = false; });
  assert.ok(await page.locator("#one input").count() > 0);
  await page.evaluate(() => document.getElementById("two").remove());
  assert.deepEqual(offences(), []);
  await context.close();
});

test("an address without a sheet is told in words", async () => {
  const { page, context } = await open("/files.html");
  await shown(page);
  await page.evaluate(() => { document.getElementById("one").src = "/nothing.pitchwright"; });
  await page.locator("#one").getByRole("alert").filter({ hasText: "There is no sheet" }).waitFor();
  await context.close();
});

test("a whole starting sheet is shown accessibly: form, findings, figures, conditions", async () => {
  const { page, context, offences } = await open("/osier.html");
  await shown(page);
  const element = page.locator("pitch-sheet");
  assert.ok(await element.locator("table.form > tbody > tr").count() > 10);
  assert.equal(await element.locator("figure img").count(), await page.evaluate(() => {
    const { figures, freebodies } = document.getElementById("one").result;
    return [...figures, ...freebodies].filter(({ svg }) => svg).length;
  }));
  assert.ok(await element.locator("td.value strong").count() >= 1, "the governing value is marked");
  const select = element.locator("select").first();
  const before = await element.locator("table.form").innerText();
  const other = await select.locator("option:not(:checked)").first().getAttribute("value");
  await select.focus();
  await select.selectOption(other);
  assert.notEqual(await element.locator("table.form").innerText(), before);
  assert.equal(await page.evaluate(() => document.getElementById("one").shadowRoot.activeElement.localName), "select");
  const { violations } = await new AxeBuilder({ page }).analyze();
  assert.deepEqual(violations.map(({ id, nodes }) => `${id}: ${nodes[0].html}`), []);
  assert.deepEqual(offences(), []);
  await context.close();
});

test("custom properties and parts style it from outside", async () => {
  const { page, context } = await open("/inside.html");
  await shown(page);
  await page.addStyleTag({ content: "pitch-sheet { --pitch-ink: rgb(1, 2, 3); } pitch-sheet::part(verdict) { color: rgb(4, 5, 6); }" });
  const colour = (selector) => page.locator("pitch-sheet").locator(selector).first().evaluate((node) => getComputedStyle(node).color);
  assert.equal(await colour("h2"), "rgb(1, 2, 3)");
  assert.equal(await colour(".verdict"), "rgb(4, 5, 6)");
  await context.close();
});
