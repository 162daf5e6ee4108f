/** What the browser tests share: the built page in a real browser, its rows, and the command line's answers. */
import assert from "node:assert/strict";
import { spawnSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { after, before } from "node:test";
import { fileURLToPath, pathToFileURL } from "node:url";
import { chromium } from "playwright-core";

const root = fileURLToPath(new URL("../../", import.meta.url));

export const pageFile = root + "www/dist/pitchwright.html";
export const startingSheet = readFileSync(root + "www/sheets/osier-balancing-loads.pitchwright", "utf8");

const flags = ["--headless", "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run",
  "--disable-background-networking", "--disable-component-update", "--disable-sync"];

/** Starts the browser. */
export function launch() {
  return chromium.launch({ executablePath: "/usr/bin/chromium", args: flags });
}

/** Opens the built page from the disk in a context of its own, and notes everything it should not do. */
export async function openPage(browser, { prepare, ...options } = {}) {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, ...options });
  const page = await context.newPage();
  const offences = [];
  page.on("console", (message) => {
    if (message.type() === "error" || message.type() === "warning") offences.push(message.text());
  });
  page.on("pageerror", (error) => offences.push(String(error)));
  page.on("request", (request) => {
    if (/^(https?|wss?|ftp):/.test(request.url())) offences.push(request.url());
  });
  if (prepare) await page.addInitScript(prepare);
  await page.goto(pathToFileURL(pageFile).href);
  await settled(page);
  return { page, context, offences };
}

/**
 * One browser for all tests of a file. Gives what runs a test on a fresh page of it, and demands in the end that the page
 * complained of nothing and asked for nothing.
 */
export function pages(defaults = {}) {
  let browser;
  before(async () => {
    browser = await launch();
  });
  after(() => browser.close());
  return async (run, options) => {
    const { page, context, offences } = await openPage(browser, { ...defaults, ...options });
    await run(page, context);
    assert.deepEqual(offences, []);
    await context.close();
  };
}

/** Waits until the values belong to the text as it is now. */
export async function settled(page) {
  await page.waitForSelector("html[data-ready]");
  // The store has the text as soon as it changes; the values follow when the engine has answered.
  await page.waitForFunction(() => document.documentElement.dataset.ready === document.documentElement.dataset.asked);
}

/** The sheet's text, read where a person can read it. */
export async function sheetText(page) {
  return page.evaluate(() => {
    const last = sessionStorage.getItem("pitchwright:last");
    return JSON.parse(localStorage.getItem(`pitchwright:sheet:${last}`)).text;
  });
}

/** The table row that shows `symbol`. */
export function rowOf(page, symbol) {
  return page.locator("table.form > tbody > tr").filter({ has: page.locator("td.symbol", { hasText: new RegExp(`^${symbol}$`) }) }).first();
}

/** The values in the row of `symbol`, as shown. */
export async function valuesOf(page, symbol) {
  const cells = await rowOf(page, symbol).locator("td.value").evaluateAll((all) => all.map((cell) => {
    const copy = cell.cloneNode(true);
    for (const aside of copy.querySelectorAll(".unseen, .where")) aside.remove();
    return copy.textContent.replaceAll("\u2212", "-");
  }));
  return cells;
}

/** Types `lines` into fresh rows, one after the other, as a person would. */
export async function typeRows(page, lines) {
  for (const line of lines) {
    await page.keyboard.insertText(line);
    await page.keyboard.press("Enter");
  }
}

/** The report that the command line gives for `text`. */
export function commandLineReport(text) {
  const command = ["run", "-q", "-p", "formulas", "--bin", "pitchwright", "--", "run", "-", "--json"];
  const { stdout, stderr, status, error } = spawnSync("cargo", command, { cwd: root, input: text, encoding: "utf8", maxBuffer: 1 << 28 });
  if (error || ![0, 1, 2].includes(status)) throw new Error(`the command line gave no report: ${error ?? stderr}`);
  return JSON.parse(stdout);
}
