/** The report that the engine gives for a sheet, as plain data. */

/** A label for each axis of a condition. */
export type Condition = Record<string, string>;

export interface Axis {
  name: string;
  labels: string[];
  unit: string | null;
  values: ArrayLike<number> | null;
}

export interface Extreme {
  value: number;
  condition: Condition;
}

/** One value: a number, a text, a condition, or nothing. */
export type Value = number | string | boolean | null;

export interface Quantity {
  symbol: string;
  line: number;
  kind: "number" | "condition" | "text";
  unit: string | null;
  axes: string[];
  conditions: number;
  without_value: number;
  excluded: number;
  /** Row-major over `axes`, in `unit`; NaN or null where there is none. Null altogether where there are too many. */
  values: ArrayLike<Value> | null;
  largest: Extreme | null;
  smallest: Extreme | null;
  input: boolean;
  remark: string | null;
  part: string | null;
}

export interface Group {
  condition: Condition;
  largest: Extreme | null;
  smallest: Extreme | null;
}

export interface Governing {
  symbol: string;
  unit: string | null;
  over: string[];
  conditions: number;
  without_value: number;
  excluded: number;
  largest: Extreme | null;
  smallest: Extreme | null;
  groups: Group[];
  sensitivity: Sensitivity[];
  corners: Corner[];
  others: { of: End; conditions: Condition[] }[];
}

/** Which extreme. */
export type End = "largest" | "smallest";

/** What the tolerance of one input does to a governing value. */
export interface Sensitivity {
  of: End;
  symbol: string;
  condition: Condition;
  effect: number;
  share: number;
}

/** What the worst corner of the tolerances comes to. */
export interface Corner {
  of: End;
  value: number;
  condition: Condition;
  inputs: { symbol: string; condition: Condition; end: "+" | "-" }[];
}

export interface Worst {
  condition: Condition;
  left: Value;
  right: Value;
  unit: string | null;
  reserve: number | null;
  margin: number | null;
}

export interface Requirement {
  line: number;
  text: string;
  reason: string | null;
  met: boolean | null;
  conditions: number;
  not_met: number;
  without_value: number;
  worst: Worst | null;
  met_at_worst: boolean | null;
  sensitivity: { symbol: string; condition: Condition; effect: number; share: number }[];
}

export interface FreeBody {
  name: string;
  line: number;
  closes: boolean | null;
  by_construction: boolean;
  worst: Condition | null;
}

/** A figure or free body as it is drawn. */
export interface Drawing {
  name: string;
  line: number;
  svg: string;
}

export interface Drawings {
  figures: Drawing[];
  freebodies: Drawing[];
}

export interface Edit {
  line: number;
  column: number;
  length: number;
  text: string;
}

export interface Fix {
  title: string;
  safe: boolean;
  edits: Edit[];
}

export interface Finding {
  severity: "error" | "warning" | "advice";
  line: number;
  column: number;
  length: number;
  message: string;
  fixes: Fix[];
}

export type RowKind =
  | "title" | "part" | "sub" | "note" | "prose" | "aside" | "blank" | "definition" | "function" | "vary" | "table"
  | "unknown" | "governing" | "require" | "freebody" | "figure" | "use" | "unreadable";

/** Head of a table's key or column. */
export interface FormHead {
  symbol: string;
  unit: string | null;
}

export interface FormTable {
  keys: FormHead[];
  columns: FormHead[];
  rows: { line: number; cells: string[]; remark: string | null }[];
}

/** One statement of the sheet as a row of the form. */
export interface FormRow {
  item: number | null;
  line: number;
  lines: number;
  kind: RowKind;
  word: string | null;
  symbol: string | null;
  unit: string | null;
  how: string;
  remark: string | null;
  quantities: string[];
  text: string;
  table: FormTable | null;
}

export interface Report {
  engine: string;
  digest: string;
  sheet: Record<string, unknown>;
  axes: Axis[];
  quantities: Quantity[];
  governing: Governing[];
  requirements: Requirement[];
  freebodies: FreeBody[];
  findings: Finding[];
  form: { rows: FormRow[] };
}

/** The significant figures that the sheet asks for. */
export function digitsOf(report: Report): number {
  const digits = Number(report.sheet["digits"] ?? 4);
  return Number.isInteger(digits) && digits >= 1 && digits <= 15 ? digits : 4;
}

/** The report out of its JSON, whose numbers came beside it. */
export function unpacked(json: string, numbers: Float64Array): Report {
  const report = JSON.parse(json) as Report & { columns: (number | null)[] };
  let from = 0;
  report.quantities.forEach((quantity, index) => {
    const length = report.columns[index] ?? null;
    if (length === null) return;
    quantity.values = numbers.subarray(from, from + length);
    from += length;
  });
  return report;
}

/** The label of `condition` along `axis`. Axes may be called like what every object answers to. */
export function labelAt(condition: Condition, axis: string): string | undefined {
  return Object.hasOwn(condition, axis) ? condition[axis] : undefined;
}

/** The entries for `symbol`. */
export function findAll<T extends { symbol: string }>(entries: readonly T[], symbol: string): T[] {
  return entries.filter((entry) => entry.symbol === symbol);
}
