/** A sheet in a thread of its own: every call answers with a promise. */
import type { FromThread, State, ToThread } from "./calls.js";
import { thread, type Thread } from "./engine.js";
import { SheetError, finding } from "./errors.js";
import { resultOf } from "./reading.js";
import type { Columns, Labels, Setting } from "./sheet.js";
import type { Completions, Finding, Form, Hover, Result, Trail } from "./types.js";

interface Waiting {
  done(value: unknown): void;
  failed(error: unknown): void;
}

/** A sheet that is open in a thread of its own. The thread ends with `free()`. */
export class WorkerSheet {
  #thread: Thread | null;
  #waiting = new Map<number, Waiting>();
  #last = 0;
  #state: State = { json: "", text: "", digits: 4 };
  #result: Result | null = null;
  /** Why the sheet is closed. */
  #closed: unknown = null;

  /** @internal */
  constructor(module: WebAssembly.Module) {
    this.#thread = thread();
    this.#thread.hear(
      (message) => this.#hear(message as FromThread),
      (error) => this.close(new SheetError(finding("engine-failure", `The engine broke off: ${String(error)}`))),
    );
    this.#thread.post({ module } satisfies ToThread);
  }

  /** The report after the last change that was answered. */
  get result(): Result {
    this.#result ??= resultOf(this.#state.json);
    return this.#result;
  }

  /** The sheet's text after the last change that was answered. */
  get text(): string {
    return this.#state.text;
  }

  /** The significant figures in which the sheet wants to be shown. */
  get digits(): number {
    return this.#state.digits;
  }

  /** The values of a quantity in its unit, row-major over its axes, NaN where there is no value. */
  values(symbol: string): Promise<Float64Array> {
    return this.#call("values", symbol);
  }

  /** The same at some labels only, over the axes that are left. */
  slice(symbol: string, condition: Labels): Promise<Float64Array> {
    return this.#call("slice", symbol, { ...condition });
  }

  /** Replaces the right side of an input. Gives no finding when that is done; else nothing has changed. */
  set(symbol: string, value: Setting): Promise<Finding[]> {
    return this.#call("set", symbol, value);
  }

  /** Takes the text after an edit. */
  update(text: string): Promise<void> {
    if (typeof text !== "string") return Promise.reject(new TypeError("the text of a sheet is a string"));
    return this.#call("update", text);
  }

  /** How a value came about. */
  async trail(symbol: string, condition: Labels = {}): Promise<Trail> {
    const trail = await this.#call<Trail>("trail", symbol, { ...condition });
    // A copy from another thread has a prototype again.
    for (const step of trail.steps) Object.setPrototypeOf(step.condition, null);
    return trail;
  }

  /** What could stand at a place; lines and columns count from 1. */
  complete(line: number, column: number, columns: Columns = "characters"): Promise<Completions> {
    return this.#call("complete", line, column, columns);
  }

  /** What stands at a place; null where there is nothing to say. */
  hover(line: number, column: number, columns: Columns = "characters"): Promise<Hover | null> {
    return this.#call("hover", line, column, columns);
  }

  /** Applies a fix of a finding, its first where none is named, and gives the new text. */
  fix(of: Pick<Finding, "code" | "line" | "column">, which = 0): Promise<string> {
    return this.#call("fix", { code: of.code, line: of.line, column: of.column }, which);
  }

  /** The rows of the computation form. */
  form(): Promise<Form> {
    return this.#call("form");
  }

  /** The printed report, an HTML document with nothing outside it and no script. */
  print(): Promise<string> {
    return this.#call("print");
  }

  /** Ends the thread. Calls that are not answered yet fail. */
  async free(): Promise<void> {
    this.close(new SheetError(finding("closed", "The sheet was closed.")));
  }

  /** @internal */
  open(text: string, sheets: Record<string, string>, operations: number | undefined): Promise<void> {
    return this.#send((id) => ({ id, open: { text, sheets, operations } }));
  }

  /** @internal */
  close(why: unknown): void {
    this.#thread?.end();
    this.#thread = null;
    this.#closed ??= why;
    for (const { failed } of this.#waiting.values()) failed(why);
    this.#waiting.clear();
  }

  #call<T>(call: string, ...given: unknown[]): Promise<T> {
    return this.#send<T>((id) => ({ id, call, given }));
  }

  #send<T>(message: (id: number) => ToThread): Promise<T> {
    const at = this.#thread;
    if (!at) return Promise.reject(this.#closed);
    const id = ++this.#last;
    return new Promise<T>((done, failed) => {
      this.#waiting.set(id, { done: done as (value: unknown) => void, failed });
      at.hold(true);
      at.post(message(id));
    });
  }

  #hear(message: FromThread): void {
    const waiting = this.#waiting.get(message.id);
    this.#waiting.delete(message.id);
    if (this.#waiting.size === 0) this.#thread?.hold(false);
    if ("finding" in message) {
      waiting?.failed(new SheetError(message.finding));
      return;
    }
    if (message.state) {
      this.#state = message.state;
      this.#result = null;
    }
    waiting?.done(message.value);
  }
}
