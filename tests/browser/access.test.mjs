/** Nothing serious stands in the way of a screen reader, a keyboard or a narrow window. */
import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { AxeBuilder } from "@axe-core/playwright";
import { launch, openPage, rowOf, settled } from "./support.mjs";

let browser;
before(async () => {
  browser = await launch();
});
after(() => browser.close());

async function serious(page, part = "html") {
  const { violations } = await new AxeBuilder({ page }).include(part).analyze();
  return violations.filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(" ")}`);
}

// Each width with one of the colour schemes: a full look takes long, and the rules for the one say nothing of the other.
for (const [colorScheme, width] of [["light", 1440], ["dark", 390]]) {
  test(`nothing serious is found, ${colorScheme}, ${width} wide: the form, an open row with a finding, the sheet text, what is looked up`, async () => {
    const { page, context } = await openPage(browser, { colorScheme, viewport: { width, height: 900 } });
    assert.deepEqual(await serious(page), []);
    await rowOf(page, "L_w").locator("td.how").click();
    await page.keyboard.type(" + P_tt");
    await settled(page);
    assert.deepEqual(await serious(page), []);
    await page.getByRole("button", { name: "Sheet text" }).click();
    assert.deepEqual(await serious(page), []);
    for (const name of ["Catalogue", "Reports"]) {
      await page.getByRole("button", { name }).click();
      await page.locator("aside.slip h2", { hasText: name }).waitFor();
      assert.deepEqual(await serious(page, "aside.slip"), []);
    }
    await page.getByRole("button", { name: "Computation form" }).click();
    await rowOf(page, "P_t").locator("td.value").first().click();
    await page.locator("aside.slip ol.way").waitFor();
    assert.deepEqual(await serious(page, "aside.slip"), []);
    await context.close();
  });
}

test("a phone's width is not exceeded", async () => {
  const { page, context } = await openPage(browser, { viewport: { width: 390, height: 844 } });
  assert.ok(await page.evaluate(() => document.documentElement.scrollWidth) <= 390);
  await context.close();
});

test("the whole form is reached and worked by keyboard alone", async () => {
  const { page, context } = await openPage(browser);
  for (let tabs = 0; tabs < 40; tabs++) {
    await page.keyboard.press("Tab");
    if (await page.evaluate(() => document.activeElement.closest("table.form") !== null)) break;
  }
  await page.keyboard.press("Home");
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  assert.match(await page.locator(".typing .cm-content").textContent(), /^S /);
  await page.keyboard.press("Escape");
  assert.equal(await page.evaluate(() => document.activeElement.className), "opens");
  await context.close();
});
