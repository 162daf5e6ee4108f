/** The package's types, seen by a strict program that does not skip the check of libraries. */
import assert from "node:assert/strict";
import { spawnSync } from "node:child_process";
import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import { packageFolder, root } from "./package-support.mjs";

const compiler = join(root, "www/page/node_modules/typescript/bin/tsc");
const strict = { strict: true, skipLibCheck: false, noEmit: true, target: "es2022", exactOptionalPropertyTypes: true, noUncheckedIndexedAccess: true, types: [] };

/** What the compiler says of a program in a fresh folder where the package is installed. */
function checked(program, options) {
  const folder = mkdtempSync(join(tmpdir(), "pitchwright-types-"));
  mkdirSync(join(folder, "node_modules"));
  symlinkSync(packageFolder, join(folder, "node_modules/pitchwright"));
  writeFileSync(join(folder, "package.json"), '{"type":"module"}');
  writeFileSync(join(folder, "program.ts"), program);
  writeFileSync(join(folder, "tsconfig.json"), JSON.stringify({ compilerOptions: { ...strict, ...options }, files: ["program.ts"] }));
  const { stdout, status } = spawnSync("node", [compiler, "-p", folder], { encoding: "utf8" });
  rmSync(folder, { recursive: true });
  return { stdout, status };
}

const program = `
import { openSheet, catalogue, load, SheetError } from "pitchwright";
import type { Catalogue, Completions, Finding, Form, Hover, Quantity, Result, Sheet, Trail, WorkerSheet } from "pitchwright";

type Same<A, B> = (<T>() => T extends A ? 1 : 2) extends (<T>() => T extends B ? 1 : 2) ? true : false;
function is<T extends true>(): T { return true as T; }

const sheet = await openSheet("S [m^2] = 11.4", { sheets: { wing: "b = 1" }, limits: { operations: 1e6 }, onProgress: ({ stage, elapsed }) => { stage satisfies string; elapsed satisfies number; }, worker: false });
is<Same<typeof sheet, Sheet>>();
sheet.result satisfies Result;
const values: Float64Array = sheet.values("S");
const slice: Float64Array = sheet.slice("S", { loading: "gross" });
const findings: Finding[] = sheet.set("S", "12 m^2");
sheet.set("S", 12);
sheet.set("S", [1, 2]);
sheet.set("S", Float64Array.of(1, 2));
sheet.update("S [m^2] = 12");
sheet.trail("S", { point: "D" }) satisfies Trail;
sheet.complete(1, 2) satisfies Completions;
sheet.hover(1, 2) satisfies Hover | null;
for (const finding of sheet.result.findings) sheet.fix(finding) satisfies string;
sheet.form() satisfies Form;
sheet.free();

function numbers(quantity: Quantity): readonly (number | null)[] {
  if (quantity.kind === "number") return quantity.values ?? [];
  if (quantity.kind === "condition") quantity.values satisfies readonly (boolean | null)[] | null;
  else quantity.values satisfies readonly (string | null)[] | null;
  return [];
}

const far = await openSheet("S = 1", { worker: true });
is<Same<typeof far, WorkerSheet>>();
const later: Promise<Float64Array> = far.values("S");
const set: Promise<Finding[]> = far.set("S", 2);
const result: Result = far.result;
await far.free();

const rows: Catalogue = await catalogue();
await load("/engine_bg.wasm");
if (new Error() instanceof SheetError) throw new Error();
export { values, slice, findings, numbers, later, set, result, rows };
`;

const wrong = `
import { openSheet } from "pitchwright";
const sheet = await openSheet("S = 1");
// @ts-expect-error a result is only read
sheet.result.findings.push();
// @ts-expect-error there is no such severity
sheet.result.findings.filter(({ severity }) => severity === "fatal");
// @ts-expect-error an input is not set to a truth
sheet.set("S", true);
// @ts-expect-error values may be left out
sheet.result.quantities[0]!.values.length;
// @ts-expect-error in the thread at hand nothing is promised
sheet.values("S").then();
`;

const page = `
import "pitchwright/element";
import type { PitchSheetElement } from "pitchwright/element";
const element: PitchSheetElement = document.createElement("pitch-sheet");
element.inputs = { x_cg: "6.2 ft", n: 3.8 };
element.readonly = true;
element.addEventListener("pitch-result", ({ detail }) => { detail.requirements.map(({ met }) => met satisfies boolean | null); });
`;

test("a strict program of a bundler, with and without the names of a page", () => {
  for (const lib of [["es2022"], ["es2022", "dom"]]) {
    assert.deepEqual(checked(program, { module: "esnext", moduleResolution: "bundler", lib }), { stdout: "", status: 0 });
  }
});

test("a strict program of Node", () => {
  assert.deepEqual(checked(program, { module: "nodenext", moduleResolution: "nodenext", lib: ["es2022"] }), { stdout: "", status: 0 });
});

test("what is wrong is told", () => {
  assert.deepEqual(checked(wrong, { module: "esnext", moduleResolution: "bundler", lib: ["es2022"] }), { stdout: "", status: 0 });
});

test("a strict page with the element", () => {
  assert.deepEqual(checked(page, { module: "esnext", moduleResolution: "bundler", lib: ["es2022", "dom"] }), { stdout: "", status: 0 });
});
