/** The suite's sheets in wasm, under Node: every value has the bits that the native build wrote down. */
import assert from "node:assert/strict";
import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import { fileURLToPath, pathToFileURL } from "node:url";

const root = fileURLToPath(new URL("../../", import.meta.url));

/** The bits of a double in hexadecimal. */
function bits(value) {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  return view.getBigUint64(0).toString(16).padStart(16, "0");
}

test("native and wasm give the same bits for the whole suite", async () => {
  const folder = mkdtempSync(join(tmpdir(), "pitchwright-bits-"));
  const file = join(folder, "sheets.json");
  const made = spawnSync("cargo", ["run", "--quiet", "--package", "tests", "--bin", "golden", "--", "--sheets", file], { cwd: root, encoding: "utf8" });
  assert.equal(made.status, 0, made.stderr);
  const sheets = JSON.parse(readFileSync(file, "utf8"));
  rmSync(folder, { recursive: true });
  const engine = await import(pathToFileURL(join(root, "www/page/generated/engine.js")).href);
  engine.initSync({ module: readFileSync(join(root, "www/page/generated/engine_bg.wasm")) });
  let compared = 0;
  for (const sheet of sheets) {
    const desk = new engine.Desk();
    const report = JSON.parse(desk.take(sheet.text, sheet.sheets));
    const numbers = desk.numbers();
    desk.free();
    assert.deepEqual(report.quantities.map((q) => q.symbol), sheet.quantities.map((q) => q.symbol), sheet.name);
    let from = 0;
    for (const [at, quantity] of report.quantities.entries()) {
      const length = report.columns[at];
      const values = length === null ? quantity.values ?? [] : [...numbers.subarray(from, from + length)];
      from += length ?? 0;
      const found = values.map((v) => {
        if (typeof v !== "number") return JSON.stringify(v);
        return Number.isNaN(v) ? "null" : bits(v);
      });
      assert.deepEqual(found, sheet.quantities[at].bits, `${sheet.name}: ${quantity.symbol}`);
      compared += found.length;
    }
  }
  assert.ok(sheets.length > 60 && compared > 500, `only ${compared} values of ${sheets.length} sheets`);
});
