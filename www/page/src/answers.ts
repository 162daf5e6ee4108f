/** What the engine answers besides reports, as plain data. */
import type { Condition, Extreme, Value } from "./report.js";

export interface Method {
  function: string;
  what: string;
  method: string;
  holds: string;
  source: string;
}

/** One line of a trail in one condition. */
export interface Step {
  symbol: string;
  /** The other sheet in which it stands; null in this one. */
  sheet: string | null;
  line: number;
  kind: "input" | "formula" | "unknown" | "axis";
  condition: Condition;
  formula: string;
  /** The formula with its numbers. */
  numbers: string | null;
  shown: string;
  remark: string | null;
  notes: string[];
  methods: Method[];
  /** Places in the trail. */
  rests_on: number[];
}

export interface Trail {
  steps: Step[];
  cut: boolean;
}

/** A stretch of the sheet; the numbers ending in 16 count UTF-16 units. */
export interface Stretch {
  line: number;
  column: number;
  length: number;
  column16: number;
  length16: number;
}

export interface Completion {
  label: string;
  kind: string;
  insert: string;
  holes: [number, number][];
  detail: string;
}

export interface Completions {
  replaces: Stretch;
  items: Completion[];
}

export interface Hover {
  at: Stretch;
  title: string;
  text: string;
  facts: { name: string; text: string }[];
}

export interface CatalogueFunction {
  name: string;
  group: string;
  signature: string;
  arguments: string[];
  gives: string[];
  what: string;
  method: string;
  holds: string;
  source: string;
  example: string;
}

export interface CatalogueUnit {
  symbols: string[];
  name: string;
  line: string;
  dimension: string;
}

export interface Wording {
  word: string;
  form: string;
  meaning: string;
  example: string;
}

export interface Catalogue {
  functions: CatalogueFunction[];
  units: CatalogueUnit[];
  statements: Wording[];
  expressions: Wording[];
}

export interface ValueChange {
  condition: Condition;
  old: Value;
  new: Value;
  change: number | null;
}

export interface QuantityDifference {
  symbol: string;
  old_unit: string | null;
  new_unit: string | null;
  in_old: boolean;
  in_new: boolean;
  conditions: number;
  changes: ValueChange[];
}

export interface GoverningDifference {
  symbol: string;
  unit: string | null;
  of: "largest" | "smallest";
  group: Condition;
  old: Extreme | null;
  new: Extreme | null;
  change: number | null;
}

export interface RequirementDifference {
  text: string;
  old: { met: boolean | null } | null;
  new: { met: boolean | null } | null;
  change: number | null;
}

export interface Differences {
  quantities: QuantityDifference[];
  governing: GoverningDifference[];
  requirements: RequirementDifference[];
}
