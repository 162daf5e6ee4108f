/**
 * Runs a sheet over a list of weights: node weights.mjs SHEET LIST.csv
 *
 * The first line of the list names inputs of the sheet, each further line gives their values in the units of the sheet. Printed
 * is the same list with what governs behind it.
 */
import { readFileSync } from "node:fs";
import { openSheet } from "../package/node.js";

const [, , sheetFile, listFile] = process.argv;
if (!sheetFile || !listFile) {
  console.error("usage: node weights.mjs SHEET LIST.csv");
  process.exit(64);
}

const sheet = await openSheet(readFileSync(sheetFile, "utf8"));
const [head, ...lines] = readFileSync(listFile, "utf8").trim().split(/\r?\n/).map((line) => line.split(","));

const governed = sheet.result.governing.map(({ symbol }) => symbol);
console.log([...head, ...governed.flatMap((symbol) => [`${symbol} smallest`, `${symbol} largest`]), "requirements"].join(","));

for (const line of lines) {
  head.forEach((symbol, at) => {
    for (const { message } of sheet.set(symbol, Number(line[at]))) {
      console.error(message);
      process.exit(1);
    }
  });
  const { governing, requirements } = sheet.result;
  const extremes = governing.flatMap(({ smallest, largest }) => [smallest?.value ?? "", largest?.value ?? ""]);
  console.log([...line, ...extremes, requirements.every(({ met }) => met) ? "met" : "not met"].join(","));
}
sheet.free();
