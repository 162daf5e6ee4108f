/** The package in Node: the same answers as the command line, and everything that can be asked of a sheet. */
import assert from "node:assert/strict";
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { test } from "node:test";
import { gzipSync } from "node:zlib";
import { packageFolder, pitchwright, smallSheet, startingSheetOf } from "./package-support.mjs";
import { commandLineReport } from "./support.mjs";

const { openSheet, catalogue, SheetError } = pitchwright;

/** The same with ordinary prototypes, as JSON gives it. */
const plain = (value) => JSON.parse(JSON.stringify(value));

/** What `question` throws. */
function thrownBy(question) {
  try {
    question();
  } catch (error) {
    return error;
  }
  return null;
}

test("the result is what the command line writes, to the last bit", async () => {
  for (const name of ["osier-balancing-loads", "osier-envelope", "teasel-balancing-loads"]) {
    const text = startingSheetOf(name);
    const sheet = await openSheet(text);
    const written = commandLineReport(text);
    assert.deepEqual(plain(sheet.result), written, name);
    for (const { symbol, values, kind } of written.quantities) {
      if (kind !== "number" || values === null) continue;
      assert.deepEqual(sheet.values(symbol), Float64Array.from(values, (value) => value ?? NaN), `${name}: ${symbol}`);
    }
    sheet.free();
  }
});

test("values are copies, and slices leave the other axes", async () => {
  const sheet = await openSheet("vary a: p | q\nvary b: r | s | t\nx by a = 10 | 20\ny by b = 1 | 2 | 3\nz = x + y\nw = z > 20\nn = if x < 15 then 4 else none\n");
  const values = sheet.values("z");
  assert.deepEqual([...values], [11, 12, 13, 21, 22, 23]);
  values[0] = 0;
  assert.equal(sheet.values("z")[0], 11);
  assert.deepEqual([...sheet.slice("z", { a: "q" })], [21, 22, 23]);
  assert.deepEqual([...sheet.slice("z", { b: "t" })], [13, 23]);
  assert.deepEqual([...sheet.slice("z", { b: "r", a: "q" })], [21]);
  assert.deepEqual([...sheet.values("w")], [0, 0, 0, 1, 1, 1]);
  assert.deepEqual([...sheet.values("n")], [4, NaN]);
  sheet.free();
});

test("an input is set by text and by numbers in its unit, and what cannot be set changes nothing", async () => {
  const sheet = await openSheet(smallSheet);
  assert.deepEqual(sheet.set("S", "12 m^2"), []);
  assert.deepEqual([...sheet.values("L")], [7200]);
  assert.deepEqual(sheet.set("S", 10), []);
  assert.deepEqual(sheet.set("x", Float64Array.of(3, 4)), []);
  assert.deepEqual([...sheet.values("M")], [18000, 24000]);
  assert.equal(sheet.result.requirements[0].met, false);
  const before = sheet.text;
  for (const [symbol, value] of [["L", "1 N"], ["S", "3 kg"], ["nothing", "1"], ["x", [1, 2, 3]], ["S", NaN], ["S", "3 +"], ["S", "1 m^2\nq [Pa] = 2"]]) {
    const findings = sheet.set(symbol, value);
    assert.equal(findings.length, 1, `${symbol} = ${value}`);
    assert.equal(findings[0].severity, "error");
    assert.ok(findings[0].message.length > 10);
    assert.equal(sheet.text, before);
  }
  const cold = await openSheet(before);
  assert.deepEqual(sheet.result, cold.result);
  cold.free();
  sheet.free();
});

test("an input without a bracket keeps its unit when a number is set", async () => {
  const sheet = await openSheet("q = 12 lb/ft^2\nS = 142 ft^2\nF [lb] = q*S\n");
  assert.deepEqual(sheet.set("q", 2.5), []);
  assert.match(sheet.text, /^q = 2.5 lb\/ft\^2$/m);
  assert.deepEqual([...sheet.values("F")], [355]);
  sheet.free();
});

test("an edited text gives the result of opening it", async () => {
  const sheet = await openSheet(smallSheet);
  const edited = smallSheet.replace("600", "700").replace("require", "N2 = L*\nrequire");
  sheet.update(edited);
  const cold = await openSheet(edited);
  assert.deepEqual(sheet.result, cold.result);
  assert.equal(sheet.result.findings[0].severity, "error");
  assert.equal(sheet.values("M").length, 2, "a line that fails hides no other value");
  cold.free();
  sheet.free();
});

test("a wrong question throws an error with a finding, never a text", async () => {
  const sheet = await openSheet(`${smallSheet}name = "Osier"\n`);
  const questions = [() => sheet.values("nothing"), () => sheet.values("name"), () => sheet.slice("M", { cg: "mid" }),
    () => sheet.slice("L", { cg: "aft" }), () => sheet.trail("nothing"), () => sheet.trail("M", { cg: "mid" }),
    () => sheet.fix({ code: "none", line: 1, column: 1 })];
  for (const question of questions) {
    const error = thrownBy(question);
    assert.ok(error instanceof SheetError && error instanceof Error, String(question));
    assert.equal(error.finding.severity, "error");
    assert.equal(error.message, error.finding.message);
  }
  sheet.free();
  sheet.free();
  assert.equal(thrownBy(() => sheet.values("L")).finding.code, "closed");
  await assert.rejects(openSheet(7), TypeError);
});

test("completion, hover and fixes work on the sheet", async () => {
  const text = "V [kt] = 12,5\nW [lb] = 600 lb\nF [lb] = 2*W\n";
  const sheet = await openSheet(text);
  assert.ok(sheet.complete(3, 12).items.some(({ label }) => label === "W"));
  assert.equal(sheet.hover(3, 12).title, "W");
  assert.equal(sheet.hover(3, 12, "utf16").title, "W");
  const [finding] = sheet.result.findings.filter(({ fixes }) => fixes.length > 0);
  const fixed = sheet.fix(finding);
  assert.equal(fixed, sheet.text);
  assert.match(fixed, /^V \[kt\] = 12\.5$/m);
  assert.ok(!sheet.result.findings.some(({ code, line }) => code === finding.code && line === finding.line));
  sheet.free();
});

test("a trail goes down to inputs, and conditions have no prototype", async () => {
  const sheet = await openSheet(smallSheet);
  const trail = sheet.trail("M", { cg: "fwd" });
  assert.equal(trail.steps[0].value, 6840);
  assert.ok(trail.steps.some(({ symbol, kind, remark }) => symbol === "S" && kind === "input" && remark === "drawing"));
  for (const condition of [trail.steps[0].condition, sheet.result.governing[0].largest.condition, sheet.result.requirements[0].worst.condition]) {
    assert.equal(Object.getPrototypeOf(condition), null);
  }
  sheet.free();
});

test("other sheets are given by name, and only by their own names", async () => {
  const text = 'use "wing" as g\nL [N] = 600 Pa*g.S\n';
  const sheet = await openSheet(text, { sheets: { wing: "S [m^2] = 10\n" } });
  assert.deepEqual([...sheet.values("L")], [6000]);
  sheet.update(`${text}K [N] = 2*L\n`);
  assert.deepEqual([...sheet.values("K")], [12000]);
  const without = await openSheet('use "toString" as g\nL [N] = 600 Pa*g.S\n');
  assert.ok(without.result.findings.some(({ severity }) => severity === "error"));
  sheet.free();
  without.free();
});

test("a lower limit stops a recalculation with a finding", async () => {
  const text = "vary a [1]: 1 to 200 step 1\nvary b [1]: 1 to 200 step 1\nz = a*b + a\n";
  const free = await openSheet(text);
  const limited = await openSheet(text, { limits: { operations: 100 } });
  assert.equal(free.result.findings.filter(({ severity }) => severity === "error").length, 0);
  assert.ok(limited.result.findings.some(({ severity }) => severity === "error"));
  free.free();
  limited.free();
});

test("values too many to be written, or to be kept, are given when asked for", async () => {
  const sheet = await openSheet("vary a [1]: 1 to 300 step 1\nvary b [1]: 1 to 300 step 1\nz = a*1000 + b\n");
  const quantity = sheet.result.quantities.find(({ symbol }) => symbol === "z");
  assert.equal(quantity.values, null);
  const values = sheet.values("z");
  assert.equal(values.length, 90000);
  assert.deepEqual([values[0], values[1], values.at(-1)], [1001, 1002, 300300]);
  assert.deepEqual(sheet.slice("z", { a: "300", b: "7" }), Float64Array.of(300007));
  sheet.free();
});

test("in a thread of its own every call answers with a promise, and the answers are the same", async () => {
  const told = [];
  const near = await openSheet(smallSheet);
  const far = await openSheet(smallSheet, { worker: true, onProgress: ({ stage }) => told.push(stage) });
  assert.deepEqual(told.filter((stage, at) => stage !== told[at - 1]), ["loading", "working", "done"]);
  assert.deepEqual(far.result, near.result);
  assert.ok(far.values("M") instanceof Promise);
  assert.deepEqual(await far.values("M"), near.values("M"));
  assert.deepEqual(await far.set("S", "12 m^2"), near.set("S", "12 m^2"));
  assert.deepEqual(await far.set("S", "12 kg"), near.set("S", "12 kg"));
  assert.deepEqual(far.result, near.result);
  assert.deepEqual(await far.trail("M"), near.trail("M"));
  await assert.rejects(far.values("nothing"), SheetError);
  await far.update(`${smallSheet}K = 2\n`);
  assert.deepEqual(await far.values("K"), Float64Array.of(2));
  await far.free();
  await assert.rejects(far.values("M"), SheetError);
  near.free();
});

test("a signal stops an opening, and a run in a thread of its own", async () => {
  const reason = new Error("no more");
  await assert.rejects(openSheet(smallSheet, { signal: AbortSignal.abort(reason) }), reason);
  const stop = new AbortController();
  const long = "vary a [1]: 1 to 3000 step 1\nvary b [1]: 1 to 3000 step 1\nz = sqrt(a*b)^1.5\ny = sqrt(z*b)^1.7\nw = sqrt(y*b)^1.9\nx = largest(w over a, b)\n";
  const opening = openSheet(long, { worker: true, signal: stop.signal, onProgress: ({ stage, elapsed }) => { if (stage === "working" && elapsed > 150) stop.abort(reason); } });
  await assert.rejects(opening, reason);
});

test("10,000 edits and a thousand sheets opened and freed keep no memory", async () => {
  const { memory } = pitchwright;
  assert.equal(memory, undefined, "the engine's memory is not public");
  const sheet = await openSheet(smallSheet);
  const resident = () => process.memoryUsage().arrayBuffers + process.memoryUsage().external;
  const round = (from, to) => {
    for (let at = from; at < to; at += 1) assert.deepEqual(sheet.set("S", 10 + (at % 7)), []);
    return sheet.values("L")[0];
  };
  round(0, 1000);
  const before = resident();
  round(1000, 11000);
  for (let at = 0; at < 1000; at += 1) (await openSheet(smallSheet)).free();
  // Memory of wasm grows by pages of 64 KiB and never shrinks: what leaks on each edit would show as many of them.
  assert.ok(resident() - before < 2 * 1024 * 1024, `${resident() - before} bytes more`);
  sheet.free();
});

test("the catalogue lists functions, units and statements", async () => {
  const { functions, units, statements } = await catalogue();
  assert.ok(functions.length > 50 && units.length > 20 && statements.length > 5);
  assert.ok(functions.every(({ name, source, example }) => name && source && example));
});

test("the package needs no other, and its engine stays within 640 KiB packed", () => {
  const manifest = JSON.parse(readFileSync(join(packageFolder, "package.json"), "utf8"));
  assert.deepEqual(Object.keys(manifest.dependencies ?? {}), []);
  const wasm = readFileSync(join(packageFolder, "engine_bg.wasm"));
  const size = gzipSync(wasm, { level: 9 }).length;
  assert.ok(size < 640 * 1024, `${size} bytes packed`);
});
