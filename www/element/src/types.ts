/** What a sheet gives, as `pitchwright run --json` writes it. Within a format names may be added, and none changes its meaning. */

/** Labels by the names of axes, in axis order. Has no prototype. */
export interface Condition {
  readonly [axis: string]: string;
}

/** The report of a sheet. */
export interface Result {
  /** Number of the format. */
  readonly format: 1;
  /** Version of the engine. */
  readonly engine: string;
  /** SHA-256 of the text, 64 lower-case hexadecimal digits. */
  readonly digest: string;
  /** The lines of the title block that the sheet has, as typed. */
  readonly sheet: TitleBlock;
  /** The other sheets that this one rests on. */
  readonly sheets: readonly OtherSheet[];
  /** The axes in the order of the sheet. */
  readonly axes: readonly Axis[];
  /** Everything with a name and a value, in the order of the sheet. */
  readonly quantities: readonly Quantity[];
  /** What governs. */
  readonly governing: readonly Governing[];
  /** How the requirements fared. */
  readonly requirements: readonly Requirement[];
  /** How the free bodies fared. */
  readonly freebodies: readonly Freebody[];
  /** The figures. */
  readonly figures: readonly Figure[];
  /** What is wrong with the sheet or deserves a look, by line, column and code. */
  readonly findings: readonly Finding[];
}

export interface TitleBlock {
  readonly title?: string;
  readonly revision?: string;
  readonly date?: string;
  readonly prepared?: string;
  readonly checked?: string;
  readonly basis?: string;
  readonly digits?: string;
  readonly units?: string;
  readonly sources?: string;
}

export interface OtherSheet {
  readonly name: string;
  /** SHA-256 of its text. */
  readonly digest: string;
}

export interface Axis {
  readonly name: string;
  /** Its labels; of an axis of numbers the values as shown, with as many digits as make them differ. */
  readonly labels: readonly string[];
  /** Unit of the values; null for labels and for pure numbers. */
  readonly unit: string | null;
  /** The values in `unit`, of an axis of numbers. */
  readonly values: readonly number[] | null;
}

/** A value in the unit shown, and where it stands. */
export interface Extreme {
  readonly value: number;
  readonly condition: Condition;
}

/** What the tolerances do, condition by condition, in the quantity's unit. */
export interface Spread {
  /** The sum of the effects. */
  readonly worst: readonly (number | null)[];
  /** The root of the sum of their squares. */
  readonly rss: readonly (number | null)[];
}

interface QuantityOf<Kind extends string, Value> {
  /** Its symbol; a record's field as `air.density`. */
  readonly symbol: string;
  /** Line of its statement, from 1. */
  readonly line: number;
  readonly kind: Kind;
  /** The unit shown; null for a pure number, a condition or text. */
  readonly unit: string | null;
  /** Names of its axes in order. */
  readonly axes: readonly string[];
  /** How many conditions. */
  readonly conditions: number;
  /** Those without value. */
  readonly without_value: number;
  /** Those left out on purpose. */
  readonly excluded: number;
  /** Row-major over the axes, null where there is none; null altogether above 10,000 conditions: `values()` has them. */
  readonly values: readonly (Value | null)[] | null;
  readonly largest: Extreme | null;
  readonly smallest: Extreme | null;
  readonly spread: Spread | null;
  /** Whether it is an input, which can be set. */
  readonly input: boolean;
  /** Remark of its line. */
  readonly remark: string | null;
  /** The part under which it stands. */
  readonly part: string | null;
}

/** A named value. */
export type Quantity = QuantityOf<"number", number> | QuantityOf<"condition", boolean> | QuantityOf<"text", string>;

/** Which extreme. */
export type End = "largest" | "smallest";

export interface Governing {
  readonly symbol: string;
  readonly line: number;
  readonly unit: string | null;
  /** Names of the axes over which the extremes are sought. */
  readonly over: readonly string[];
  readonly conditions: number;
  readonly without_value: number;
  readonly excluded: number;
  /** The largest of all. */
  readonly largest: Extreme | null;
  /** The smallest of all. */
  readonly smallest: Extreme | null;
  /** The extremes for each condition of the axes that are left. */
  readonly groups: readonly GoverningGroup[];
  /** The inputs with tolerances by effect, the largest first. */
  readonly sensitivity: readonly (Effect & { readonly of: End })[];
  /** What the worst corner of the tolerances gives for either extreme. */
  readonly corners: readonly GoverningCorner[];
  /** Other conditions that could govern within the tolerances. */
  readonly others: readonly { readonly of: End; readonly conditions: readonly Condition[] }[];
}

export interface GoverningGroup {
  readonly condition: Condition;
  readonly largest: Extreme | null;
  readonly smallest: Extreme | null;
}

/** Effect of the tolerance of one input. */
export interface Effect {
  readonly symbol: string;
  /** Where in a list the input stands. */
  readonly condition: Condition;
  /** The larger change, in the unit of what is looked at. */
  readonly effect: number;
  /** Part of the sum of all effects. */
  readonly share: number;
}

/** An input moved to an end of its tolerance. */
export interface CornerInput {
  readonly symbol: string;
  readonly condition: Condition;
  readonly end: "+" | "-";
}

export interface GoverningCorner {
  readonly of: End;
  readonly value: number;
  readonly condition: Condition;
  readonly inputs: readonly CornerInput[];
}

export interface Requirement {
  readonly line: number;
  /** The condition as typed. */
  readonly text: string;
  readonly reason: string | null;
  /** Met, not met, or null: not shown. */
  readonly met: boolean | null;
  readonly conditions: number;
  readonly not_met: number;
  readonly without_value: number;
  /** The condition of least reserve; null for a requirement that is no comparison. */
  readonly worst: WorstCondition | null;
  /** The same with all tolerances at their worst; null without tolerances. */
  readonly met_at_worst: boolean | null;
  readonly sensitivity: readonly Effect[];
  /** The worst corner of the tolerances; null without tolerances. */
  readonly corner: RequirementCorner | null;
}

export interface WorstCondition {
  readonly condition: Condition;
  readonly left: number;
  readonly right: number;
  /** Unit of both sides. */
  readonly unit: string | null;
  /** Distance to the limit in the unit, positive where met. */
  readonly reserve: number;
  /** Allowable over applied, minus one; null where it would mean nothing. */
  readonly margin: number | null;
}

export interface RequirementCorner {
  readonly reserve: number;
  readonly condition: Condition;
  readonly inputs: readonly CornerInput[];
}

/** A force of a free body. */
export interface Force {
  readonly text: string;
  /** The symbol, where the entry is nothing but one. */
  readonly quantity: string | null;
  /** The station or height as typed. */
  readonly station: string;
}

export interface Couple {
  readonly text: string;
  readonly quantity: string | null;
}

export interface Freebody {
  readonly name: string;
  readonly line: number;
  /** Whether the sums close in every condition; null where they could not be worked out. */
  readonly closes: boolean | null;
  readonly by_construction: boolean;
  readonly force_residual: number;
  readonly axial_residual: number;
  readonly moment_residual: number;
  /** The condition in which the sums are farthest from closing. */
  readonly worst: Condition | null;
  /** Forces across, up positive. */
  readonly forces: readonly Force[];
  /** Axial forces, aft positive; their station is the height. */
  readonly axials: readonly Force[];
  /** Couples, nose up positive. */
  readonly couples: readonly Couple[];
  /** The drawing. */
  readonly svg: string | null;
}

export interface Curve {
  readonly symbol: string;
  readonly unit: string | null;
  readonly condition: Condition;
  readonly x: readonly (number | boolean | string | null)[];
  readonly y: readonly (number | boolean | string | null)[];
}

export interface Figure {
  readonly name: string;
  readonly line: number;
  readonly x: { readonly symbol: string; readonly unit: string | null };
  readonly curves: readonly Curve[];
  /** Whether the points of each curve are joined into an outline. */
  readonly closed: boolean;
  readonly svg: string;
}

/** A problem, or something that deserves a look. Lines and columns count from 1. */
export interface Finding {
  readonly severity: "error" | "warning" | "advice";
  /** The name of the fault. */
  readonly code: string;
  readonly line: number;
  /** In Unicode characters. */
  readonly column: number;
  readonly length: number;
  /** In UTF-16 units. */
  readonly column16: number;
  readonly length16: number;
  /** One sentence. */
  readonly message: string;
  /** The conditions that it is about, where it is about some. */
  readonly conditions: { readonly count: number; readonly first: readonly Condition[] } | null;
  readonly fixes: readonly Fix[];
}

/** A change of the text that would mend the problem. */
export interface Fix {
  readonly title: string;
  /** Whether it is always right. */
  readonly safe: boolean;
  readonly edits: readonly Edit[];
}

/** Replace a stretch of the text. */
export interface Edit {
  readonly line: number;
  readonly column: number;
  readonly length: number;
  readonly column16: number;
  readonly length16: number;
  readonly text: string;
}

/** How a value came about: the value asked for first, then what it rests on, each thing once. */
export interface Trail {
  readonly steps: readonly TrailStep[];
  /** Whether there were more steps than are given. */
  readonly cut: boolean;
}

export interface TrailStep {
  readonly symbol: string;
  /** The other sheet in which it stands; null in this one. */
  readonly sheet: string | null;
  readonly line: number;
  readonly kind: "input" | "formula" | "unknown" | "axis";
  readonly condition: Condition;
  /** The right side as typed. */
  readonly formula: string;
  /** The right side with the numbers in the place of symbols; null where it has no symbol. */
  readonly numbers: string | null;
  readonly value: number | boolean | string | null;
  readonly unit: string | null;
  /** The result as shown, with its unit. */
  readonly shown: string;
  readonly remark: string | null;
  readonly notes: readonly string[];
  readonly methods: readonly Method[];
  /** The steps it rests on, by their place in the trail. */
  readonly rests_on: readonly number[];
}

/** A catalogue function that a step calls. */
export interface Method {
  readonly function: string;
  readonly what: string;
  readonly method: string;
  readonly holds: string;
  readonly source: string;
}

/** A stretch of one line. */
export interface Stretch {
  readonly line: number;
  readonly column: number;
  readonly length: number;
  readonly column16: number;
  readonly length16: number;
}

/** What could stand at a place. */
export interface Completions {
  /** The piece of a word before the place, which is replaced. */
  readonly replaces: Stretch;
  /** The likeliest first. */
  readonly items: readonly Completion[];
}

export interface Completion {
  readonly label: string;
  readonly kind: "symbol" | "axis" | "constant" | "function" | "argument" | "field" | "sheet" | "label" | "text" | "unit" | "word";
  readonly insert: string;
  /** Stretches of `insert` that are to be typed over, as first character and length. */
  readonly holes: readonly (readonly [number, number])[];
  readonly detail: string;
}

/** What stands at a place. */
export interface Hover {
  readonly at: Stretch;
  readonly title: string;
  readonly text: string;
  readonly facts: readonly { readonly name: string; readonly text: string }[];
}

/** The computation form, one row for each statement. */
export interface Form {
  readonly rows: readonly FormRow[];
}

export interface FormRow {
  /** Running number; null for headings, prose and what cannot be read. */
  readonly item: number | null;
  readonly line: number;
  readonly lines: number;
  readonly kind:
    | "title" | "part" | "sub" | "note" | "prose" | "aside" | "blank" | "definition" | "function" | "vary" | "table"
    | "unknown" | "governing" | "require" | "freebody" | "figure" | "use" | "unreadable";
  /** The word that opens the statement, where one does. */
  readonly word: string | null;
  readonly symbol: string | null;
  /** The unit in its bracket, as typed. */
  readonly unit: string | null;
  /** What stands right of the symbol or of the word; of a heading its text. */
  readonly how: string;
  readonly remark: string | null;
  /** The symbols whose values belong to the row. */
  readonly quantities: readonly string[];
  /** The statement as it stands in the text. */
  readonly text: string;
  readonly table: FormTable | null;
}

export interface FormHead {
  readonly symbol: string;
  readonly unit: string | null;
}

export interface FormTable {
  readonly keys: readonly FormHead[];
  readonly columns: readonly FormHead[];
  readonly rows: readonly { readonly line: number; readonly cells: readonly string[]; readonly remark: string | null }[];
}

/** The tables of the language. */
export interface Catalogue {
  readonly functions: readonly CatalogueFunction[];
  readonly units: readonly CatalogueUnit[];
  readonly statements: readonly CatalogueWord[];
  readonly expressions: readonly CatalogueWord[];
}

export interface CatalogueFunction {
  readonly name: string;
  readonly group: string;
  readonly signature: string;
  readonly arguments: readonly string[];
  readonly gives: readonly string[];
  readonly what: string;
  readonly method: string;
  readonly holds: string;
  readonly source: string;
  readonly example: string;
}

export interface CatalogueUnit {
  readonly symbols: readonly string[];
  readonly name: string;
  readonly line: string;
  readonly dimension: string;
}

export interface CatalogueWord {
  readonly word: string;
  readonly form: string;
  readonly meaning: string;
  readonly example: string;
}
