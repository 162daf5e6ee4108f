/** The built file opens from a disk and asks for nothing. */
import assert from "node:assert/strict";
import { createServer } from "node:http";
import { after, before, test } from "node:test";
import { launch, openPage, settled, typeRows } from "./support.mjs";

let browser;
let server;
const asked = [];

before(async () => {
  browser = await launch();
  server = createServer((request, response) => {
    asked.push(request.url);
    response.end();
  });
  server.on("connection", () => asked.push("connection"));
  await new Promise((ready) => server.listen(0, "127.0.0.1", ready));
});
after(async () => {
  await browser.close();
  server.close();
});

test("it loads without a request, a complaint or a breach of its policy", async () => {
  const { page, context, offences } = await openPage(browser, {
    prepare: () => document.addEventListener("securitypolicyviolation", (event) => console.error(event.violatedDirective, event.blockedURI)),
  });
  await page.locator("td.how").first().click();
  await page.keyboard.press("Escape");
  await page.getByRole("button", { name: "Sheet text" }).click();
  assert.deepEqual(offences, []);
  assert.equal(await page.evaluate(() => "RTCPeerConnection" in window), false);
  await context.close();
});

test("markup and addresses in a sheet stay text", async () => {
  const { page, context, offences } = await openPage(browser);
  const address = `http://127.0.0.1:${server.address().port}`;
  await page.getByRole("button", { name: "New sheet" }).click();
  await typeRows(page, [
    `title <img src=${address}/title>`,
    `part <iframe src=${address}/part></iframe>`,
    `S [ft^2] = 142 ; <link rel=stylesheet href=${address}/remark> ${address}`,
    `note <script>fetch("${address}/note")</script>`,
    `<img src=${address}/line onerror=alert(1)>`,
  ]);
  await settled(page);
  await page.waitForTimeout(300);
  assert.equal(await page.locator("main img, main iframe, main script, main link").count(), 0);
  assert.equal(await page.locator(".box.title .content").textContent(), `<img src=${address}/title>`);
  assert.deepEqual(asked, []);
  assert.deepEqual(offences, []);
  await context.close();
});

test("the policy keeps even a script that runs in the page from asking", async () => {
  const { page, context } = await openPage(browser);
  const address = `http://127.0.0.1:${server.address().port}/asked`;
  await page.evaluate(async (to) => {
    await fetch(to).catch(() => {});
    const image = new Image();
    image.src = to;
    document.body.append(image);
    navigator.sendBeacon(to);
    await new Promise((later) => setTimeout(later, 300));
  }, address);
  assert.deepEqual(asked, []);
  await context.close();
});
