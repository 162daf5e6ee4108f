/** Rows that state a result: governing conditions, requirements, free bodies, figures. */
import { cell, howCell, symbolCell, unitCell, valueColumns, type CellSpec } from "./cells.js";
import { conditionText, findingsAt, type Shown } from "./conditions.js";
import { el, symbolText, type Child } from "./dom.js";
import { count, shown as numberText } from "./numbers.js";
import { labelAt, type Extreme, type FormRow, type Governing, type Group, type Requirement, type Worst } from "./report.js";
import { words } from "./strings.js";
import { extremeText } from "./values.js";

/** The cells between item and remark. */
export function resultCells(row: FormRow, shown: Shown): CellSpec[][] {
  switch (row.kind) {
    case "governing":
      return governingCells(row, shown);
    case "require":
      return [[...kindCells(row), requirementCell(row, shown)]];
    case "freebody":
      return [[...kindCells(row), freeBodyCell(row, shown)]];
    default:
      return [[...kindCells(row), figureCell(row, shown)]];
  }
}

/** The statement's word stands where a symbol would, its text as how obtained. */
function kindCells(row: FormRow): CellSpec[] {
  const word = { require: "require", freebody: "free body", figure: "figure" }[row.kind as string] ?? row.kind;
  return [cell("symbol kind", word, () => [word], { columns: 2 }), howCell(row, 1)];
}

function governingCells(row: FormRow, shown: Shown): CellSpec[][] {
  const entries = governingOf(row, shown);
  if (entries.length === 0) return [[cell("symbol kind", "governing", () => ["governing"], { columns: 2 }), howCell(row, 1), wide(shown, "", () => [])]];
  return entries.map((entry, index) => [
    symbolCell(entry.symbol),
    unitCell(entry.unit),
    ...(index === 0 ? [cell("how", "g" + row.how, () => [el("span", { class: "kind" }, "governing "), row.how], { rows: entries.length })] : []),
    extremesCell(entry, shown),
  ]);
}

/** The governing entries that `row` asks for; where a symbol is asked for twice, those over the axes it names. */
function governingOf(row: FormRow, shown: Shown): Governing[] {
  return row.quantities.flatMap((symbol) => {
    const all = shown.report.governing.filter((entry) => entry.symbol === symbol);
    const named = all.filter(({ over }) => over.every((axis) => row.how.includes(axis)));
    return named[0] ?? all[0] ?? [];
  });
}

function extremesCell(entry: Governing, shown: Shown): CellSpec {
  const groups: Group[] = entry.groups.length > 0 ? entry.groups : [{ condition: {}, ...entry }];
  const lines = groups.map((group) => ({
    where: conditionText(shown.report, group.condition),
    largest: extremeText(within(group.largest, group), entry.unit, shown),
    smallest: extremeText(within(group.smallest, group), entry.unit, shown),
  }));
  const content = (): Child[] => lines.map(({ where, largest, smallest }) => el("span", { class: "extremes" },
    where && el("b", {}, where),
    el("span", {}, el("i", {}, words.largest), " ", largest),
    el("span", {}, el("i", {}, words.smallest), " ", smallest)));
  return wide(shown, JSON.stringify(lines), content);
}

/** The extreme without the labels of its group, which stand before it. */
function within(extreme: Extreme | null, { condition }: Group): Extreme | null {
  if (!extreme) return null;
  const rest = Object.entries(extreme.condition).filter(([axis]) => labelAt(condition, axis) === undefined);
  return { value: extreme.value, condition: Object.fromEntries(rest) };
}

function requirementCell(row: FormRow, shown: Shown): CellSpec {
  const found = shown.report.requirements.find(({ line }) => line >= row.line && line < row.line + row.lines);
  if (!found) return wide(shown, "", () => []);
  const { className, word } = verdict(found);
  const details = requirementDetails(found, shown);
  return wide(shown, [word, ...details].join("\t"), () => [
    el("strong", { class: `verdict ${className}` }, word),
    details.map((detail) => el("span", { class: "detail" }, detail)),
  ]);
}

/** The verdict on a requirement. */
export function verdict({ met }: Requirement): { className: string; word: string } {
  if (met === null) return { className: "not-shown", word: words.notShown };
  return met ? { className: "met", word: words.met } : { className: "not-met", word: words.notMet };
}

function requirementDetails(found: Requirement, shown: Shown): string[] {
  const details = found.worst ? worstDetails(found.worst, shown) : [];
  if (found.not_met > 0) details.push(words.notMetIn(count(found.not_met), count(found.conditions)));
  if (found.met === true && found.met_at_worst === false) details.push(words.notMetAtWorst);
  if (found.without_value > 0) details.push(words.withoutValue(count(found.without_value)));
  return details;
}

function worstDetails({ reserve, margin, unit, condition }: Worst, shown: Shown): string[] {
  const details: string[] = [];
  if (reserve !== null) details.push(`${words.reserve} ${numberText(reserve, shown.digits)}${unit ? ` ${unit}` : ""}`);
  if (margin !== null) details.push(`${words.margin} ${numberText(margin, shown.digits)}`);
  const where = conditionText(shown.report, condition);
  if (where) details.push(`${words.worstAt} ${where}`);
  return details;
}

function freeBodyCell(row: FormRow, shown: Shown): CellSpec {
  const found = shown.report.freebodies.find(({ line }) => line >= row.line && line < row.line + row.lines);
  if (!found) return wide(shown, "", () => []);
  const { closes, by_construction: byConstruction } = found;
  const word = closes === null ? words.notShown : !closes ? words.closesNot : byConstruction ? words.closesByConstruction : words.closes;
  const className = closes === null ? "not-shown" : closes ? "met" : "not-met";
  return wide(shown, word, () => [el("strong", { class: `verdict ${className}` }, word)]);
}

function figureCell(row: FormRow, shown: Shown): CellSpec {
  const broken = findingsAt(shown, row.line, row.lines).some(({ finding }) => finding.severity === "error");
  const text = broken ? "" : words.drawnBelow;
  return wide(shown, text, () => [text]);
}

function wide(shown: Shown, key: string, content: () => Child[]): CellSpec {
  return cell("value wide result", key, content, { columns: valueColumns(shown) });
}

/** A symbol with its unit, for lists outside the form. */
export function symbolAndUnit(symbol: string, unit: string | null): Child[] {
  return [...symbolText(symbol), unit !== null && el("span", { class: "where" }, unit)];
}
