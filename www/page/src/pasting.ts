/** Tables, polars and section coordinates as they arrive from elsewhere become `table` statements when they are pasted. */
import { linesOf, normalised } from "./sheet-text.js";
import { laterWords as words } from "./strings-later.js";

/** The statement, and what was changed on the way. */
export interface Converted {
  lines: string[];
  said: string;
}

/** What stood between the columns. */
type Between = "\t" | ";" | "," | " ";

interface Table {
  between: Between;
  head: string[] | null;
  left: string[];
  rows: string[][];
  commas: boolean;
}

interface Column {
  name: string;
  unit: string | null;
}

/** A number with a decimal point, and one with a decimal comma. */
const NUMBER = /^[-+\u2212]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i;
const COMMA_NUMBER = /^[-+\u2212]?(\d+,\d*|,\d+|\d+)(e[-+]?\d+)?$/i;
/** What only a sheet has; such text is taken as it is. */
const SHEET_LINE = /[|=]|^\s*(end|part|sub|note|vary|table|require|governing|figure|freebody|title|use)\b/;
const ROWS_LEAST = 2;
/** Two columns within a chord, with at least so many points, are a section. */
const POINTS_LEAST = 12;

/** The `table` statement that `text` comes to; null where it is no table or is a sheet's own text. */
export function converted(text: string): Converted | null {
  const lines = linesOf(normalised(text));
  if (lines.some((line) => SHEET_LINE.test(line))) return null;
  const tables = (["\t", ";", ",", " "] as const).flatMap((between) => read(lines, between) ?? []);
  const table = tables[0];
  if (!table) return null;
  return section(table) ?? written(table);
}

function read(lines: readonly string[], between: Between): Table | null {
  const split = lines.filter((line) => line.trim() !== "").map((line) => fields(line, between));
  const commas = between !== "," && split.some((line) => line.length > 1 && line.some((field) => /\d,\d/.test(field) && COMMA_NUMBER.test(field)));
  const number = commas ? COMMA_NUMBER : NUMBER;
  // The first field of a row may be a label; an empty field or a dash is no value.
  const isRow = (line: string[]) => line.length > 1 && line.slice(1).some((field) => number.test(field))
    && line.slice(1).every((field) => number.test(field) || field === "" || field === "-");
  const first = split.findIndex(isRow);
  const rows = split.slice(first);
  const columns = rows.at(-1)?.length ?? 0;
  const counts = first >= 0 && isCounts(rows, number);
  if (first < 0 || rows.length < ROWS_LEAST || !rows.every((line) => isRow(line) && line.length === columns)) return null;
  const above = split.slice(0, first);
  const head = !counts && above.at(-1)?.length === columns ? (above.pop() ?? null) : null;
  return { between, head, left: above.map((line) => line.join(" ")), commas, rows: rows.map((line) => line.map((field) => plain(field, commas))) };
}

function fields(line: string, between: Between): string[] {
  const parts = between === " " ? line.trim().split(/\s+/) : line.split(between);
  return parts.map((field) => field.trim().replace(/^"(.*)"$/, "$1"));
}

function plain(field: string, commas: boolean): string {
  const text = field.replace("\u2212", "-").replace(/^\+/, "");
  return commas && COMMA_NUMBER.test(field) ? text.replace(",", ".") : text;
}

function isCounts(rows: string[][], number: RegExp): boolean {
  const [first] = rows;
  return first?.length === 2 && first.every((field) => number.test(field)) && Number(first[0]) + Number(first[1]) === rows.length - 1;
}

/** Section coordinates: in one go round the section, or the two sides from the nose on with their counts above them. */
function section(table: Table): Converted | null {
  if (table.rows.some((row) => row.length !== 2)) return null;
  const numbers = table.rows.map((row) => row.map(Number));
  const upper = numbers[0]?.[0] ?? 0;
  const counted = upper > 2 && upper + (numbers[0]?.[1] ?? 0) === numbers.length - 1;
  let points = counted ? table.rows.slice(1) : table.rows;
  const within = points.every(([x, y]) => Number(x) >= -0.1 && Number(x) <= 1.1 && Math.abs(Number(y)) < 0.6);
  if (points.length < POINTS_LEAST || !within) return null;
  if (counted) points = round(points.slice(0, upper), points.slice(upper));
  else if (Number(points[0]?.[0]) < 0.9) return null;
  const lines = points.map(([x, y], index) => `${index + 1} | ${x ?? ""} | ${y ?? ""}`);
  const name = [...table.left, ...(table.head ?? [])].join(" ").replace(/[;\n]/g, ",").trim();
  const said = [words.becameTable(points.length, 2, words.between[table.between] ?? ""), counted && words.wentRound, table.commas && words.decimalCommas];
  return { lines: [`table node | x | y${name ? ` ; ${name}` : ""}`, ...lines, "end"], said: said.filter(Boolean).join(" ") };
}

/** From the trailing edge over the upper side to the nose and back below; the nose stands once. */
function round(upper: string[][], lower: string[][]): string[][] {
  const nose = upper[0];
  const same = nose !== undefined && Number(lower[0]?.[0]) === Number(nose[0]) && Number(lower[0]?.[1]) === Number(nose[1]);
  return [...[...upper].reverse(), ...lower.slice(same ? 1 : 0)];
}

function written(table: Table): Converted {
  const labels = table.rows.some(([first]) => !NUMBER.test(first ?? ""));
  const columns = (table.rows[0] ?? []).map((_, index) => column(table.head?.[index] ?? "", index, labels));
  const heads = columns.map(({ name, unit }, index) => {
    // A key with a bracket is an axis of numbers.
    const bracket = unit ?? (index === 0 && !labels ? "1" : null);
    return bracket === null ? name : `${name} [${bracket}]`;
  });
  const rows = table.rows.map((row) => row.map((field) => (field === "" ? "-" : field)).join(" | "));
  const made = columns.filter((_, index) => !table.head?.[index]?.trim()).map(({ name }) => name);
  const changed = columns.filter(({ name }, index) => table.head?.[index]?.trim() && !table.head[index]?.trim().startsWith(name)).map(({ name }) => name);
  const said = [
    words.becameTable(rows.length, columns.length, words.between[table.between] ?? ""),
    table.commas && words.decimalCommas,
    table.left.length > 0 && words.headLines(table.left),
    made.length > 0 && words.namesMade(made),
    changed.length > 0 && words.namesChanged(changed),
  ];
  return { lines: [`table ${heads.join(" | ")}`, ...rows, "end"], said: said.filter(Boolean).join(" ") };
}

/** A column's name and unit out of its head: `CL`, `alpha (deg)`, `V [m/s]`, `V, m/s`. */
function column(head: string, index: number, labels: boolean): Column {
  const [, before = "", inBrackets, behind] = head.trim().match(/^([^[(,/]*)(?:[[(]([^\])]*)[\])]|[,/]\s*(\S+))?/) ?? [];
  const written = (inBrackets ?? behind ?? "").trim().replace("\u00b0", "deg").replace("\u00b2", "^2").replace("\u00b3", "^3");
  const unit = /^[\p{L}%][\p{L}\d^/.*%]*$/u.test(written) ? written : null;
  const name = before.trim().replace(/[^\p{L}\p{N}_]+/gu, "_").replace(/^_+|_+$/g, "").replace(/^(?=\d)/, "c_");
  if (name) return { name, unit };
  return { name: index === 0 ? (labels ? "point" : "row") : `column_${index + 1}`, unit };
}
