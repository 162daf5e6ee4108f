/** An open sheet in the thread at hand. */
import type * as glue from "../../page/generated/engine.js";
import { SheetError, errorOf, finding } from "./errors.js";
import { resultOf, trailOf } from "./reading.js";
import type { Completions, Finding, Form, Hover, Result, Trail } from "./types.js";

/** Labels by the names of axes. */
export type Labels = Readonly<Record<string, string>>;

/** An input's new right side: text as in a sheet, or numbers in the unit in which it is shown, one or one for each label. */
export type Setting = string | number | readonly number[] | Float64Array;

/** What columns count. */
export type Columns = "characters" | "utf16";

type Handle = glue.OpenSheet;

/** A sheet that is open. Its memory is given back by `free()`. */
export class Sheet {
  #engine: typeof glue;
  #handle: Handle | null;
  #result: Result | null = null;

  /** @internal */
  constructor(engine: typeof glue, handle: Handle) {
    this.#engine = engine;
    this.#handle = handle;
  }

  /** The report, as `pitchwright run --json` writes it. The object is the same until the sheet changes. */
  get result(): Result {
    this.#result ??= resultOf(this.json());
    return this.#result;
  }

  /** The sheet's text as it is now. */
  get text(): string {
    return this.#ask((handle) => handle.text());
  }

  /** The significant figures in which the sheet wants to be shown. */
  get digits(): number {
    return this.#ask((handle) => handle.digits());
  }

  /** The values of a quantity in its unit: a copy, row-major over its axes, NaN where there is no value. */
  values(symbol: string): Float64Array {
    return this.#ask((handle) => handle.values(String(symbol)));
  }

  /** The same at some labels only, over the axes that are left. */
  slice(symbol: string, condition: Labels): Float64Array {
    return this.#ask((handle) => handle.slice(String(symbol), { ...condition }));
  }

  /** Replaces the right side of an input. Gives no finding when that is done; else nothing has changed. */
  set(symbol: string, value: Setting): Finding[] {
    try {
      this.#change((handle) => {
        if (typeof value === "string") handle.set(String(symbol), value);
        else handle.set_numbers(String(symbol), numbersOf(value));
      });
      return [];
    } catch (error) {
      if (error instanceof SheetError && error.finding.code === "not-settable") return [error.finding];
      throw error;
    }
  }

  /** Takes the text after an edit. */
  update(text: string): void {
    if (typeof text !== "string") throw new TypeError("the text of a sheet is a string");
    this.#change((handle) => handle.update(text));
  }

  /** How a value came about; along axes that `condition` leaves, the condition of largest magnitude is taken. */
  trail(symbol: string, condition: Labels = {}): Trail {
    return trailOf(this.#ask((handle) => handle.trail(String(symbol), { ...condition })));
  }

  /** What could stand at a place; lines and columns count from 1. */
  complete(line: number, column: number, columns: Columns = "characters"): Completions {
    return JSON.parse(this.#ask((handle) => handle.complete(line, column, columns === "utf16"))) as Completions;
  }

  /** What stands at a place; null where there is nothing to say. */
  hover(line: number, column: number, columns: Columns = "characters"): Hover | null {
    return JSON.parse(this.#ask((handle) => handle.hover(line, column, columns === "utf16"))) as Hover | null;
  }

  /** Applies a fix of a finding, its first where none is named, and gives the new text. */
  fix(of: Pick<Finding, "code" | "line" | "column">, which = 0): string {
    return this.#change((handle) => handle.fix(of.code, of.line, of.column, which));
  }

  /** The rows of the computation form. */
  form(): Form {
    return JSON.parse(this.#ask((handle) => handle.form())) as Form;
  }

  /** The printed report, an HTML document with nothing outside it and no script. */
  print(): string {
    return this.#ask((handle) => handle.print());
  }

  /** Gives the sheet's memory back. What is asked of it afterwards throws; to free it again does nothing. */
  free(): void {
    this.#handle?.free();
    this.#handle = null;
    this.#result = null;
  }

  /** @internal The report as text. */
  json(): string {
    return this.#ask((handle) => handle.report());
  }

  #ask<T>(question: (handle: Handle) => T): T {
    const handle = this.#handle;
    if (!handle) throw new SheetError(finding("closed", "The sheet was closed."));
    try {
      return question(handle);
    } catch (error) {
      throw errorOf(error, () => this.#engine.last_panic());
    }
  }

  #change<T>(change: (handle: Handle) => T): T {
    const outcome = this.#ask(change);
    this.#result = null;
    return outcome;
  }
}

function numbersOf(value: Exclude<Setting, string>): Float64Array {
  const list = typeof value === "number" ? [value] : value;
  return Float64Array.from(list);
}
